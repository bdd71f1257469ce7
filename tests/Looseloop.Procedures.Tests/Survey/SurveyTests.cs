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
    [InlineData(0.5878, ResponseKind.F0, 1)]
    [InlineData(0.9511, ResponseKind.Ghost, 3)]
    [InlineData(0.01, ResponseKind.Ghost, 5)]
    [InlineData(15, ResponseKind.Ghost, 2)]
    [InlineData(0.75, ResponseKind.Unknown, 0)]
    public void A_response_is_named_by_its_duty_ratio(double ratio, ResponseKind kind, int order)
    {
        Response response = Assert.Single(ResponseNaming.Name([Finding(9, 267, 1000, ratio, 0.005)], double.NaN));
        Assert.Equal((kind, order), (response.Kind, response.Harmonic));
    }

    // sin(pi (D + d)) with d = 100 ns at 500 kHz: .25 / .55 of a period, ratio .7071 / .9877 = .7159.
    [Fact]
    public void Edges_that_a_ladder_has_measured_are_counted()
    {
        CloseLook.Finding finding = Finding(9, 80, 1000, 0.7159, 0.005);
        Assert.Equal(ResponseKind.Unknown, ResponseNaming.Name([finding], double.NaN)[0].Kind);
        Assert.Equal(ResponseKind.F0, ResponseNaming.Name([finding], 100e-9)[0].Kind);
    }

    // A fifth-harmonic ghost has a fifth of what stands at five times its frequency.
    [Fact]
    public void A_vague_ratio_is_decided_by_what_stands_at_a_multiple()
    {
        CloseLook.Finding weak = Finding(10, 183, 173, 0.384, 0.106);
        CloseLook.Finding strong = Finding(9, 73, 964, 0.5956, 0.0023);
        IReadOnlyList<Response> named = ResponseNaming.Name([weak, strong], double.NaN);
        Assert.Equal((ResponseKind.Ghost, 5), (named[0].Kind, named[0].Harmonic));
        Assert.Equal(ResponseKind.F0, named[1].Kind);

        // And alone it is not called real.
        Assert.Equal(ResponseKind.Unknown, ResponseNaming.Name([Finding(9, 267, 173, 0.55, 0.12)], double.NaN)[0].Kind);
    }

    private static CloseLook.Finding Finding(int dutyBits, int divider, double amplitude, double ratio, double uncertainty)
    {
        double hz = 80e6 * 256 / (divider * (double)(1 << dutyBits));
        var high = new Setting(dutyBits, divider, 1 << (dutyBits - 1), hz);
        Setting low = high with { DutyCount = (int)Math.Round(0.2 * (1 << dutyBits)) };
        return new CloseLook.Finding(high, low, amplitude, 1, ratio, uncertainty, true);
    }

    // Edges uneven by 140 ns at 420 kHz, not known from any ladder: the strongest response has nothing above it.
    [Fact]
    public void Where_the_duty_test_fails_the_source_decides()
    {
        World wren = WorldShelf.Load("wren");
        World world = wren with
        {
            Drive = wren.Drive with { HighExtraNs = 140 },
            Coil = wren.Coil with { Modes = [.. wren.Coil.Modes.Select((mode, i) => mode with { F0Hz = mode.F0Hz * 420 / 150 })] },
        };
        using var link = new VirtualBox(world);
        using BoxSession box = BoxSession.Open(link, TimeSpan.FromSeconds(5));
        SurveyResult survey = SurveyProcedure.Run(
            box, Laws.Of(world), SurveySweep.LowHz, SurveySweep.HighHz, NoWatch.Instance, CancellationToken.None);
        Assert.InRange(survey.F0!.FrequencyHz, 417_000, 423_000);
        Assert.False(Math.Abs(survey.F0.DutyRatio - 0.5878) < 0.06);
    }
}
