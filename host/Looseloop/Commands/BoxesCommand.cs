using System.CommandLine;
using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>boxes</c>: which ports could be a box, and which of them answer.</summary>
internal static class BoxesCommand
{
    private static readonly TimeSpan _patience = TimeSpan.FromSeconds(2);

    public static Command Create(Shell shell)
    {
        var command = new Command("boxes", "List the ports that could be a sweep box, and ask each what it is.");
        command.SetAction(parsed => Run(shell, parsed));
        return command;
    }

    private static int Run(Shell shell, ParseResult parsed)
    {
        IReadOnlyList<PortCandidate> ports = PortList.Find();
        var rows = ports.Select(port => (Port: port.Name, Found: Ask(port.Name, shell.Cancel))).ToList();
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json => json.Objects("ports", rows, row =>
            {
                json.WriteString("port", row.Port);
                json.WriteString("board", row.Found.Identity?.Board);
                json.WriteString("firmware", row.Found.Identity?.FirmwareVersion);
                json.WriteString("trouble", row.Found.Trouble);
            })));
        }
        else if (rows.Count == 0)
        {
            shell.Out.WriteLine("No port that could be a box was found. Plug one in, or try the virtual bench: --box bench.");
        }
        else
        {
            Table table = new Table().Border(TableBorder.Simple).AddColumns("port", "board", "firmware", "");
            foreach ((string port, Answer found) in rows)
            {
                table.AddRow(Markup.Escape(port), Markup.Escape(found.Identity?.Board ?? "-"), found.Identity?.FirmwareVersion ?? "-", Markup.Escape(found.Trouble ?? ""));
            }

            shell.Out.Write(table);
        }

        return rows.Any(row => row.Found.Identity is not null) ? ExitCode.Ok : ExitCode.NoBox;
    }

    private static Answer Ask(string port, CancellationToken cancel)
    {
        try
        {
            using BoxSession session = BoxSession.Open(SerialLink.Open(port), _patience, cancel);
            return new Answer(session.Identity, null);
        }
        catch (Exception error) when (error is LinkOpenException or LinkLostException or BoxException)
        {
            return new Answer(null, error.Message);
        }
    }

    private sealed record Answer(Readings.BoxIdentity? Identity, string? Trouble);
}
