namespace Looseloop.Terminal;

/// <summary>The product's cautions about what the box may be used on.</summary>
internal static class BoxCautions
{
    public static readonly IReadOnlyList<string> All =
    [
        "For a coil that is not energised: driver off, locked out, tank capacitors discharged and shorted, earth on.",
        "A resonant coil can kill, burn, and upset pacemakers and electronics; the field reaches beyond the arcs. Local rules, the venue's licence and a competent person come first.",
        "A sweep box is no proof that a coil is dead.",
    ];
}
