namespace Looseloop.Procedures.Survey;

/// <summary>
/// Finds what stands out of a survey. A response is a maximum whose prominence (its height over the higher of the two
/// lowest points that part it from anything taller) is beyond the noise and not a trifle against the largest.
/// </summary>
public static class ResponseFinder
{
    private const double SigmasToStandOut = 7;
    private const double SmallestShare = 0.015;

    /// <summary>The maxima, by falling prominence.</summary>
    /// <param name="points">Ascending in frequency.</param>
    /// <param name="most">How many to return at most.</param>
    public static IReadOnlyList<Maximum> Find(IReadOnlyList<SurveyPoint> points, int most)
    {
        double largest = points.Count == 0 ? 0 : points.Max(point => point.Amplitude);
        var found = new List<Maximum>();
        for (int i = 0; i < points.Count; i++)
        {
            if ((i > 0 && points[i - 1].Amplitude >= points[i].Amplitude)
                || (i + 1 < points.Count && points[i + 1].Amplitude > points[i].Amplitude))
            {
                continue;
            }

            // At an edge only the inner side can tell; whether it is a maximum at all is then left to the caller.
            double left = i == 0 ? 0 : Saddle(points, i, -1);
            double right = i == points.Count - 1 ? 0 : Saddle(points, i, 1);
            double prominence = points[i].Amplitude - Math.Max(left, right);
            if (prominence > SigmasToStandOut * points[i].Sigma && prominence > SmallestShare * largest)
            {
                found.Add(new Maximum(i, points[i].FrequencyHz, points[i].Amplitude, prominence, i == 0 || i == points.Count - 1));
            }
        }

        return [.. found.OrderByDescending(maximum => maximum.Prominence).Take(most)];
    }

    /// <summary>The lowest point on the way to something taller; the edge of the survey ends the way.</summary>
    private static double Saddle(IReadOnlyList<SurveyPoint> points, int at, int direction)
    {
        double lowest = points[at].Amplitude;
        for (int i = at + direction; i >= 0 && i < points.Count && points[i].Amplitude <= points[at].Amplitude; i += direction)
        {
            lowest = Math.Min(lowest, points[i].Amplitude);
        }

        return lowest;
    }
}

/// <summary>A maximum of a survey.</summary>
/// <param name="Index">Which point.</param>
/// <param name="FrequencyHz">Its drive frequency.</param>
/// <param name="Amplitude">Its amplitude, counts.</param>
/// <param name="Prominence">Its height over what parts it from anything taller, counts.</param>
/// <param name="AtEdge">True if it is the first or the last point.</param>
public sealed record Maximum(int Index, double FrequencyHz, double Amplitude, double Prominence, bool AtEdge);
