using Looseloop.Bench;
using Looseloop.Box;
using Looseloop.Campaign;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Survey;

public class SurveyTests
{
    // The drive's Fourier series: a coil at 150 kHz answers its third harmonic at 50 kHz and its fifth at 30 kHz.
    [Fact]
    public void Responses_are_named()
    {
        using var link = new VirtualBox(WorldShelf.Load("wren"));
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        SurveyResult survey = SurveyProcedure.Run(
            box, Laws.Of(WorldShelf.Load("wren")), SurveySweep.LowHz, SurveySweep.HighHz, NoWatch.Instance, CancellationToken.None);
        Assert.InRange(survey.F0!.FrequencyHz, 149_300, 150_600);
        Assert.Contains(survey.Responses, r => r.Kind == ResponseKind.Ghost && r.Harmonic == 3 && Math.Abs(r.FrequencyHz - 50_000) < 200);
        Assert.Contains(survey.Responses, r => r.Kind == ResponseKind.Ghost && r.Harmonic == 5 && Math.Abs(r.FrequencyHz - 30_000) < 200);
        Assert.Contains(survey.Responses, r => r.Kind == ResponseKind.Overtone && Math.Abs(r.FrequencyHz - 418_000) < 2_000);
        Assert.DoesNotContain(survey.Responses, r => r.Kind == ResponseKind.Neighbour);
    }

    [Fact]
    public void Prominence_parts_a_shoulder_from_a_peak()
    {
        double[] level = [1, 2, 3, 2.9, 3.05, 2, 1, 1, 5, 1];
        SurveyPoint[] points = [.. level.Select((y, i) => new SurveyPoint(1000 + i, y, 0.005))];
        IReadOnlyList<Maximum> found = ResponseFinder.Find(points, 9);
        Assert.Equal([8, 4, 2], found.Select(maximum => maximum.Index));
        Assert.Equal(0.1, found[2].Prominence, 1e-12);
    }

    // Ratios from the Fourier series of a pulse train: .5878, .9511, 0 for the first, third and fifth from 1/2 to 1/5.
    [Theory]
    [InlineData(0.5878, 1)]
    [InlineData(0.9511, 3)]
    [InlineData(0.01, 5)]
    [InlineData(15, 2)]
    [InlineData(0.75, 0)]
    public void The_duty_test_names_the_harmonic(double ratio, int order)
    {
        var high = new Setting(9, 267, 256, 149_812.7);
        var low = high with { DutyCount = 102 };
        Assert.Equal(order, HarmonicTest.Order(ratio, 0.005, low, high));
    }
}
