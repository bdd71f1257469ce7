using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Records;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>A frequency (and Q) that a command works with, and where it came from.</summary>
/// <param name="F0Hz">Hertz.</param>
/// <param name="RepeatabilityHz">Standard uncertainty between readings, hertz; NaN where unknown.</param>
/// <param name="AbsoluteHz">Absolute standard uncertainty, hertz; NaN where unknown.</param>
/// <param name="Q">Quality factor; NaN where unknown.</param>
/// <param name="From">In words.</param>
/// <param name="Verdict">Sound for a figure the user gave.</param>
/// <param name="SetUp">What stood with the coil; empty where unknown.</param>
internal sealed record FrequencySource(
    double F0Hz, double RepeatabilityHz, double AbsoluteHz, double Q, string From, Verdict Verdict, IReadOnlyDictionary<string, string> SetUp)
{
    private static readonly Dictionary<string, string> _nothing = [];

    /// <summary>Whether the reading was of the primary tank and not of the secondary.</summary>
    public bool IsOfPrimary => SetUp.TryGetValue("of", out string? of) && of == "primary";

    /// <summary>Says on the error stream that the reading was taken with the primary otherwise than this use of it wants.</summary>
    public void WarnOfPrimary(Shell shell, params string[] wanted)
    {
        if (SetUp.TryGetValue("primary", out string? stood) && !wanted.Contains(stood))
        {
            shell.Say($"{From} was taken with the primary {stood}, not {string.Join(" or ", wanted)}: check that it is the reading you mean.");
        }
    }

    /// <summary>A figure given by hand.</summary>
    public static FrequencySource Given(double hertz) =>
        new(hertz, double.NaN, double.NaN, double.NaN, "as given", Verdict.Sound, _nothing);

    /// <summary>
    /// From words: a frequency with its unit (250k, 253.2kHz), else a reading in the record: its number, last, previous, or a note.
    /// </summary>
    public static FrequencySource Of(Shell shell, ParseResult parsed, string words)
    {
        bool hasUnit = words.Length > 0 && char.IsAsciiLetter(words[^1]) && char.IsAsciiDigit(words[0]);
        if ((hasUnit || words.Contains('.', StringComparison.Ordinal)) && Quantity.TryHertz(words, out double hertz))
        {
            return Given(hertz);
        }

        return FromRecord(RecordChoice.PathOf(shell, parsed), words);
    }

    /// <summary>Says on the error stream that a doubtful reading is one.</summary>
    public int Warn(Shell shell)
    {
        if (Verdict == Verdict.Sound)
        {
            return ExitCode.Ok;
        }

        shell.Say($"The verdict on {From} is {Verdict.ToString().ToLowerInvariant()}: do not build on these figures before it is read again.");
        return ExitCode.NotTrustworthy;
    }

    private static FrequencySource FromRecord(string path, string words)
    {
        try
        {
            using RecordReader reader = RecordReader.Open(path);
            long number = reader.Find(words);
            ReadingSummary figures = reader.Figures(number);
            if (!double.IsFinite(figures.F0Hz))
            {
                throw new UserError($"Reading {number} has no f0 (verdict none): read again.", ExitCode.NotTrustworthy);
            }

            string coil = figures.Coil is null ? "" : $" of {figures.Coil}";
            return new FrequencySource(
                figures.F0Hz, figures.F0RepeatabilityHz, figures.F0AbsoluteHz, figures.Q,
                FormattableString.Invariant($"reading {number}{coil}, {figures.Utc:yyyy-MM-dd HH:mm} UTC"), figures.Verdict, reader.Reading(number).SetUp);
        }
        catch (RecordException error)
        {
            string hint = error.Problem == RecordProblem.NotFound ? " A frequency is written with its unit, such as 250k." : "";
            throw new UserError(error.Message + hint, error.Problem == RecordProblem.NotFound ? ExitCode.Usage : ExitCode.Failure);
        }
    }
}
