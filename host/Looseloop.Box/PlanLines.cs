using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>Puts a list of settings into as few plan requests as they take.</summary>
internal static class PlanLines
{
    private const int ShortestRun = 4;
    private const int SettingsPerList = 8;

    /// <summary>One request: its verb and its fields, and how many plan entries it takes.</summary>
    internal sealed record Line(string Verb, long[] Fields, int Entries);

    public static List<Line> For(IReadOnlyList<Setting> settings)
    {
        var lines = new List<Line>();
        var single = new List<Setting>();
        int at = 0;
        while (at < settings.Count)
        {
            int run = RunLength(settings, at);
            if (run >= ShortestRun)
            {
                Flush(single, lines);
                Setting first = settings[at];
                lines.Add(new Line(
                    Verb.Run, [first.DutyBits, first.Divider, settings[at + 1].Divider - first.Divider, run, first.DutyCount], 1));
                at += run;
            }
            else
            {
                single.Add(settings[at++]);
                if (single.Count == SettingsPerList)
                {
                    Flush(single, lines);
                }
            }
        }

        Flush(single, lines);
        return lines;
    }

    private static int RunLength(IReadOnlyList<Setting> settings, int at)
    {
        if (at + 1 >= settings.Count)
        {
            return 1;
        }

        Setting first = settings[at];
        int stride = settings[at + 1].Divider - first.Divider;
        int length = 1;
        while (at + length < settings.Count
            && settings[at + length].DutyBits == first.DutyBits
            && settings[at + length].DutyCount == first.DutyCount
            && settings[at + length].Divider == first.Divider + (length * stride))
        {
            length++;
        }

        return length;
    }

    private static void Flush(List<Setting> single, List<Line> lines)
    {
        if (single.Count > 0)
        {
            long[] fields = [.. single.SelectMany(setting => new long[] { setting.DutyBits, setting.Divider, setting.DutyCount })];
            lines.Add(new Line(Verb.List, fields, single.Count));
            single.Clear();
        }
    }
}
