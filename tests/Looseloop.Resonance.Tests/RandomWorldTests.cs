using Looseloop.Readings;
using Looseloop.Resonance;
using Xunit.Abstractions;

namespace Looseloop.Resonance.Tests;

/// <summary>Many random curves: the minimum is found, and no wrong figure is called sound.</summary>
public sealed class RandomWorldTests(ITestOutputHelper output)
{
    private const int Worlds = 2000;

    [Fact]
    public void Whatever_is_sound_lies_within_its_interval()
    {
        var random = new Random(77);
        var fitter = new ResonanceFitter(200);
        int sound = 0, doubtful = 0, none = 0, beyond3 = 0, missed = 0;
        var failures = new List<string>();
        for (int world = 0; world < Worlds; world++)
        {
            double q = Math.Exp(Range(random, Math.Log(20), Math.Log(1000)));
            double f0 = Range(random, 35e3, 550e3);
            double b = random.NextDouble() < 0.3 ? 0 : Range(random, 0, 0.3);
            double phase = Range(random, 0, 360);
            double sigma = Math.Exp(Range(random, Math.Log(1e-4), Math.Log(2e-2)));
            int count = random.Next(9, 121);
            double reach = Range(random, 1, 8);
            double offset = Range(random, -0.8, 0.8) * reach;
            double[] grid = [.. Enumerable.Range(0, count).Select(i => f0 + ((offset + (reach * ((2.0 * i / (count - 1)) - 1))) * f0 / q))];
            FitPoint[] points = TestCurves.Points(grid, f => TestCurves.Amplitude(f, f0, q, 700, 700 * b, phase), 700 * sigma, random);
            ResonanceFit fit = fitter.Fit(points, new FitOptions());
            FitVerdict verdict = FitVerdict.Judge(points, fit, fit.IsFitted ? fitter.NormalizedResiduals : default);
            sound += verdict.Verdict == Verdict.Sound ? 1 : 0;
            doubtful += verdict.Verdict == Verdict.Doubtful ? 1 : 0;
            none += verdict.Verdict == Verdict.None ? 1 : 0;

            // The curve itself, started at the truth, must not lie lower than what was found.
            ResonanceFit told = fitter.Fit(points, new FitOptions { F0GuessHz = f0, QGuess = q });
            if (fit.IsFitted && told.IsFitted && fit.SumOfSquares > told.SumOfSquares + 0.5)
            {
                missed++;
                failures.Add($"{world}: minimum missed, {fit.SumOfSquares:F1} > {told.SumOfSquares:F1}; Q {q:F0}, {count} points, reach {reach:F1}, sigma {sigma:G2}");
            }

            double z = Math.Max(Math.Abs(fit.F0Hz - f0) / fit.F0StandardHz, Math.Abs(fit.Q - q) / (fit.QRelativeStandard * fit.Q));
            if (verdict.Verdict == Verdict.Sound && !(z < 3))
            {
                beyond3++;
                failures.Add($"{world}: sound but {z:F1} sigma off; Q {q:F0} -> {fit.Q:F0} ({fit.QRelativeStandard:P1}), b {b:F2}, {count} points, reach {reach:F1}, offset {offset:F1}, sigma {sigma:G2}");
            }
        }

        output.WriteLine($"{Worlds} worlds: {sound} sound, {doubtful} doubtful, {none} none; {beyond3} sound beyond 3 sigma, {missed} minima missed");
        failures.ForEach(output.WriteLine);
        Assert.True(sound > Worlds / 3);
        Assert.Equal(0, missed);

        // Two figures a world, 0.27 % each: 0.54 % expected, and three standard deviations over that allowed.
        double expected = 0.0054 * sound;
        Assert.True(beyond3 <= expected + (3 * Math.Sqrt(expected)), $"{beyond3} sound beyond 3 sigma, {expected:F1} expected");
    }

    private static double Range(Random random, double low, double high) => low + ((high - low) * random.NextDouble());
}
