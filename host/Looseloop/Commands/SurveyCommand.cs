using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Boxes;
using Looseloop.Procedures.Survey;
using Looseloop.Readings;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>survey</c>: every response in a range, each named.</summary>
internal sealed class SurveyCommand(Shell shell)
{
    private readonly Option<double?> _from = Quantity.HertzOption("--from", "Lowest frequency (30k).");
    private readonly Option<double?> _to = Quantity.HertzOption("--to", "Highest frequency (600k).");

    public static Command Create(Shell shell) => new SurveyCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("survey", "Show every response in a range and say what each is: f0, ghost, overtone, carrier.")
        {
            Options = { _from, _to },
        };
        BoxChoice.AddTo(command);
        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        using ChosenBox box = BoxChoice.Open(shell, parsed);
        DetectorLaw law = box.Law ?? UndeclaredBox.LawOf(box.Session);
        var progress = new ProgressLine(shell, parsed.GetValue(CommonOptions.Quiet));
        SurveyResult survey;
        try
        {
            survey = SurveyProcedure.Run(
                box.Session, law, parsed.GetValue(_from) ?? SurveySweep.LowHz, parsed.GetValue(_to) ?? SurveySweep.HighHz, progress, shell.Cancel);
        }
        finally
        {
            progress.End();
        }

        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => WriteJson(json, survey)));
        }
        else
        {
            WriteText(survey, box.Session.BoardSeconds);
        }

        return survey.F0 is null ? ExitCode.NotTrustworthy : ExitCode.Ok;
    }

    private void WriteText(SurveyResult survey, double boardSeconds)
    {
        if (survey.Responses.Count == 0)
        {
            shell.Out.MarkupLine("Nothing stands out. Check that loop and pickup are connected and near the coil, and widen the range.");
            return;
        }

        Table table = new Table().Border(TableBorder.Simple).AddColumns("frequency kHz", "amplitude", "1/5 against 1/2", "what it is");
        table.Columns[0].RightAligned();
        table.Columns[1].RightAligned();
        table.Columns[2].RightAligned();
        foreach (Response response in survey.Responses)
        {
            table.AddRow(
                $"{response.FrequencyHz / 1000:0.00}", $"{response.Amplitude:0}",
                double.IsFinite(response.DutyRatio) ? $"{response.DutyRatio:0.000}" : "-", ResponseWords.Of(response));
        }

        shell.Out.Write(table);
        shell.Out.MarkupLine($"[dim]{survey.Points.Count} settings, {boardSeconds:0.0} s of board time. A real response reads .588 in the third column, a ghost of the third .951, of the fifth 0.[/]");
    }

    private static void WriteJson(System.Text.Json.Utf8JsonWriter json, SurveyResult survey)
    {
        json.WriteNumber("schema_version", 1);
        json.WriteNumber("settings", survey.Points.Count);
        json.Objects("responses", survey.Responses, response =>
        {
            json.WriteString("kind", response.Kind.ToString().ToLowerInvariant());
            json.Figure("drive_hz", response.FrequencyHz);
            json.Figure("amplitude_counts", response.Amplitude);
            json.WriteNumber("harmonic", response.Harmonic);
            json.Figure("duty_ratio", response.DutyRatio);
            json.Figure("duty_ratio_standard", response.DutyRatioUncertainty);
        });
    }
}
