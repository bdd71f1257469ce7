using System.CommandLine;
using Looseloop.Coil;
using Looseloop.Coils;
using Looseloop.Rendering;
using Looseloop.Terminal;
using Spectre.Console;

namespace Looseloop.Commands;

/// <summary><c>coil list</c>: the user's coils and the examples.</summary>
internal static class CoilListCommand
{
    public static Command Create(Shell shell)
    {
        var command = new Command("list", "List your coils and the examples.");
        command.SetAction(parsed => Run(shell, parsed));
        return command;
    }

    private static int Run(Shell shell, ParseResult parsed)
    {
        var shelf = new CoilShelf(shell);
        IReadOnlyList<string> own = shelf.Names();
        List<Entry> entries = [.. own.Select(n => Look(shelf, n)), .. CoilExamples.Names.Where(n => !own.Contains(n)).Select(n => Look(shelf, n))];
        if (parsed.GetValue(CommonOptions.Json))
        {
            shell.OutText.WriteLine(JsonText.Object(json =>
            {
                json.WriteNumber("schema_version", 1);
                json.WriteString("folder", shelf.Folder);
                json.Objects("coils", entries, e =>
                {
                    json.WriteString("name", e.Name);
                    json.WriteString("place", e.Place);
                    json.WriteBoolean("good", e.Coil is not null);
                    json.WriteNumber("errors", e.Errors);
                });
            }));
            return ExitCode.Ok;
        }

        Table table = new Table().Border(TableBorder.Simple).AddColumns("coil", "winding mm", "turns", "top load", "where");
        foreach (Entry e in entries)
        {
            if (e.Coil is CoilGeometry coil)
            {
                table.AddRow(
                    Markup.Escape(e.Name), CoilText.WindingWords(coil), CoilText.TurnsWords(coil),
                    coil.TopLoads.Count == 0 ? "none" : string.Join(" + ", coil.TopLoads.Select(CoilText.LoadWords)), e.IsExample ? "example" : "own");
            }
            else
            {
                table.AddRow(Markup.Escape(e.Name), "", "", $"[yellow]{e.Errors} errors: looseloop coil check {Markup.Escape(e.Name)}[/]", "own");
            }
        }

        shell.Out.Write(table);
        shell.Out.MarkupLineInterpolated($"[dim]Your own stand in {shelf.Folder}[/]");
        return ExitCode.Ok;
    }

    private static Entry Look(CoilShelf shelf, string name)
    {
        (string text, string place) = shelf.Find(name);
        CoilFileResult result = CoilFile.Parse(text);
        return new Entry(name, place, result.Coil, result.Errors.Count);
    }

    private sealed record Entry(string Name, string Place, CoilGeometry? Coil, int Errors)
    {
        public bool IsExample => Place == "example";
    }
}
