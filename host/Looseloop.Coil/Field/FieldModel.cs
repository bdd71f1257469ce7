namespace Looseloop.Coil;

/// <summary>
/// A coil over its ground in axial symmetry. The winding is cut into bands of charge and of current, the top load and an earthed disc
/// into bands of charge; a ground plane acts by images (Harrington, Field Computation by Moment Methods, 1968). Nodes stand at the
/// edges of the winding's bands: node 0 is the earthed base, the last one is the top and carries the top load.
/// Walls, ceiling and the former's permittivity are not modelled. Memory: 8 (N^2 + n^2) bytes for N bands, n of them on the winding
/// (n = 200 with 64 of a toroid: .9 MB; n = 1000: 17 MB).
/// </summary>
public sealed class FieldModel
{
    private readonly CholeskyFactor _potential;
    private readonly double[] _inductance;
    private readonly int _winding;
    private readonly int _live;
    private readonly int _all;
    private readonly Band[] _bands;

    /// <summary>Sets the model up; the cost is one factoring, N^3/6 multiply-adds.</summary>
    /// <exception cref="ImpossibleGeometryException">The geometry cannot be built, with every reason.</exception>
    public FieldModel(CoilGeometry coil, Resolution resolution)
    {
        GeometryCheck.ThrowIfImpossible(coil);
        Demand.Within(resolution.WindingBands, 4, 4000, nameof(resolution.WindingBands), "");
        Demand.Within(resolution.LoadBands, 4, 1000, nameof(resolution.LoadBands), "");
        Coil = coil;
        Resolution = resolution;
        double floorM = coil.Ground.Kind == GroundKind.Disc ? coil.Ground.AboveFloorM : 0;
        double topM = coil.TopHeightM + floorM;
        var bands = new List<Band>();
        Profile winding = Profile.Upright(
            coil.WindingDiameterM / 2, coil.BaseHeightM + floorM, coil.WindingLengthM, resolution.EndRefined);
        EdgesM = winding.Edges(resolution.WindingBands);
        bands.AddRange(winding.Cut(resolution.WindingBands, 0));
        _winding = bands.Count;
        for (int i = 0; i < coil.TopLoads.Count; i++)
        {
            bands.AddRange(coil.TopLoads[i].Profile.Cut(resolution.LoadBands, i + 1).Select(b => b with { HeightM = b.HeightM + topM }));
        }

        _live = bands.Count;
        if (coil.Ground.Kind == GroundKind.Disc)
        {
            bands.AddRange(Profile.Flat(floorM, coil.Ground.DiameterM / 2).Cut(resolution.GroundBands, -1));
        }

        _bands = [.. bands];
        _all = _bands.Length;
        double[] potential = new double[_all * _all];
        _inductance = new double[_winding * _winding];
        Fill(potential);
        _potential = CholeskyFactor.InPlace(potential, _all)
            ?? throw new ImpossibleGeometryException(
                [new GeometryProblem("top_load", "two conductors lie so close together that their fields cannot be told apart; move them apart")]);
    }

    /// <summary>The coil it was made from.</summary>
    public CoilGeometry Coil { get; }

    /// <summary>How finely.</summary>
    public Resolution Resolution { get; }

    /// <summary>Number of bands of the winding.</summary>
    internal int WindingBands => _winding;

    /// <summary>Where the nodes lie along the winding, metres from its base; node 0 is the base.</summary>
    internal double[] EdgesM { get; }

    /// <summary>Inductance at direct current, henry: all bands carrying the same current.</summary>
    public double DirectInductanceH
    {
        get
        {
            double[] ones = new double[_winding];
            Array.Fill(ones, 1.0);
            double[] flux = new double[_winding];
            MultiplyInductance(ones, flux);
            return flux.Sum();
        }
    }

    /// <summary>Charge on every conductor band for given potentials (winding, top load, earthed disc), coulombs.</summary>
    internal double[] Charges(double[] potentials)
    {
        double[] q = [.. potentials];
        _potential.Solve(q);
        return q;
    }

    /// <summary>All bands.</summary>
    internal IReadOnlyList<Band> Bands => _bands;

    /// <summary>Turns of one band.</summary>
    internal double TurnsOf(int band) => Coil.Turns * _bands[band].WidthM / Coil.WindingLengthM;

    /// <summary>Charge at nodes 1 .. n for voltages at nodes 1 .. n: q = W' C W u, plus a lumped capacitance at the top.</summary>
    internal void MultiplyCapacitance(ReadOnlySpan<double> u, Span<double> q, Span<double> scratch, double addedTopF)
    {
        scratch[0] = 0.5 * u[0];
        for (int i = 1; i < _winding; i++)
        {
            scratch[i] = 0.5 * (u[i - 1] + u[i]);
        }

        scratch[_winding.._live].Fill(u[_winding - 1]);
        scratch[_live.._all].Clear();
        _potential.Solve(scratch);
        for (int i = 0; i < _winding - 1; i++)
        {
            q[i] = 0.5 * (scratch[i] + scratch[i + 1]);
        }

        double top = 0.5 * scratch[_winding - 1];
        for (int i = _winding; i < _live; i++)
        {
            top += scratch[i];
        }

        q[_winding - 1] = top + (addedTopF * u[_winding - 1]);
    }

    /// <summary>Flux of every band for given band currents.</summary>
    internal void MultiplyInductance(ReadOnlySpan<double> current, Span<double> flux)
    {
        for (int i = 0; i < _winding; i++)
        {
            flux[i] = VectorMath.Dot(_inductance.AsSpan(i * _winding, _winding), current);
        }
    }

    /// <summary>How long the arrays of <see cref="MultiplyCapacitance"/> must be.</summary>
    internal int ScratchLength => _all;

    private void Fill(double[] potential)
    {
        bool sheet = Coil.Ground.Kind == GroundKind.Sheet;
        double reduction = RoundWireCorrection.ReductionH(
            Coil.WindingDiameterM / 2, Math.Max(1, Coil.Turns), Coil.WireDiameterM, Coil.PitchM);
        for (int i = 0; i < _all; i++)
        {
            Band a = _bands[i];
            for (int j = 0; j <= i; j++)
            {
                Band b = _bands[j];
                double dz = a.HeightM - b.HeightM;
                double up = a.HeightM + b.HeightM;
                double across = a.RadiusM - b.RadiusM;
                double imageSquare = (across * across) + (up * up);
                if (i >= _winding)
                {
                    double square = Band.EffectiveSquare(a, b);
                    potential[(i * _all) + j] = RingKernel.Potential(a.RadiusM, b.RadiusM, square, dz)
                        - RingKernel.Potential(a.RadiusM, b.RadiusM, imageSquare, up);
                    continue;
                }

                (double p, double m) = RingKernel.OnCylinder(a.RadiusM, i == j ? 0 : Math.Abs(dz), a.WidthM, b.WidthM);
                (double pImage, double mImage) = RingKernel.Both(a.RadiusM, b.RadiusM, imageSquare, up);
                potential[(i * _all) + j] = p - pImage;
                double turns = TurnsOf(i) * TurnsOf(j);
                double mutual = turns * (sheet ? m - mImage : m);
                if (i == j)
                {
                    mutual -= reduction * TurnsOf(i) / Coil.Turns;
                }

                _inductance[(i * _winding) + j] = mutual;
                _inductance[(j * _winding) + i] = mutual;
            }
        }
    }
}
