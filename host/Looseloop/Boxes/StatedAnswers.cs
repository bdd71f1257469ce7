using System.Globalization;
using Looseloop.Terminal;

namespace Looseloop.Boxes;

/// <summary>Instrument readings that were given on the command line, to be used in turn.</summary>
internal sealed class StatedAnswers
{
    private readonly Queue<double> _answers;

    /// <param name="option">The option's name, for its error.</param>
    /// <param name="text">Numbers with commas between them, or null.</param>
    /// <param name="wanted">How many there must be, if any.</param>
    /// <param name="read">Reads one number.</param>
    public StatedAnswers(string option, string? text, int wanted, TryRead read)
    {
        var values = new List<double>();
        foreach (string part in (text ?? "").Split(',', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries))
        {
            values.Add(read(part, out double value) ? value : throw new UserError($"{option} wants numbers with commas between them, not '{part}'."));
        }

        if (text is not null && values.Count != wanted)
        {
            throw new UserError($"{option} wants {wanted} readings, not {values.Count}.");
        }

        _answers = new Queue<double>(values);
    }

    public delegate bool TryRead(string text, out double value);

    /// <summary>True if any were given.</summary>
    public bool Any => _answers.Count > 0;

    /// <summary>The next one, or null.</summary>
    public double? Next() => _answers.TryDequeue(out double answer) ? answer : null;

    /// <summary>A plain number above 0.</summary>
    public static bool Number(string text, out double value) =>
        double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out value) && double.IsFinite(value) && value > 0;
}
