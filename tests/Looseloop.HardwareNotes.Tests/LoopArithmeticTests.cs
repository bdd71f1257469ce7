using Looseloop.Coil;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>The formulas behind the tables, against printed values.</summary>
public sealed class LoopArithmeticTests
{
    /// <summary>
    /// Radii 25 and 20 cm, 10 cm apart: 248.79 cm in Rosa and Grover, Bulletin of the Bureau of Standards 8 (1912), from
    /// memory; 248.787359 nH recomputed with 30 digits. Equal rings of 25 cm, 1 cm apart: 1.03666485 uH, recomputed.
    /// </summary>
    [Theory]
    [InlineData(0.25, 0.20, 0.10, 248.787359042e-9)]
    [InlineData(0.25, 0.25, 0.01, 1.03666484928e-6)]
    public void Mutual_inductance_of_two_rings(double a, double b, double d, double expected) =>
        Assert.Equal(1, LoopArithmetic.MutualH(a, b, d) / expected, 1e-9);

    /// <summary>K and E at m = 0.5 (DLMF 19.6 and 19.8, Gauss): 1.8540746773013719184, 1.3506438810476755025.</summary>
    [Fact]
    public void Elliptic_integrals()
    {
        (double k, double e) = LoopArithmetic.Elliptic(Math.Sqrt(0.5));
        Assert.Equal(1.8540746773013719184, k, 1e-14);
        Assert.Equal(1.3506438810476755025, e, 1e-14);
    }

    /// <summary>
    /// Nagaoka's coefficient at diameter = length is 0.688422607320 (NBS table 0.6884, from memory), so a coil of 110 mm
    /// by 480 mm and 1000 turns has 22.6220730 mH as a sheet.
    /// </summary>
    [Fact]
    public void Inductance_of_a_sheet()
    {
        double nagaoka = LoopArithmetic.SheetH(0.5, 1, 1) / (LoopArithmetic.Mu0 * Math.PI * 0.25);
        Assert.Equal(0.688422607320, nagaoka, 1e-11);
        Assert.Equal(22.6220730426e-3, LoopArithmetic.SheetH(0.055, 0.480, 1000), 1e-11);
    }

    /// <summary>
    /// Far away a ring and a coil are two magnets on one axis: M = mu0 pi a^2 b^2 N / (2 d^3) (Biot and Savart). At fifty
    /// radii the next term is below 1 %.
    /// </summary>
    [Fact]
    public void Ring_and_coil_far_apart()
    {
        double expected = LoopArithmetic.Mu0 * Math.PI * 0.01 * 0.0025 * 100 / (2 * Math.Pow(5.0, 3));
        Assert.InRange(LoopArithmetic.RingToCoilH(0.1, 5.0 - 0.005, 0.05, 0.01, 100) / expected, 0.99, 1.01);
    }

    /// <summary>The project's own coil model has the same formulas in other words.</summary>
    [Fact]
    public void The_coil_model_agrees()
    {
        Assert.Equal(1, LoopArithmetic.MutualH(0.1, 0.055, 0.15) / Loops.MutualH(0.1, 0.055, 0.15), 1e-9);
        Assert.Equal(1, LoopArithmetic.RingH(0.1, 0.45e-3) / Loops.SelfH(0.1, 0.45e-3, insideShare: 0), 1e-9);
        Assert.Equal(1, LoopArithmetic.SheetH(0.055, 0.480, 1000) / CurrentSheet.InductanceH(0.11, 0.480, 1000), 1e-9);
    }

    /// <summary>The voltage that the page on the antenna starts from is the one that the loop gives at k = 0.005 and Q = 200.</summary>
    [Fact]
    public void The_antenna_starts_from_what_the_loop_gives()
    {
        double coilH = LoopArithmetic.SheetH(0.055, 0.480, 1000);
        double mutualH = 0.005 * Math.Sqrt(LoopArithmetic.RingH(0.1, 0.45e-3) * coilH);
        double topV = 200 * 2 * Math.PI * 268e3 * mutualH * LoopTables.CurrentA;
        Assert.Equal(AntennaTable.TopV, topV, 0.15);
    }
}
