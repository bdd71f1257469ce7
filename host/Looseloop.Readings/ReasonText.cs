namespace Looseloop.Readings;

/// <summary>What each reason is called, how far it lowers the verdict, and what to do about it.</summary>
public static class ReasonText
{
    /// <summary>The best verdict that a reading with this reason may have.</summary>
    public static Verdict AtBest(ReasonCode code) => Entry(code).AtBest;

    /// <summary>What to do about it; one sentence.</summary>
    public static string Advice(ReasonCode code) => Entry(code).Advice;

    /// <summary>The code in lower-case words joined by hyphens.</summary>
    public static string Name(ReasonCode code)
    {
        string name = code.ToString();
        return string.Concat(name.Select((c, i) => char.IsUpper(c) ? (i > 0 ? "-" : "") + char.ToLowerInvariant(c) : c.ToString()));
    }

    private static (Verdict AtBest, string Advice) Entry(ReasonCode code) => code switch
    {
        ReasonCode.Ghost => (Verdict.None, "Look at the harmonic it points to: the coil's own response is there."),
        ReasonCode.Overtone => (Verdict.Doubtful, "Look lower: a coil's own f0 lies below its overtones."),
        ReasonCode.Carrier => (Verdict.Doubtful, "Turn or move the pickup, or wait until the other signal is gone, and read again."),
        ReasonCode.FieldPresent => (Verdict.None, "Stop: the coil may be energised. Switch its driver off, lock it out, discharge and short the tank, then read."),
        ReasonCode.Saturated => (Verdict.Doubtful, "Move the pickup away or lower the duty, and read again."),
        ReasonCode.BelowRange => (Verdict.None, "Check the pickup and its pedestal: the converter must see some 200 mV with the drive off."),
        ReasonCode.TooLittleSignal => (Verdict.Doubtful, "Bring the pickup or the loop a little closer, or take more samples."),
        ReasonCode.NoPeak => (Verdict.None, "Check that loop and pickup are connected and near the coil, and widen the range."),
        ReasonCode.PeakAtEdge => (Verdict.Doubtful, "Move the range so that the peak lies well inside it."),
        ReasonCode.FeedThroughLarge => (Verdict.Doubtful, "Move the pickup away from the loop, towards the coil's top, and earth the loop's screen."),
        ReasonCode.ResidualTooLarge => (Verdict.Doubtful, "Look for a second resonance, a moving person or cable, or a feed-through that changes, and read again."),
        ReasonCode.HarmonicsAtDetector => (Verdict.Doubtful, "Use a detector that responds to power, or lower the level until a diode works in its square-law range."),
        ReasonCode.SweepTooFast => (Verdict.Doubtful, "Give a longer dwell: the ring or the detector had not settled."),
        ReasonCode.Drift => (Verdict.Doubtful, "Wait until the coil and the room are steady, stand still, and read again."),
        ReasonCode.HumOrBursts => (Verdict.Doubtful, "Move mains leads away from the pickup, find the source of the bursts, or take more samples."),
        ReasonCode.TwoResponses => (Verdict.Doubtful, "Take out or open the primary, and move other coils away, then read again."),
        ReasonCode.OvertoneOnThird => (Verdict.Doubtful, "Read at duty 1/3, which silences the drive's third harmonic."),
        ReasonCode.GridTooCoarse => (Verdict.Doubtful, "Use vernier settings or the ring-down: this Q is too high for the settings near f0."),
        ReasonCode.CouplingTooTight => (Verdict.Doubtful, "Move the loop away until the amplitude has halved, and read again."),
        ReasonCode.RingDisagrees => (Verdict.Doubtful, "Move loop and pickup away and read again; where the two still differ, trust neither."),
        ReasonCode.RingTooShort => (Verdict.Sound, "Use the sweep's Q: the ring is over before the detector can follow it."),
        ReasonCode.PointsMissing => (Verdict.Doubtful, "Check the cable, and read again."),
        ReasonCode.TooFewPoints => (Verdict.None, "Take more points, most of them within two bandwidths of the peak."),
        ReasonCode.FitFailed => (Verdict.None, "Look at the points: they do not have the shape of a resonance."),
        ReasonCode.DetectorNotRead => (Verdict.Sound, "Read the detector's law once with a ladder."),
        ReasonCode.DetectorNotPower => (Verdict.Sound, "Fit a detector that responds to power; Q is uncertain by the harmonics until then."),
        ReasonCode.ClockNotTrimmed => (Verdict.Sound, "Trim the clock once for a better absolute f0."),
        ReasonCode.NotCommissioned => (Verdict.Sound, "Commission the box once."),
        ReasonCode.PullNotMeasured => (Verdict.Sound, "Take a standoff once for this coil and set-up, and read again after moving the cable."),
        ReasonCode.SetUpNotStated => (Verdict.Sound, "State what stands with the coil."),
        ReasonCode.NotSurveyed => (Verdict.Sound, "Read once without --near over the whole range where the coil is not known."),
        ReasonCode.NoiseFromResiduals => (Verdict.Sound, "Give a column of uncertainties where they are known."),
        _ => throw new ArgumentOutOfRangeException(nameof(code), code, "a reason without a text"),
    };
}
