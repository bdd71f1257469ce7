using System.CommandLine;
using System.Globalization;
using Looseloop.Coil;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>The coil a command works on: its name or file, and dimensions changed for this once.</summary>
internal sealed class CoilArgument(Shell shell, bool required)
{
    public Argument<string?> Coil { get; } = new("COIL")
    {
        Description = "A coil's name, a coil file, or an example (foyer, classroom, stage).",
        Arity = required ? ArgumentArity.ExactlyOne : ArgumentArity.ZeroOrOne,
    };

    public Option<string[]> Set { get; } = new("--set")
    {
        Description = "Change a dimension for this once, such as top_load.height_mm=80; may be repeated.",
        HelpName = "KEY=VALUE",
        DefaultValueFactory = _ => [],
    };

    public void AddTo(Command command)
    {
        command.Arguments.Add(Coil);
        command.Options.Add(Set);
    }

    /// <summary>The coil, or null where none was named.</summary>
    public CoilGeometry? Load(ParseResult parsed)
    {
        if (parsed.GetValue(Coil) is not string name)
        {
            return null;
        }

        CoilGeometry coil = new CoilShelf(shell).Load(name);
        return Changed(coil, parsed.GetValue(Set) ?? []);
    }

    /// <summary>A coil with dimensions changed as --set says.</summary>
    public static CoilGeometry Changed(CoilGeometry coil, IEnumerable<string> assignments)
    {
        foreach (string assignment in assignments)
        {
            coil = Changed(coil, assignment);
        }

        IReadOnlyList<GeometryProblem> problems = GeometryCheck.Problems(coil);
        return problems.Count == 0 ? coil : throw new UserError(
            $"With --set the coil cannot be built:{string.Concat(problems.Select(p => $"\n  {p.Path}: {p.Text}"))}");
    }

    /// <summary>A dimension by its path.</summary>
    /// <exception cref="UserError">The coil has none of that name.</exception>
    public static Dimension DimensionOf(CoilGeometry coil, string path) => Dimension.Find(coil, path) ?? throw new UserError(
        $"The coil {coil.Name} has no dimension '{path}'. It has: {string.Join(", ", Dimension.Of(coil).Concat(Dimension.OfPrimary(coil)).Select(d => d.Path))}.");

    private static CoilGeometry Changed(CoilGeometry coil, string assignment)
    {
        string[] parts = assignment.Split('=', 2);
        return parts.Length == 2 && double.TryParse(parts[1], NumberStyles.Float, CultureInfo.InvariantCulture, out double value)
            ? DimensionOf(coil, parts[0].Trim()).With(value)
            : throw new UserError($"--set wants KEY=VALUE with a number, such as turns=900, not '{assignment}'.");
    }
}
