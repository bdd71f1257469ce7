using System.Numerics;

namespace Looseloop.Bench.Physics;

/// <summary>
/// The magnetically coupled meshes of a world: loop, modes of the coil, neighbours. With currents scaled by the root of
/// each inductance, mesh i reads s sum_j k_ij q_j + (r_i + e_i / s) q_i = v_i, where r = R/L is a rate and e = 1/(L C) the
/// square of an angular frequency, zero for a mesh without a capacitor. Nothing is approximated: reflected impedance,
/// pulled f0 and Q and split responses all come from the roots of its determinant.
/// </summary>
internal sealed class Meshes
{
    private readonly double[,] _k;
    private readonly double[] _rate;
    private readonly double[] _elastance;
    private readonly double[] _sees;
    private readonly int _loop;
    private readonly int _coil;

    private Meshes(int count, int loop, int coil)
    {
        _k = new double[count, count];
        _rate = new double[count];
        _elastance = new double[count];
        _sees = new double[count];
        _loop = loop;
        _coil = coil;
        for (int i = 0; i < count; i++)
        {
            _k[i, i] = 1;
        }
    }

    public int Count => _rate.Length;

    /// <summary>The mesh of the loop, or -1.</summary>
    public int Loop => _loop;

    /// <summary>The mesh of the coil's lowest mode.</summary>
    public int Coil => _coil;

    /// <summary>True if the mesh has a capacitor, so that it resonates.</summary>
    public bool Resonates(int mesh) => _elastance[mesh] > 0;

    public double Rate(int mesh) => _rate[mesh];

    public double Elastance(int mesh) => _elastance[mesh];

    /// <summary>What the pickup makes of the charge (or current) of a mesh.</summary>
    public double Sees(int mesh) => _sees[mesh];

    /// <summary>The meshes of a world as it stands.</summary>
    /// <param name="world">The world.</param>
    /// <param name="f0Scale">Drift: by what the coil's frequencies are multiplied.</param>
    /// <param name="qScale">Drift: by what the coil's quality factors are multiplied.</param>
    public static Meshes Loaded(World world, double f0Scale = 1, double qScale = 1)
    {
        double added = world.Room.PeoplePf + world.Room.CablePf + (world.Pickup.CouplingPf * world.Pickup.PullPfPerPf);
        return Build(world, added, true, f0Scale, qScale);
    }

    /// <summary>The same coil with loop, pickup, box and people away; its neighbours stay.</summary>
    public static Meshes Unloaded(World world, double f0Scale = 1, double qScale = 1) => Build(world, 0, false, f0Scale, qScale);

    /// <summary>
    /// Fills the determinant's matrix at s, the rows of resonating meshes multiplied by s so that no entry has a pole, and
    /// the derivative of that matrix.
    /// </summary>
    public void Fill(Complex s, Complex[,] matrix, Complex[,] derivative)
    {
        for (int i = 0; i < Count; i++)
        {
            bool resonates = Resonates(i);
            for (int j = 0; j < Count; j++)
            {
                double k = _k[i, j];
                matrix[i, j] = resonates ? s * s * k : s * k;
                derivative[i, j] = resonates ? 2 * s * k : k;
            }

            matrix[i, i] += resonates ? (s * _rate[i]) + _elastance[i] : _rate[i];
            derivative[i, i] += resonates ? _rate[i] : 0;
        }
    }

    /// <summary>u^T A'(s) u for the unscaled, symmetric matrix A = s K + r + e/s.</summary>
    public Complex DerivativeForm(Complex s, Complex[] u)
    {
        Complex sum = 0;
        for (int i = 0; i < Count; i++)
        {
            for (int j = 0; j < Count; j++)
            {
                sum += u[i] * _k[i, j] * u[j];
            }

            sum -= u[i] * u[i] * _elastance[i] / (s * s);
        }

        return sum;
    }

    private static Meshes Build(World world, double addedPf, bool withLoop, double f0Scale, double qScale)
    {
        IReadOnlyList<CoilMode> modes = world.Coil.Modes;
        IReadOnlyList<Neighbour> neighbours = world.Room.Neighbours;
        int first = withLoop ? 1 : 0;
        var meshes = new Meshes(first + modes.Count + neighbours.Count, withLoop ? 0 : -1, first);
        double coilHenry = world.Coil.InductanceMh * 1e-3;
        double loopHenry = world.Loop.InductanceUh * 1e-6;
        double omega1 = 2 * Math.PI * modes[0].F0Hz;
        double topFarad = 1 / (omega1 * omega1 * coilHenry);

        // The coil's top voltage is charge / C; the antenna divides it; the loop's current is scaled by the root of its inductance.
        double divider = world.Pickup.CouplingPf / (world.Pickup.CouplingPf + world.Pickup.InputPf);
        double sees = Math.Sqrt(coilHenry / loopHenry) * omega1 * omega1 * divider * world.Pickup.Gain;

        if (withLoop)
        {
            meshes._rate[0] = world.Loop.ResistanceOhm / loopHenry;
        }

        for (int m = 0; m < modes.Count; m++)
        {
            CoilMode mode = modes[m];
            double pull = 1 / Math.Sqrt(1 + (mode.TopShare * addedPf * 1e-12 / topFarad));
            double omega = 2 * Math.PI * mode.F0Hz * f0Scale;

            // Capacitance changes the elastance only; the resistance, and with it the rate, stays.
            meshes._rate[first + m] = omega / (mode.Q * qScale);
            meshes._elastance[first + m] = omega * pull * omega * pull;
            meshes._sees[first + m] = sees * mode.PickupShare;
            if (withLoop)
            {
                meshes.Couple(0, first + m, world.Loop.Coupling * mode.LoopShare);
            }
        }

        for (int n = 0; n < neighbours.Count; n++)
        {
            Neighbour neighbour = neighbours[n];
            int at = first + modes.Count + n;
            double omega = 2 * Math.PI * neighbour.F0Hz;
            meshes._rate[at] = (neighbour.F0Hz > 0 ? omega : omega1) / neighbour.Q;
            meshes._elastance[at] = omega * omega;
            meshes._sees[at] = neighbour.F0Hz > 0 ? sees * neighbour.PickupShare : 0;
            meshes.Couple(first, at, neighbour.CouplingToCoil);
            if (withLoop)
            {
                meshes.Couple(0, at, neighbour.CouplingToLoop);
            }
        }

        return meshes;
    }

    private void Couple(int i, int j, double k)
    {
        _k[i, j] = k;
        _k[j, i] = k;
    }
}
