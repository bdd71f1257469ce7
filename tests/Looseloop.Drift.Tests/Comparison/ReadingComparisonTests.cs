using Looseloop.Drift.Comparison;
using Looseloop.Readings;

namespace Looseloop.Drift.Tests.Comparison;

public class ReadingComparisonTests
{
    private static readonly BoxIdentity _box = new("bench", "esp32", "0.1.0", 1, 42, 19, 30000, 600000, 4095, 1);

    internal static Reading Reading(
        double f0Hz, double q, double noiseHz = 1, double noiseQ = 0.002, double pullHz = 90, BoxIdentity? box = null,
        Verdict verdict = Verdict.Sound) => new()
        {
            Id = Guid.CreateVersion7(),
            Utc = DateTimeOffset.UnixEpoch,
            BoardTimeUs = 0,
            BoardSeconds = 1,
            Box = box ?? _box,
            HostVersion = "0.1.0",
            F0Hz = f0Hz,
            Q = q,
            PeakCounts = 1000,
            Budget = new Budget(
            [
                new BudgetLine("noise", noiseHz, noiseQ, true, double.PositiveInfinity, "scatter"),
                new BudgetLine("clock", 4.6, 0, false, double.PositiveInfinity, "data sheet"),
                new BudgetLine("pull", pullHz, 0.01, false, double.PositiveInfinity, "no standoff"),
            ]),
            Verdict = verdict,
            Reasons = verdict == Verdict.Doubtful ? [new Reason(ReasonCode.Drift, "it moved")] : [],
            Points = [],
            Dark = [],
        };

    [Fact]
    public void Common_terms_cancel_and_repeatability_does_not()
    {
        ReadingComparison compared = ReadingComparison.Of(Reading(150000, 200), Reading(150010, 200), new CompareOptions())!;

        // sqrt(1^2 + 1^2), the 90 Hz of pull and 4.6 Hz of clock gone (GUM 5.2.2 with r = 1).
        Assert.Equal(Math.Sqrt(2), compared.F0.Standard, 1e-9);
        Assert.Equal(ChangeVerdict.Changed, compared.F0.Verdict);
        Assert.Equal(10 / 750.0, compared.Bandwidths, 1e-12);
    }

    [Fact]
    public void Moved_things_no_longer_cancel_but_the_clock_does()
    {
        ReadingComparison compared = ReadingComparison.Of(
            Reading(150000, 200), Reading(150010, 200), new CompareOptions { Untouched = false })!;
        Assert.Equal(Math.Sqrt(2 + (2 * 90 * 90)), compared.F0.Standard, 1e-9);
        Assert.Equal(ChangeVerdict.CannotTell, compared.F0.Verdict);
    }

    [Fact]
    public void Another_box_shares_nothing()
    {
        Reading other = Reading(150010, 200, box: _box with { Port = "elsewhere", BootId = 7 });
        ReadingComparison compared = ReadingComparison.Of(Reading(150000, 200), other, new CompareOptions())!;
        Assert.False(compared.SameBox);
        Assert.Equal(Math.Sqrt(2 + (2 * 90 * 90) + (2 * 4.6 * 4.6)), compared.F0.Standard, 1e-9);
        Assert.NotEmpty(compared.Cautions);
    }

    [Fact]
    public void A_term_that_grew_leaves_its_growth()
    {
        ReadingComparison compared = ReadingComparison.Of(
            Reading(150000, 200, pullHz: 90), Reading(150000, 200, pullHz: 95), new CompareOptions())!;
        Assert.Equal(Math.Sqrt(2 + 25), compared.F0.Standard, 1e-9);
    }

    [Fact]
    public void Capacitance_follows_the_frequency_at_fixed_inductance()
    {
        // f = 1/(2 pi sqrt(L C)): C2/C1 = (f1/f2)^2, to first order dC/C = -2 df/f. 0.02 pF on 15.6 pF is -640 ppm of f.
        double f2 = 268400 * Math.Sqrt(15.6 / 15.62);
        ReadingComparison compared = ReadingComparison.Of(Reading(268400, 250), Reading(f2, 250), new CompareOptions())!;
        Assert.Equal(0.02 / 15.6, compared.CapacitanceRelative, 1e-9);
        Assert.Equal(-640e-6 * 268400, compared.F0.Difference, 0.5);
        Assert.Equal(2 * Math.Sqrt(2) / 268400, compared.CapacitanceStandard, 0.005 * 2 * Math.Sqrt(2) / 268400);
    }

