namespace Looseloop.Coil.Tests;

public class InductanceTests
{
    // 30-digit evaluation of Lorenz' and Nagaoka's forms; they round to the four digits of the NBS table (.6884 for D/l = 1).
    [Theory]
    [InlineData(.05, .979091743341)]
    [InlineData(.1, .958807124204)]
    [InlineData(.2, .920092670828)]
    [InlineData(.25, .901649329977)]
    [InlineData(.3, .883802908729)]
    [InlineData(.4, .849853434903)]
    [InlineData(.5, .818135751935)]
    [InlineData(.6, .788524632179)]
    [InlineData(.8, .735079063465)]
    [InlineData(1, .688422607320)]
    [InlineData(1.5, .595045884714)]
    [InlineData(2, .525510024252)]
    [InlineData(3, .429198617034)]
    [InlineData(4, .365431897400)]
    [InlineData(5, .319825467782)]
    [InlineData(10, .203323517522)]
    [InlineData(20, .123614809705)]
    [InlineData(100, .034960245774)]
    public void Nagaoka_to_twelve_digits(double ratio, double expected) =>
        Assert.Equal(expected, CurrentSheet.NagaokaCoefficient(ratio), 1e-12);

    [Fact]
    public void Nagaoka_passes_smoothly_into_its_series_for_a_ring()
    {
        // The two branches must agree where they meet (Rayleigh and Niven's series against the elliptic form).
        double below = CurrentSheet.NagaokaCoefficient(1999.9999);
        double above = CurrentSheet.NagaokaCoefficient(2000.0001);
        Assert.Equal(1, above / below, 2e-7);
    }

    // mu0 = 4 pi e-7; Nagaoka's and Lorenz' forms agree.
    [Fact]
    public void Sheet_of_the_sample_coil() =>
        Assert.Equal(1, CurrentSheet.InductanceH(.11, .48, 1000) / 22.6220730426e-3, 1e-11);

    // Lundin, Proc. IEEE 73 (1985) 1428, evaluated independently.
    [Fact]
    public void Lundin_of_the_sample_coil() =>
        Assert.Equal(1, HandbookFormulas.LundinH(.11, .48, 1000) / 22.6220291246e-3, 1e-10);

    // Wheeler, Proc. IRE 16 (1928) 1398, evaluated independently.
    [Fact]
    public void Wheeler_of_the_sample_coil() =>
        Assert.Equal(1, HandbookFormulas.Wheeler1928H(.11, .48, 1000) / 22.4918769e-3, 1e-8);

    [Fact]
    public void Lundin_stays_within_3e_6_of_the_exact_sheet()
    {
        double worst = 0;
        for (double x = Math.Log(.01); x <= Math.Log(100); x += .01)
        {
            double length = Math.Exp(x);
            worst = Math.Max(worst, Math.Abs((HandbookFormulas.LundinH(1, length, 10) / CurrentSheet.InductanceH(1, length, 10)) - 1));
        }

        // Lundin's stated accuracy is 3e-6; the largest error over this range is 2.5e-6.
        Assert.InRange(worst, 1e-6, 3e-6);
    }

    // Errors of Wheeler's 1928 formula against the sheet in per cent, by the exact form.
    [Theory]
    [InlineData(.3, -1.57)]
    [InlineData(.4, -.54)]
    [InlineData(.5, -.12)]
    [InlineData(.8, .02)]
    [InlineData(1, -.10)]
    [InlineData(2, -.50)]
    [InlineData(4, -.58)]
    [InlineData(5, -.56)]
    [InlineData(10, -.47)]
    [InlineData(50, -.32)]
    public void Wheeler_1928_errs_as_published(double lengthOverDiameter, double percent) =>
        Assert.Equal(percent, 100 * ((HandbookFormulas.Wheeler1928H(1, lengthOverDiameter, 10) / CurrentSheet.InductanceH(1, lengthOverDiameter, 10)) - 1), .006);

