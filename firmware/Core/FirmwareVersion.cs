namespace Looseloop.Firmware
{
    /// <summary>The version of the firmware's decisions, as `box` reports it.</summary>
    public static class FirmwareVersion
    {
        public const int Major = 0;
        public const int Minor = 1;
        public const int Patch = 0;
    }
}
