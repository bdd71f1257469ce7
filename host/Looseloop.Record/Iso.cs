using System.Globalization;

namespace Looseloop.Record;

/// <summary>Times in UTC by ISO 8601, to the microsecond.</summary>
internal static class Iso
{
    public static string Text(DateTimeOffset time) => time.UtcDateTime.ToString("yyyy-MM-dd'T'HH:mm:ss.ffffff'Z'", CultureInfo.InvariantCulture);
}
