using Looseloop.Box;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Procedures.Commissioning;

/// <summary>In a running sweep the host says nothing for 2.5 s: the box must have stopped by then, and say why.</summary>
public static class WatchdogStep
{
    private const int DwellUs = 200_000;
    private const int EachSide = 12;

    /// <summary>What a serial adapter may keep a line for, seconds, added to what the box has.</summary>
    private const double AdapterS = 0.05;

    private static readonly TimeSpan _silence = TimeSpan.FromSeconds(2.5);

    /// <summary>Falls silent.</summary>
    public static SilenceResult Take(BoxSession box, double aboutHz, CancellationToken cancel) =>
        box.FallSilent(new SweepRequest(Read.CurveSweep.About(box.Grid, aboutHz, EachSide, 1, 0.5), DwellUs, 1), _silence, cancel);

    /// <summary>Judges what the box did.</summary>
    public static StepFinding Judge(SilenceResult result)
    {
        var figures = new Dictionary<string, double> { ["stopped_after_s"] = result.Stopped ? result.After.TotalSeconds : double.NaN };
        if (!result.Stopped)
        {
            return Finding(StepResult.Failed, $"The box went on for {result.After.TotalSeconds:0.0} s without a word from the host. Do not use it: its drive does not stop by itself.");
        }

        if (result.FaultCode != FaultCode.HostSilent)
        {
            return Finding(StepResult.Failed, $"The sweep ended after {result.After.TotalSeconds:0.00} s with '{FaultCode.Text(result.FaultCode)}' where '{FaultCode.Text(FaultCode.HostSilent)}' was due.");
        }

        return result.After.TotalSeconds > (WireLimits.HostSilenceMs * 1e-3) + AdapterS
            ? Finding(StepResult.Failed, $"The box stopped {result.After.TotalSeconds:0.00} s after the host's last line: later than 2 s.")
            : Finding(StepResult.Passed, $"Stopped {result.After.TotalSeconds:0.00} s after the host's last line, as host-silent. Pull the cable once too, with a lamp or a scope on the loop.");

        StepFinding Finding(StepResult outcome, FormattableString detail) =>
            new(CommissioningStep.Watchdog, outcome, FormattableString.Invariant(detail), figures);
    }
}
