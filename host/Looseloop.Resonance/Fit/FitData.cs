namespace Looseloop.Resonance;

/// <summary>The points of one fit, laid out for the inner loops. Storage is reused from fit to fit.</summary>
internal sealed class FitData
{
    /// <summary>Below this part of a standard deviation the square root of the model's power is continued as a line.</summary>
    private const double RootPart = 0.25;

    /// <summary>Stands for the unknown standard deviation, in parts of the largest amplitude.</summary>
    private const double UnknownPart = 1e-3;

    private readonly int[] _groupOf = new int[ResonanceFitter.MostGroups];

    public FitData(int mostPoints)
    {
        FrequencyHz = new double[mostPoints];
        Amplitude = new double[mostPoints];
        Power = new double[mostPoints];
        Target = new double[mostPoints];
        InPower = new bool[mostPoints];
        InverseSigma = new double[mostPoints];
        ProjectionWeight = new double[mostPoints];
        RobustRoot = new double[mostPoints];
        Drive2 = new double[mostPoints];
        Linear = new double[mostPoints];
        Group = new int[mostPoints];
        Order = new int[mostPoints];
        Keys = new double[mostPoints];
    }

    public int Count { get; private set; }

    public int GroupCount { get; private set; }

    public BackgroundModel Background { get; private set; }

    public bool VariancesStated { get; private set; }

    /// <summary>The standard deviation that stands for an unknown one; 1 where variances are stated.</summary>
    public double UnknownSigma { get; private set; }

    /// <summary>Root mean square of the points' standard deviations in amplitude.</summary>
    public double TypicalSigma { get; private set; }

    public double LargestAmplitude { get; private set; }

    public double LowestHz { get; private set; }

    public double HighestHz { get; private set; }

    /// <summary>Mean square of the first group's drive weights: what its constant power belongs to.</summary>
    public double FirstGroupDrive2 { get; private set; }

    /// <summary>Reference of the prefactor, hertz.</summary>
    public double ReferenceHz { get; private set; }

    public int LinearCount => Background == BackgroundModel.None ? 1 : 2 + GroupCount;

    public int ParameterCount => 2 + LinearCount;

    public double[] FrequencyHz { get; }

    public double[] Amplitude { get; }

    /// <summary>Amplitude squared, with its sign.</summary>
    public double[] Power { get; }

    /// <summary>What the residual is taken of: amplitude or power.</summary>
    public double[] Target { get; }

    public bool[] InPower { get; }

    /// <summary>One over the standard deviation of <see cref="Target"/>.</summary>
    public double[] InverseSigma { get; }

    /// <summary>One over the standard deviation of <see cref="Power"/>, from the point itself.</summary>
    public double[] ProjectionWeight { get; }

    /// <summary>Square roots of the robust weights.</summary>
    public double[] RobustRoot { get; }

    /// <summary>Drive weight squared, times the prefactor squared.</summary>
    public double[] Drive2 { get; }

    /// <summary>For amplitudes: the model's power below which its square root is continued as a line.</summary>
    public double[] Linear { get; }

    public int[] Group { get; }

    /// <summary>Points in order of frequency.</summary>
    public int[] Order { get; }

    /// <summary>Working storage for sorting.</summary>
    public double[] Keys { get; }

    /// <summary>Takes points in; returns <see cref="FitOutcome.Fitted"/> where they are fit to be used.</summary>
    public FitOutcome Load(ReadOnlySpan<FitPoint> points, in FitOptions options)
    {
        Count = points.Length;
        Background = options.Background;
        if (Count < 3)
        {
            return FitOutcome.TooFewPoints;
        }

        if (!TryCopy(points, options))
        {
            return FitOutcome.BadPoint;
        }

        SetWeights(points, options);
        for (int i = 0; i < Count; i++)
        {
            Order[i] = i;
            Keys[i] = FrequencyHz[i];
        }

        Array.Sort(Keys, Order, 0, Count);
        LowestHz = Keys[0];
        HighestHz = Keys[Count - 1];
        int different = 1;
        for (int i = 1; i < Count; i++)
        {
            different += Keys[i] > Keys[i - 1] ? 1 : 0;
        }

        // Scatter about the curve needs at least one point more than there are parameters.
        bool enough = different >= ParameterCount && Count >= ParameterCount + (VariancesStated ? 0 : 1);
        return enough ? FitOutcome.Fitted : FitOutcome.TooFewPoints;
    }

