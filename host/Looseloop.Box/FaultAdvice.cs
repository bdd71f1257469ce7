using Looseloop.Protocol;

namespace Looseloop.Box;

/// <summary>What each fault of the protocol means to the person at the bench.</summary>
internal static class FaultAdvice
{
    public static string Sentence(int code) => code switch
    {
        FaultCode.FieldPresent =>
            "A field is present with the drive off: the coil may be energised. The box has not driven. "
            + "Switch the coil's driver off, lock it out, discharge and short its tank, then try again.",
        FaultCode.PickupBelowRange =>
            "The pickup reads nothing at all, so a foreign field could not be seen. The box has not driven. "
            + "Check that the pickup is connected and that its pedestal stands above the converter's dead zone.",
        FaultCode.HostSilent =>
            "The box heard nothing from this computer for two seconds and stopped its drive. "
            + "The points sent so far are kept. Check the cable and whether the computer was asleep, then read again.",
        FaultCode.PickupFailed => "The box's converter failed; the drive is off. Restart the box and check its pickup input.",
        FaultCode.DriveFailed => "The box's timer failed; the drive is off. Restart the box.",
        FaultCode.NoSuchInput => "The box does not have this input.",
        FaultCode.OutsideLimits => "A setting lies outside what the box may drive. Narrow the range, or widen the box's limits.",
        FaultCode.PlanFull => "The sweep does not fit the box. Take fewer settings.",
        FaultCode.PlanEmpty => "The box has lost its plan; it may have restarted. Try again.",
        FaultCode.Busy => "The box was still busy with an earlier request. Try again.",
        FaultCode.UnreadableLine or FaultCode.LineTooLong => "Lines to the box arrive damaged. Check the cable, and keep it away from the coil.",
        _ => $"The box reported a fault: {FaultCode.Text(code)}. The drive is off. Restart the box, and report it if it comes back.",
    };
}
