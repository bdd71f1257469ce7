namespace Looseloop.Drift;

/// <summary>
/// A fitted warm-up f(t) = End + sum of Amplitude exp(-(t - origin)/Tau), with none, one or two terms, and the covariance of
/// its parameters in the order End, amplitude 1, tau 1, amplitude 2, tau 2 (tau 1 is the shorter).
/// </summary>
public sealed class WarmUpModel
{
    private readonly double[,] _covariance;

    internal WarmUpModel(
        double originS, double end, IReadOnlyList<WarmUpTerm> terms, double[,] covariance, double chiSquare, int count,
        double neighbours, bool atBound)
    {
        OriginS = originS;
        End = end;
        Terms = terms;
        _covariance = covariance;
        ChiSquare = chiSquare;
        Count = count;
        Neighbours = neighbours;
        AtBound = atBound;
    }

    /// <summary>The time to which the amplitudes belong, seconds on the series' clock.</summary>
    public double OriginS { get; }

    /// <summary>The value after a very long time, in the value's unit.</summary>
    public double End { get; }

    /// <summary>Standard uncertainty of <see cref="End"/>.</summary>
    public double EndStandard => Math.Sqrt(_covariance[0, 0]);

    /// <summary>The exponentials, the fast one first; empty for a value that does not move.</summary>
    public IReadOnlyList<WarmUpTerm> Terms { get; }

    /// <summary>Sum of squared residuals over the stated uncertainties.</summary>
    public double ChiSquare { get; }

    /// <summary>How many readings it was fitted to.</summary>
    public int Count { get; }

    /// <summary>Correlation of neighbouring residuals, 0..0.99; the covariance is widened by it.</summary>
    public double Neighbours { get; }

    /// <summary>True where a time constant ran to the end of what can be told from such a run.</summary>
    public bool AtBound { get; }

    /// <summary>Number of parameters.</summary>
    public int Parameters => 1 + (2 * Terms.Count);

    /// <summary>Scatter of the readings about the model over their stated uncertainty; 1 where both agree.</summary>
    public double Scatter => Math.Sqrt(ChiSquare / Math.Max(1, Count - Parameters));

    /// <summary>Standard uncertainty of a term's amplitude.</summary>
    public double AmplitudeStandard(int term) => Math.Sqrt(_covariance[1 + (2 * term), 1 + (2 * term)]);

    /// <summary>Standard uncertainty of a term's time constant, seconds.</summary>
    public double TauStandardS(int term) => Math.Sqrt(_covariance[2 + (2 * term), 2 + (2 * term)]);

    /// <summary>Covariance of two parameters in the order stated above.</summary>
    public double Covariance(int i, int j) => _covariance[i, j];

    /// <summary>The model's value at a time.</summary>
    public double At(double timeS) => End + Remaining(timeS);

    /// <summary>Standard uncertainty of the model's value at a time (GUM 5.2.2, first order).</summary>
    public double StandardAt(double timeS) => Propagate(timeS, 1);

    /// <summary>What is still to come at a time: value less end, signed.</summary>
    public double Remaining(double timeS)
    {
        double sum = 0;
        foreach (WarmUpTerm term in Terms)
        {
            sum += term.Amplitude * Math.Exp(-(timeS - OriginS) / term.TauS);
        }

        return sum;
    }

    /// <summary>Standard uncertainty of what is still to come.</summary>
    public double RemainingStandard(double timeS) => Propagate(timeS, 0);

    /// <summary>How fast the model moves at a time, value's unit per second.</summary>
    public double SlopeAt(double timeS)
    {
        double sum = 0;
        foreach (WarmUpTerm term in Terms)
        {
            sum -= term.Amplitude / term.TauS * Math.Exp(-(timeS - OriginS) / term.TauS);
        }

        return sum;
    }

    private double Propagate(double timeS, double endGradient)
    {
        Span<double> gradient = stackalloc double[Parameters];
        gradient[0] = endGradient;
        for (int k = 0; k < Terms.Count; k++)
        {
            double age = timeS - OriginS;
            double e = Math.Exp(-age / Terms[k].TauS);
            gradient[1 + (2 * k)] = e;
            gradient[2 + (2 * k)] = Terms[k].Amplitude * e * age / (Terms[k].TauS * Terms[k].TauS);
        }

        double variance = 0;
        for (int i = 0; i < gradient.Length; i++)
        {
            for (int j = 0; j < gradient.Length; j++)
            {
                variance += gradient[i] * gradient[j] * _covariance[i, j];
            }
        }

        return Math.Sqrt(Math.Max(0, variance));
    }
}
