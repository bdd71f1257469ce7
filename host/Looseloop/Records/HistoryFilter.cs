using System.CommandLine;
using System.Globalization;
using Looseloop.Record;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>The options that narrow a look into the record.</summary>
internal sealed class HistoryFilter
{
    private readonly Option<string?> _coil = new("--coil") { Description = "This coil only.", HelpName = "NAME" };
    private readonly Option<string?> _note = new("--note") { Description = "Notes that contain this.", HelpName = "TEXT" };
    private readonly Option<string?> _since = new("--since") { Description = "Not before this day or time (2026-03-01, 2026-03-01T14:00).", HelpName = "TIME" };
    private readonly Option<string?> _until = new("--until") { Description = "Not after this day or time.", HelpName = "TIME" };

    public void AddTo(Command command)
    {
        command.Options.Add(_coil);
        command.Options.Add(_note);
        command.Options.Add(_since);
        command.Options.Add(_until);
    }

    /// <summary>The query they make.</summary>
    public HistoryQuery Query(Shell shell, ParseResult parsed, int limit) => new()
    {
        Limit = limit,
        Coil = parsed.GetValue(_coil),
        Note = parsed.GetValue(_note),
        Since = Time(shell, "--since", parsed.GetValue(_since), endOfDay: false),
        Until = Time(shell, "--until", parsed.GetValue(_until), endOfDay: true),
    };

    private static DateTimeOffset? Time(Shell shell, string name, string? text, bool endOfDay)
    {
        if (text is null)
        {
            return null;
        }

        if (!DateTime.TryParse(text, CultureInfo.InvariantCulture, DateTimeStyles.None, out DateTime local))
        {
            throw new UserError($"{name} wants a day or a time such as 2026-03-01 or 2026-03-01T14:00, not '{text}'.");
        }

        if (endOfDay && local.TimeOfDay == TimeSpan.Zero && !text.Contains(':', StringComparison.Ordinal))
        {
            local = local.AddDays(1).AddTicks(-1);
        }

        return new DateTimeOffset(local, shell.Time.LocalTimeZone.GetUtcOffset(local));
    }
}
