using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>The settings that the box holds for its next sweep.</summary>
internal sealed class HeldPlan(BoxExchange exchange)
{
    private IReadOnlyList<Setting> _planned = [];

    /// <summary>Makes the box hold these; says nothing where it does already.</summary>
    public void Set(IReadOnlyList<Setting> settings)
    {
        if (_planned.SequenceEqual(settings))
        {
            return;
        }

        _planned = [];
        exchange.Ask<PlannedAnswer>(Verb.Plan);
        int planned = 0;
        foreach (PlanLines.Line line in PlanLines.For(settings))
        {
            planned = exchange.Ask<PlannedAnswer>(line.Verb, line.Fields).Settings;
        }

        if (planned != settings.Count)
        {
            throw new BoxException(BoxTrouble.Restarted, $"The box holds {planned} settings of {settings.Count}: it lost part of its plan. Try again.");
        }

        _planned = [.. settings];
    }

    /// <summary>The box has said that it holds none.</summary>
    public void Forget() => _planned = [];

    /// <summary>Settings in parts that a box can hold and sweep at once.</summary>
    /// <param name="settings">All of them.</param>
    /// <param name="mostPoints">The most of one sweep.</param>
    public static IEnumerable<IReadOnlyList<Setting>> Parts(IReadOnlyList<Setting> settings, int mostPoints)
    {
        var part = new List<Setting>();
        foreach (Setting setting in settings)
        {
            // A plan entry for each is the worst case; runs only take fewer.
            if (part.Count == mostPoints || (part.Count >= WireLimits.PlanEntries && PlanLines.For([.. part, setting]).Sum(line => line.Entries) > WireLimits.PlanEntries))
            {
                yield return part;
                part = [];
            }

            part.Add(setting);
        }

        if (part.Count > 0)
        {
            yield return part;
        }
    }
}