    [Fact]
    public void The_continuous_Wheeler_form_stays_within_2_2e_5()
    {
        double worst = 0;
        for (double x = Math.Log(.01); x <= Math.Log(100); x += .02)
        {
            double length = Math.Exp(x);
            worst = Math.Max(worst, Math.Abs((HandbookFormulas.WheelerContinuousH(1, length, 10) / CurrentSheet.InductanceH(1, length, 10)) - 1));
        }

        Assert.InRange(worst, 1e-6, 2.3e-5);
    }

    // Rosa, Bull. Bureau of Standards 2 (1906) 161, for .40 mm wire at .48 mm pitch. The check value takes Bm in its limit of many
    // turns; with the terms in 1/N of a thousand turns the reduction is .2 % smaller.
    [Fact]
    public void Rosa_reduction_of_the_sample_coil()
    {
        double perTerm = PhysicalConstants.Mu0 * .055 * 1000;
        Assert.Equal(49.2381, perTerm * (RoundWireCorrection.SelfTerm(.40 / .48) + RoundWireCorrection.MutualTerm(1e12)) * 1e6, 1e-4);
        double smaller = perTerm * ((Math.Log(1000) / 6000) + .00033084236) * 1e6;
        Assert.Equal(49.2381 - smaller, RoundWireCorrection.ReductionH(.055, 1000, .40e-3, .48e-3) * 1e6, 1e-4);
    }

    [Fact]
    public void Rosa_terms_have_their_limits()
    {
        Assert.Equal(.556852819440, RoundWireCorrection.SelfTerm(1), 1e-12);
        Assert.Equal(.337877066409, RoundWireCorrection.MutualTerm(1e12), 1e-10);
    }

    // Sum over turns against sheet and correction: direct sums of 10, 50, 200 filaments gave .64104, .69306, .70686 for As + Bm
    // where the formula says .64094, .69275, .70634 (wire of .833 of the pitch).
    [Theory]
    [InlineData(10)]
    [InlineData(50)]
    [InlineData(200)]
    public void Turn_by_turn_agrees_with_sheet_less_correction(int turns)
    {
        double sheet = CurrentSheet.InductanceH(.11, turns * .48e-3, turns);
        double formula = sheet - RoundWireCorrection.ReductionH(.055, turns, .40e-3, .48e-3);
        double sum = FilamentCoil.InductanceH(.11, .48e-3, turns, .40e-3);
        Assert.Equal(1, sum / formula, 1e-4);
    }

    [Theory]
    // Rosa and Grover, Bull. Bureau of Standards 8 (1912) 1, print 248.79 cm for the first; the digits are a 30-digit evaluation.
    [InlineData(.25, .20, .10, .248787359042e-6, 1e-12)]
    [InlineData(.25, .25, .01, 1.03666484928e-6, 1e-11)]
    [InlineData(.25, .25, .10, .337684718e-6, 2e-9)]
    [InlineData(.25, .25, .25, .123519616e-6, 5e-9)]
    [InlineData(.25, .20, 0, .451731389e-6, 2e-9)]
    public void Maxwells_loops(double a, double b, double d, double expectedH, double tolerance)
    {
        Assert.Equal(1, Loops.MutualH(a, b, d) / expectedH, tolerance);
        Assert.Equal(1, Loops.MutualH(b, a, -d) / expectedH, tolerance);
    }

    // DLMF 19.8; K(m = .5) = 1.8540746773013719184, E = 1.3506438810476755025.
    [Fact]
    public void Elliptic_integrals_at_one_half()
    {
        (double k, double e, double d) = EllipticIntegrals.Complete(.5);
        Assert.Equal(1.8540746773013719184, k, 1e-15);
        Assert.Equal(1.3506438810476755025, e, 1e-15);
        Assert.Equal((k - e) / .5, d, 1e-14);
    }