    [Fact]
    public void No_change_raises_no_more_false_alarms_than_stated()
    {
        Noise noise = new(1);
        const int Pairs = 10000;
        int f0 = 0;
        int q = 0;
        for (int i = 0; i < Pairs; i++)
        {
            // The common terms have one draw for both readings; only repeatability is drawn twice.
            double common = 90 * noise.Next();
            Reading a = Reading(150000 + common + noise.Next(), 200 * (1 + (0.002 * noise.Next())));
            Reading b = Reading(150000 + common + noise.Next(), 200 * (1 + (0.002 * noise.Next())));
            ReadingComparison compared = ReadingComparison.Of(a, b, new CompareOptions())!;
            f0 += compared.F0.Verdict == ChangeVerdict.Changed ? 1 : 0;
            q += compared.Q.Verdict == ChangeVerdict.Changed ? 1 : 0;
        }

        // 5 % of 10 000, binomial SD 22: four of them.
        Assert.InRange(f0, 412, 588);
        Assert.InRange(q, 412, 588);
    }

    [Fact]
    public void A_tenth_of_a_bandwidth_is_found_whenever_the_detectable_change_says_so()
    {
        Noise noise = new(2);
        int said = 0;
        int found = 0;
        for (int i = 0; i < 4000; i++)
        {
            double noiseHz = 5 + (25 * noise.Uniform());
            Reading a = Reading(150000 + (noiseHz * noise.Next()), 200, noiseHz);
            Reading b = Reading(150075 + (noiseHz * noise.Next()), 200, noiseHz);
            ReadingComparison compared = ReadingComparison.Of(a, b, new CompareOptions())!;
            if (compared.F0.Detectable <= 75)
            {
                said++;
                found += compared.F0.Verdict == ChangeVerdict.Changed ? 1 : 0;
            }
        }

        Assert.InRange(said, 800, 3200);
        Assert.True(found >= 0.95 * said, $"{found} of {said}");
    }

    [Fact]
    public void Not_changed_is_never_said_of_a_change_that_matters()
    {
        Noise noise = new(3);
        int wrong = 0;
        for (int i = 0; i < 4000; i++)
        {
            double noiseHz = 5 + (60 * noise.Uniform());
            Reading a = Reading(150000 + (noiseHz * noise.Next()), 200, noiseHz);
            Reading b = Reading(150075 + (noiseHz * noise.Next()), 200, noiseHz);
            wrong += ReadingComparison.Of(a, b, new CompareOptions())!.F0.Verdict == ChangeVerdict.NotChanged ? 1 : 0;
        }

        // The change stands at the margin: one-sided 2.5 % at worst.
        Assert.InRange(wrong, 0, 140);
    }

    [Theory]
    [InlineData(150000, 198, WindingState.NotSuspect)]
    [InlineData(150000, 120, WindingState.MoreLoss)]
    [InlineData(151500, 60, WindingState.ShortedTurn)]
    public void A_fallen_Q_makes_the_winding_suspect(double f0Hz, double q, WindingState expected)
    {
        ReadingComparison compared = ReadingComparison.Of(Reading(150000, 200), Reading(f0Hz, q), new CompareOptions())!;
        Assert.Equal(expected, compared.Winding);
    }

    [Fact]
    public void A_noisy_fall_of_Q_is_not_judged()
    {
        ReadingComparison compared = ReadingComparison.Of(
            Reading(150000, 200, noiseQ: 0.1), Reading(150000, 150, noiseQ: 0.1), new CompareOptions())!;
        Assert.Equal(WindingState.CannotTell, compared.Winding);
    }

    [Fact]
    public void Doubtful_readings_carry_no_verdict_and_none_gives_no_comparison()
    {
        ReadingComparison held = ReadingComparison.Of(
            Reading(150000, 200), Reading(151000, 100, verdict: Verdict.Doubtful), new CompareOptions())!;
        Assert.Equal(ChangeVerdict.CannotTell, held.F0.Verdict);
        Assert.Equal(ChangeVerdict.CannotTell, held.Q.Verdict);
        Assert.Equal(WindingState.CannotTell, held.Winding);
        Assert.Contains(held.Cautions, c => c.Contains("drift", StringComparison.Ordinal));
        Assert.Null(ReadingComparison.Of(
            Reading(150000, 200), Reading(double.NaN, double.NaN, verdict: Verdict.None), new CompareOptions()));
    }

    [Fact]
    public void What_stands_differently_is_listed()
    {
        Reading a = Reading(150000, 200) with { SetUp = new Dictionary<string, string> { ["top"] = "ring 300x80", ["earth"] = "rod" } };
        Reading b = Reading(150000, 200) with { SetUp = new Dictionary<string, string> { ["top"] = "none", ["earth"] = "rod" } };
        Assert.Equal(["top: ring 300x80 -> none"], ReadingComparison.Of(a, b, new CompareOptions())!.SetUpDifferences);
    }
}
