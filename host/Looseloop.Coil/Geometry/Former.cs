namespace Looseloop.Coil;

/// <summary>
/// What a winding is wound on. The expansion of the plastics is from trade tables (ranges); that of cardboard is ruled by moisture,
/// and no figure for it is given.
/// </summary>
/// <param name="Word">Its word in a coil file.</param>
/// <param name="LeastPerKelvin">Linear expansion, 1/K, lower end; NaN where no figure can be given.</param>
/// <param name="MostPerKelvin">The same, upper end.</param>
/// <param name="PullRelative">
/// How much it may lower f0 by its permittivity, relative, at most: PVC tube a few tenths of a per cent to about 2 %; not modelled.
/// </param>
public sealed record Former(string Word, double LeastPerKelvin, double MostPerKelvin, double PullRelative)
{
    /// <summary>Not stated.</summary>
    public static Former Unknown { get; } = new("unknown", double.NaN, double.NaN, 0.02);

    /// <summary>All that a coil file may name.</summary>
    public static IReadOnlyList<Former> All { get; } =
    [
        Unknown,
        new("air", double.NaN, double.NaN, 0),
        new("pvc", 50e-6, 80e-6, 0.02),
        new("pmma", 34e-6, 77e-6, 0.02),
        new("hdpe", 100e-6, 200e-6, 0.02),
        new("cardboard", double.NaN, double.NaN, 0.02),
    ];

    /// <summary>The former of that word, or null.</summary>
    public static Former? Find(string word) => All.FirstOrDefault(f => string.Equals(f.Word, word, StringComparison.Ordinal));

    /// <summary>The middle of the range of linear expansion, 1/K; NaN where unknown.</summary>
    public double PerKelvin => (LeastPerKelvin + MostPerKelvin) / 2;
}