    private bool TryCopy(ReadOnlySpan<FitPoint> points, in FitOptions options)
    {
        LargestAmplitude = 0;
        Array.Clear(_groupOf);
        double sumHz = 0;
        for (int i = 0; i < Count; i++)
        {
            ref readonly FitPoint point = ref points[i];
            if (!(point.FrequencyHz > 0 && double.IsFinite(point.FrequencyHz) && double.IsFinite(point.Amplitude)
                && Math.Abs(point.Amplitude) < 1e100 && point.DriveWeight > 0 && double.IsFinite(point.DriveWeight)
                && (uint)point.Group < ResonanceFitter.MostGroups))
            {
                return false;
            }

            _groupOf[point.Group] = 1;
            FrequencyHz[i] = point.FrequencyHz;
            Amplitude[i] = point.Amplitude;
            Power[i] = point.Amplitude * Math.Abs(point.Amplitude);
            LargestAmplitude = Math.Max(LargestAmplitude, Math.Abs(point.Amplitude));
            sumHz += point.FrequencyHz;
        }

        // Groups in use, numbered without gaps in their own order: the first is that of the plain points.
        GroupCount = 0;
        for (int g = 0; g < _groupOf.Length; g++)
        {
            _groupOf[g] = _groupOf[g] == 1 ? GroupCount++ : -1;
        }

        ReferenceHz = sumHz / Count;
        int first = 0;
        FirstGroupDrive2 = 0;
        for (int i = 0; i < Count; i++)
        {
            double drive2 = points[i].DriveWeight * points[i].DriveWeight;
            Group[i] = _groupOf[points[i].Group];
            if (Group[i] == 0)
            {
                first++;
                FirstGroupDrive2 += (drive2 - FirstGroupDrive2) / first;
            }

            Drive2[i] = options.PrefactorExponent == 0
                ? drive2
                : drive2 * Math.Pow(FrequencyHz[i] / ReferenceHz, 2 * options.PrefactorExponent);
        }

        return true;
    }

    private void SetWeights(ReadOnlySpan<FitPoint> points, in FitOptions options)
    {
        double floor = options.AmplitudeFloor > 0 ? options.AmplitudeFloor : 0;
        VariancesStated = true;
        for (int i = 0; i < Count; i++)
        {
            VariancesStated &= points[i].Variance > 0 || floor > 0;
        }

        UnknownSigma = VariancesStated ? 1 : Math.Max(LargestAmplitude * UnknownPart, double.Epsilon);
        double squares = 0;
        for (int i = 0; i < Count; i++)
        {
            double variance = points[i].Variance;
            double sigma = VariancesStated
                ? Math.Max(Math.Sqrt(variance > 0 ? variance : 0), floor)
                : UnknownSigma;
            InPower[i] = VariancesStated && points[i].PowerVariance > 0;
            double magnitude = Math.Max(Math.Abs(Amplitude[i]), sigma);
            double powerSigma = InPower[i]
                ? Math.Max(Math.Sqrt(points[i].PowerVariance), 2 * magnitude * floor)
                : 2 * magnitude * sigma;
            Target[i] = InPower[i] ? Power[i] : Amplitude[i];
            InverseSigma[i] = 1 / (InPower[i] ? powerSigma : sigma);
            ProjectionWeight[i] = 1 / powerSigma;
            RobustRoot[i] = 1;
            Linear[i] = RootPart * sigma * RootPart * sigma;
            squares += sigma * sigma;
        }

        TypicalSigma = Math.Sqrt(squares / Count);
    }
}
