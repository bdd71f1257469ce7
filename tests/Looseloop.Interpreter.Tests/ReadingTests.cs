using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Procedures;
using Looseloop.Procedures.Detector;
using Looseloop.Procedures.Read;
using Looseloop.Readings;
using Xunit.Abstractions;

namespace Looseloop.Interpreter.Tests;

/// <summary>Whole procedures of the host against the firmware in the interpreter, over its pseudo-terminal.</summary>
public class ReadingTests(ITestOutputHelper output)
{
    private const double CircuitHz = 152_300;
    private const double CircuitQ = 180;

    [InterpreterTheory]
    [InlineData("Esp32")]
    [InlineData("Esp32S3")]
    public void A_reading_finds_the_circuit_within_its_own_interval(string name)
    {
        using InterpretedBoard board = InterpretedBoard.Start(name);
        using var trace = new StringWriter();
        using BoxSession session = BoxSession.Open(new LinkTrace(SerialLink.Open(board.Port), trace), TimeSpan.FromSeconds(5));
        var options = new ReadOptions
        {
            Law = DetectorLaw.Declared(DetectorKind.RmsLinear, 400),
            HostVersion = "test",
            Time = TimeProvider.System,
        };
        Reading reading = new ReadProcedure(session, options, NoWatch.Instance, CancellationToken.None).Run().Reading;
        output.WriteLine(
            $"{name}: f0 {reading.F0Hz:F1} Hz +- {reading.Budget.F0Hz(false):F1}/{reading.Budget.F0Hz(true):F1}, "
            + $"Q {reading.Q:F2} +- {reading.Budget.QRelative(false) * reading.Q:F2}/{reading.Budget.QRelative(true) * reading.Q:F2}, "
            + $"{reading.Verdict} {string.Join(' ', reading.Reasons.Select(reason => reason.Code))}, {reading.BoardSeconds:F1} s");
        Assert.NotEqual(Verdict.None, reading.Verdict);

        // Repeatability alone, k = 3: nothing pulls this circuit, and both clocks are exact.
        Assert.InRange(reading.F0Hz - CircuitHz, -3 * reading.Budget.F0Hz(false), 3 * reading.Budget.F0Hz(false));
        double qInterval = 3 * reading.Budget.QRelative(false) * reading.Q;
        Assert.InRange(reading.Q - CircuitQ, -qInterval, qInterval);
        board.WaitForDrive(false, 5); // the trace of the pin comes by another way than the lines
    }
}
