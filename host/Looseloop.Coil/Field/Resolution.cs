namespace Looseloop.Coil;

/// <summary>How finely the field model cuts the conductors.</summary>
/// <param name="WindingBands">Bands of the winding, 4 .. 4000.</param>
/// <param name="LoadBands">Bands of each body of the top load, 4 .. 1000.</param>
/// <param name="EndRefined">
/// Bands narrow towards both ends of the winding, where the charge crowds: the error then falls as the square of their number, and
/// not as its first power.
/// </param>
public sealed record Resolution(int WindingBands, int LoadBands, bool EndRefined)
{
    /// <summary>For a stated figure.</summary>
    public static Resolution Fine { get; } = new(160, 64, true);

    /// <summary>For differences and searches, where many solutions are wanted.</summary>
    public static Resolution Quick { get; } = new(48, 24, true);

    /// <summary>Bands of an earthed disc below the coil.</summary>
    internal int GroundBands => Math.Max(16, WindingBands / 4);
}
