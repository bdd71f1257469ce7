namespace Looseloop.Firmware
{
    /// <summary>Where one repeat of a ring stands.</summary>
    internal enum RingPhase
    {
        Start,
        Driving,
        Waiting,
        Reporting,
    }
}
