namespace Looseloop.Coil.Tests;

public class CapacitanceTests
{
    private const double PerMetre = 4 * Math.PI * PhysicalConstants.Epsilon0;

    // Snow, NBS Circular 544 (1954), series evaluated independently.
    [Theory]
    [InlineData(.11, .04, 13.036678587e-12)]
    [InlineData(1, .1, 80.2988286053e-12)]
    public void Torus_series(double ring, double tube, double expectedF) =>
        Assert.Equal(1, ConductorCapacitance.OfTorusF(ring, tube) / expectedF, 1e-9);

    // A thin ring: 4 pi^2 eps0 R / ln(8R/r).
    [Fact]
    public void Thin_torus_tends_to_the_ring()
    {
        double thin = 4 * Math.PI * Math.PI * PhysicalConstants.Epsilon0 / Math.Log(8 / 1e-5);
        Assert.Equal(1, ConductorCapacitance.OfTorusF(1, 1e-5) / thin, 1e-8);
    }

    [Fact]
    public void Bands_find_the_torus()
    {
        double exact = ConductorCapacitance.OfTorusF(.11, .04);
        double error64 = (ConductorCapacitance.OfBodyF(new Toroid(.3, .08, 0), 64) / exact) - 1;
        double error128 = (ConductorCapacitance.OfBodyF(new Toroid(.3, .08, 0), 128) / exact) - 1;
        Assert.InRange(error64, 1e-6, 8e-5);
        // Second order: half the width, a quarter of the error.
        Assert.InRange(error64 / error128, 3.5, 4.5);
    }

    // Exact: sphere 4 pi eps0 a, disc 8 eps0 a (textbook).
    [Fact]
    public void Bands_find_sphere_and_disc()
    {
        Assert.Equal(1, ConductorCapacitance.OfBodyF(new Sphere(2, 0), 64) / PerMetre, 1.5e-4);
        Assert.Equal(1, ConductorCapacitance.OfBodyF(new Disc(2, 0), 64) / (8 * PhysicalConstants.Epsilon0), 5e-5);
    }

    // Spectral (Chebyshev) solution of the open tube, seven digits. End-refined bands converge as the square of their number, so one
    // step of Richardson's extrapolation reaches them.
    [Theory]
    [InlineData(2, 1.1503825)]
    [InlineData(8.7272727272727, 2.2953719)]
    public void Open_tube(double lengthOverRadius, double expected)
    {
        double Ratio(int bands, bool refined) => ConductorCapacitance.OfOpenTubeF(1, lengthOverRadius, bands, refined) / PerMetre;
        double coarse = Ratio(400, true);
        double fine = Ratio(800, true);
        Assert.Equal(expected, fine + ((fine - coarse) / 3), 1e-7);
        Assert.InRange(Math.Abs(Ratio(400, false) - expected) / Math.Abs(Ratio(800, false) - expected), 1.8, 2.2);
        Assert.InRange(Math.Abs(coarse - expected) / Math.Abs(fine - expected), 3, 5);
    }
}
