using System.CommandLine;
using Looseloop.Procedures.SetUp;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>setup</c>: what stands with a coil, kept with it and part of every reading.</summary>
internal sealed class SetUpCommand(Shell shell)
{
    private readonly Argument<string> _coil = new("coil") { Description = "The coil's name." };
    private readonly Option<bool> _clear = new("--clear") { Description = "Forget what was stated before." };
    private readonly Dictionary<string, Option<string?>> _fields = new()
    {
        [SetUpFields.TopLoad] = Text("--top-load", "What stands on top, such as 'toroid 300x80'."),
        [SetUpFields.BaseEarth] = Text("--base-earth", "How the base is earthed."),
        [SetUpFields.Primary] = Text("--primary", "absent, open or shorted."),
        [SetUpFields.LoopPlace] = Text("--loop", "Where the loop stands."),
        [SetUpFields.PickupPlace] = Text("--pickup", "Where the pickup stands."),
        [SetUpFields.HostPower] = Text("--host-power", "What the computer runs on: battery or mains."),
    };

    public static Command Create(Shell shell) => new SetUpCommand(shell).Make();

    private Command Make()
    {
        var command = new Command("setup", "Show or state what stands with a coil: top load, earth, primary, loop, pickup, host. An empty text takes a statement back.")
        {
            Arguments = { _coil },
            Options = { _clear, RecordChoice.RecordOption },
        };
        foreach (Option<string?> option in _fields.Values)
        {
            command.Options.Add(option);
        }

        command.SetAction(Run);
        return command;
    }

    private int Run(ParseResult parsed)
    {
        string coil = parsed.GetValue(_coil)!;
        KeyValuePair<string, string>[] stated = [.. _fields
            .Select(field => (field.Key, Text: parsed.GetValue(field.Value)))
            .Where(field => field.Text is not null)
            .Select(field => new KeyValuePair<string, string>(field.Key, field.Text!.Trim()))];
        bool clear = parsed.GetValue(_clear);
        using RecordStore store = RecordChoice.OpenForWriting(shell, parsed);
        var facts = new RecordFacts(store, AppVersion.Text);
        IReadOnlyDictionary<string, string> setUp = facts.SetUpOf(coil);
        if (clear || stated.Length > 0)
        {
            try
            {
                setUp = SetUpFields.With(clear ? new Dictionary<string, string>() : setUp, stated);
            }
            catch (ArgumentException error)
            {
                throw new UserError(error.Message.Split(" (Parameter", 2)[0]);
            }

            facts.Keep(coil, setUp, shell.Time.GetUtcNow());
        }

        Show(parsed, coil, setUp, facts.PullOf(coil, setUp) is not null);
        return ExitCode.Ok;
    }

    private void Show(ParseResult parsed, string coil, IReadOnlyDictionary<string, string> setUp, bool pullKnown)
    {
        IReadOnlyList<string> unstated = SetUpFields.Unstated(setUp);
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteString("coil", coil);
                json.WriteStartObject("set_up");
                foreach (string field in SetUpFields.All.Where(setUp.ContainsKey))
                {
                    json.WriteString(field.Replace(' ', '_'), setUp[field]);
                }

                json.WriteEndObject();
                json.WriteBoolean("pull_known", pullKnown);
                json.Texts("advice", SetUpFields.Advice(setUp));
                json.Texts("cautions", BoxCautions.All);
            }));
            return;
        }

        Grid grid = new Grid().AddColumns(2);
        foreach (string field in SetUpFields.All)
        {
            grid.AddRow(field, setUp.TryGetValue(field, out string? text) ? Markup.Escape(text) : "[dim]not stated[/]");
        }

        grid.AddRow("pull", pullKnown ? "known for this set-up" : "[dim]not known for this set-up: take a standoff[/]");
        shell.Out.Write(grid);
        if (parsed.GetValue(CommonOptions.Quiet))
        {
            return;
        }

        if (unstated.Count > 0)
        {
            shell.Say($"Not stated: {string.Join(", ", unstated)}. What is not stated widens the absolute interval.");
        }

        foreach (string sentence in SetUpFields.Advice(setUp).Concat(BoxCautions.All))
        {
            shell.Say(sentence);
        }
    }

    private static Option<string?> Text(string name, string description) => new(name) { Description = description, HelpName = "TEXT" };
}
