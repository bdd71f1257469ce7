namespace Looseloop.Firmware
{
    /// <summary>Where the firmware of this board starts. Say here which of the optional inputs are wired.</summary>
    public static class Esp32Program
    {
        public static void Main()
        {
            BoardRunner.Run(PinMap.Esp32(false, false));
        }
    }
}
