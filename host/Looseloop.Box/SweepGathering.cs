using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>Puts the points of one sweep beside the settings they belong to, and knows which have not come.</summary>
internal sealed class SweepGathering(SweepRequest request, List<RawPoint> points, Action<RawPoint>? told)
{
    private readonly bool[] _seen = new bool[request.Settings.Count * (request.ThereAndBack ? 2 : 1)];

    public void Add(PointAnswer answer)
    {
        if (!Fresh(answer.Index, out Setting setting)
            || setting.DutyBits != answer.DutyBits || setting.Divider != answer.Divider || setting.DutyCount != answer.DutyCount)
        {
            return;
        }

        Take(
            answer.Index,
            new RawPoint(setting, answer.Samples, answer.Sum, answer.SumSquares, answer.Min, answer.Max, answer.TimeUs));
    }

    public void Add(PackAnswer answer)
    {
        int count = answer.Sum.Length;
        for (int i = 0; i < count; i++)
        {
            if (Fresh(answer.Index + i, out Setting setting))
            {
                long time = count > 1 ? answer.FirstUs + ((answer.LastUs - answer.FirstUs) * i / (count - 1)) : answer.FirstUs;
                Take(
                    answer.Index + i,
                    new RawPoint(setting, answer.Samples, answer.Sum[i], null, answer.Min[i], answer.Max[i], time));
            }
        }
    }

    /// <summary>The settings of the points that have not come, in the order of the sweep.</summary>
    public List<Setting> Missing() =>
        [.. Enumerable.Range(0, _seen.Length).Where(index => !_seen[index]).Select(SettingAt)];

    private void Take(int index, RawPoint point)
    {
        _seen[index] = true;
        points.Add(point);
        told?.Invoke(point);
    }

    /// <summary>A duplicate or an index that was never asked for changes nothing.</summary>
    private bool Fresh(int index, out Setting setting)
    {
        bool fresh = index < _seen.Length && !_seen[index];
        setting = fresh ? SettingAt(index) : default;
        return fresh;
    }

    private Setting SettingAt(int index)
    {
        int count = request.Settings.Count;
        return request.Settings[index < count ? index : (2 * count) - 1 - index];
    }
}
