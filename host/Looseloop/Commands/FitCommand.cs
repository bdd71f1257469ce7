using System.CommandLine;
using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Rendering;
using Looseloop.Resonance;
using Looseloop.Tables;
using Looseloop.Terminal;

namespace Looseloop.Commands;

/// <summary><c>fit</c>: the same fit on anybody's table of frequency and amplitude.</summary>
internal sealed class FitCommand(Shell shell)
{
    private readonly Argument<string> _file = new("FILE")
    {
        Description = "Table with a column of frequencies and one of amplitudes; a third, of standard uncertainties, is used if there.",
    };

    private readonly Option<ResponseTable.Scale> _scale = new("--scale")
    {
        Description = "What the amplitude column holds.",
        DefaultValueFactory = _ => ResponseTable.Scale.Amplitude,
    };

    private readonly Option<double> _prefactor = new("--prefactor")
    {
        Description = "n of a prefactor (f/f0)^n of the amplitude: -1, 0 or 1.",
        HelpName = "N",
    };

    private readonly Option<bool> _plain = new("--no-feed-through") { Description = "Fit a plain resonance, without feed-through." };

    public static Command Create(Shell shell) => new FitCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("fit", "Fit f0 and Q to a table of frequency and amplitude.")
        {
            Arguments = { _file },
            Options = { _scale, _prefactor, _plain },
        };
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        string path = parsed.GetValue(_file)!;
        IReadOnlyList<ResponseRow> rows = ResponseTable.Read(path, parsed.GetValue(_scale));
        FitPoint[] points = Points(path, rows);
        if (!parsed.GetValue(CommonOptions.Quiet))
        {
            SayOddities(rows);
        }

        var options = new FitOptions
        {
            PrefactorExponent = parsed.GetValue(_prefactor),
            Background = parsed.GetValue(_plain) ? BackgroundModel.None : BackgroundModel.FeedThrough,
        };
        var fitter = new ResonanceFitter(Math.Max(points.Length, 16));
        ResonanceFit fit = fitter.Fit(points, options);
        FitVerdict judged = FitVerdict.Judge(points, fit, fitter.NormalizedResiduals);
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => Write(json, path, points.Length, fit, judged)));
        }
        else
        {
            FitText.Write(shell.Out, fit, judged);
        }

        return Verdicts.ExitCodeOf(judged.Verdict);
    }

    private static FitPoint[] Points(string path, IReadOnlyList<ResponseRow> rows)
    {
        // Where only some rows state an uncertainty none can be weighed against the others.
        bool stated = rows.All(row => row.Uncertainty > 0);
        int[] groups = [.. rows.Select(row => row.Group).Distinct().Order()];
        if (groups.Length > ResonanceFitter.MostGroups)
        {
            throw new UserError($"{path} has {groups.Length} groups of points; at most {ResonanceFitter.MostGroups} can be fitted together.");
        }

        return
        [
            .. rows.Select(row => new FitPoint(
                row.FrequencyHz, row.Amplitude, stated ? row.Uncertainty * row.Uncertainty : double.NaN, Array.IndexOf(groups, row.Group), row.Weight)),
        ];
    }

    private void SayOddities(IReadOnlyList<ResponseRow> rows)
    {
        int repeated = rows.Count - rows.Select(row => row.FrequencyHz).Distinct().Count();
        bool sorted = rows.Zip(rows.Skip(1)).All(pair => pair.First.FrequencyHz <= pair.Second.FrequencyHz);
        if (repeated > 0)
        {
            shell.Say($"{repeated} frequencies occur more than once; each point counts as a measurement of its own.");
        }

        if (!sorted)
        {
            shell.Say("The table is not in order of frequency; the fit does not mind.");
        }
    }

    private static void Write(Utf8JsonWriter json, string path, int points, ResonanceFit fit, FitVerdict judged)
    {
        bool figures = fit.IsFitted && judged.Verdict != Verdict.None;
        json.WriteNumber("schema_version", 1);
        json.WriteString("file", path);
        json.WriteNumber("points", points);
        json.WriteString("verdict", judged.Verdict.ToString().ToLowerInvariant());
        json.Figure("f0_hz", figures ? fit.F0Hz : double.NaN);
        json.Figure("f0_standard_hz", figures ? fit.F0StandardHz : double.NaN);
        json.Figure("q", figures ? fit.Q : double.NaN);
        json.Figure("q_standard", figures ? fit.Q * fit.QRelativeStandard : double.NaN);
        json.Figure("bandwidth_hz", figures ? fit.BandwidthHz : double.NaN);
        json.Figure("peak_amplitude", figures ? fit.PeakAmplitude : double.NaN);
        json.Figure("feed_through_ratio", figures ? fit.FeedThrough.Ratio : double.NaN);
        json.Figure("residual_ratio", figures ? fit.ResidualRatio : double.NaN);
        json.Figure("chi_square_probability", fit.ChiSquareProbability);
        json.Objects("reasons", judged.Reasons, reason =>
        {
            json.WriteString("code", reason.Name);
            json.WriteString("at_best", reason.AtBest.ToString().ToLowerInvariant());
            json.WriteString("detail", reason.Detail);
            json.WriteString("advice", reason.Advice);
        });
    }
}
