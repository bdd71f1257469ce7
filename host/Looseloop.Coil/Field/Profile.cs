namespace Looseloop.Coil;

/// <summary>A line in the half-plane (r, z) that, turned about the axis, makes a conductor's surface; cut into bands on demand.</summary>
internal sealed class Profile
{
    private readonly Func<double, (double R, double Z)> _at;
    private readonly Func<double, double> _grade;

    private Profile(double lengthM, bool closed, Func<double, (double R, double Z)> at, Func<double, double> grade)
    {
        LengthM = lengthM;
        Closed = closed;
        _at = at;
        _grade = grade;
    }

    public double LengthM { get; }

    public bool Closed { get; }

    /// <summary>An upright line: a winding.</summary>
    public static Profile Upright(double radiusM, double fromM, double lengthM, bool endRefined) =>
        new(lengthM, false, s => (radiusM, fromM + s), endRefined ? TwoEnds : Even);

    /// <summary>A circle away from the axis: a toroid.</summary>
    public static Profile Circle(double centreM, double heightM, double radiusM) =>
        new(2 * Math.PI * radiusM, true, s => (centreM + (radiusM * Math.Cos(s / radiusM)), heightM + (radiusM * Math.Sin(s / radiusM))), Even);

    /// <summary>A half circle about the axis: a sphere.</summary>
    public static Profile HalfCircle(double heightM, double radiusM) =>
        new(Math.PI * radiusM, false, s => (radiusM * Math.Sin(s / radiusM), heightM - (radiusM * Math.Cos(s / radiusM))), Even);

    /// <summary>A line from the axis outwards: a disc; bands narrow towards the rim, where the charge crowds.</summary>
    public static Profile Flat(double heightM, double radiusM) =>
        new(radiusM, false, s => (s, heightM), u => Math.Sin(u * Math.PI / 2));

    /// <summary>Where the bands' edges lie along the line, metres; count + 1 of them.</summary>
    public double[] Edges(int count)
    {
        double[] edges = new double[count + 1];
        for (int i = 0; i <= count; i++)
        {
            edges[i] = LengthM * _grade((double)i / count);
        }

        return edges;
    }

    /// <summary>Cuts the line into bands, in order.</summary>
    public Band[] Cut(int count, int surface)
    {
        double[] edges = Edges(count);
        var bands = new Band[count];
        for (int i = 0; i < count; i++)
        {
            double middle = 0.5 * (edges[i] + edges[i + 1]);
            (double r, double z) = _at(middle);
            bands[i] = new Band(r, z, edges[i + 1] - edges[i], middle, surface, Closed ? LengthM : 0);
        }

        return bands;
    }

    private static double Even(double u) => u;

    // Charge grows as the inverse root of the distance from an open end; this grading spreads it evenly over the bands.
    private static double TwoEnds(double u) => Math.Sin(u * Math.PI / 2) * Math.Sin(u * Math.PI / 2);
}