    // Far apart two loops are dipoles: M -> mu0 pi a^2 b^2 / (2 d^3). A form with K and E cancels there.
    [Fact]
    public void Distant_loops_are_dipoles()
    {
        double dipole = PhysicalConstants.Mu0 * Math.PI * .01 * .0225 / (2 * 1e9);
        Assert.Equal(1, Loops.MutualH(.1, .15, 1000) / dipole, 1e-7);
    }

    // Sum of the eight loops' own and mutual inductances; Wheeler's spiral formula reads 3.9 % more.
    [Fact]
    public void Spiral_of_eight_turns()
    {
        double l = new PrimaryCoil(SampleCoil.Spiral).InductanceH(8);
        Assert.Equal(1, l / 23.721856e-6, 1e-6);
        Assert.Equal(24.639e-6, HandbookFormulas.WheelerSpiralH(.148, .096, 8), 5e-9);
    }

    [Fact]
    public void Spiral_to_the_sample_secondary()
    {
        var primary = new PrimaryCoil(SampleCoil.Spiral);
        Assert.Equal(95.032e-6, primary.MutualH(SampleCoil.Bare, 8), 1e-9);
        // The published k takes the sheet's inductance.
        Assert.Equal(.1297, primary.CouplingTo(SampleCoil.Bare, 8, 22.6220730426e-3), 5e-5);
    }

    [Fact]
    public void Part_of_a_turn_grows_from_nothing_to_the_whole_turn()
    {
        var primary = new PrimaryCoil(SampleCoil.Spiral);
        double before = 0;
        for (double n = .05; n <= 8; n += .05)
        {
            double l = primary.InductanceH(n);
            Assert.True(l > before, $"not rising at {n}");
            before = l;
        }

        Assert.Equal(1, primary.InductanceH(3.0000001) / primary.InductanceH(3), 1e-6);
    }

    // Neumann's double integral along the true spiral, at whole and at broken turns; the conductor's radius as the distance of its
    // skin from its centre. Loops and interpolation stay within 1 %.
    [Theory]
    [InlineData(3)]
    [InlineData(3.25)]
    [InlineData(3.5)]
    [InlineData(3.75)]
    [InlineData(6.5)]
    public void Broken_turns_follow_the_true_spiral(double turns)
    {
        const double Pitch = .012;
        const double G = .003;
        int n = (int)(turns * 240);
        double step = 2 * Math.PI * turns / n;
        var at = new (double X, double Y, double Dx, double Dy)[n];
        for (int i = 0; i < n; i++)
        {
            double angle = (i + .5) * step;
            double r = .1 + (Pitch * angle / (2 * Math.PI));
            double dr = Pitch / (2 * Math.PI);
            at[i] = (r * Math.Cos(angle), r * Math.Sin(angle),
                ((dr * Math.Cos(angle)) - (r * Math.Sin(angle))) * step, ((dr * Math.Sin(angle)) + (r * Math.Cos(angle))) * step);
        }

        double sum = 0;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double x = at[i].X - at[j].X;
                double y = at[i].Y - at[j].Y;
                sum += ((at[i].Dx * at[j].Dx) + (at[i].Dy * at[j].Dy)) / Math.Sqrt((x * x) + (y * y) + (G * G));
            }
        }

        Assert.Equal(1, new PrimaryCoil(SampleCoil.Spiral).InductanceH(turns) / (1e-7 * sum), .01);
    }

    // Half a turn of thin wire: Neumann's integral by brute force, the wire's radius as distance, over that of the whole turn.
    [Fact]
    public void Half_a_turn_by_brute_force()
    {
        const double G = .02;
        double Direct(double arc)
        {
            const int N = 4000;
            double h = arc / N;
            double sum = 0;
            for (int i = 0; i < N; i++)
            {
                double u = (i + .5) * h;
                sum += 2 * (arc - u) * Math.Cos(u) / Math.Sqrt((4 * Math.Pow(Math.Sin(u / 2), 2)) + (G * G)) * h;
            }

            return sum;
        }

        Assert.Equal(1, LoopArc.SelfShare(.5, G) / (Direct(Math.PI) / Direct(2 * Math.PI)), 1e-4);
    }
}
