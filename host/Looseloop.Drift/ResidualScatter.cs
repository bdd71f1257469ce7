namespace Looseloop.Drift;

/// <summary>
/// Sums over residuals (each divided by its standard uncertainty) in the order of time. Drift noise is not white: where
/// neighbours are alike, N readings tell as much as N (1 - r) / (1 + r) independent ones, r being the correlation of
/// neighbours (first-order autoregression; common practice in time series).
/// </summary>
internal struct ResidualScatter
{
    private double _products;
    private double _last;

    /// <summary>How many.</summary>
    public int Count { get; private set; }

    /// <summary>Sum of squares (chi squared).</summary>
    public double SumSquares { get; private set; }

    /// <summary>Correlation of neighbours, 0 .. 0.99; zero where it lies within chance (twice 1/sqrt N).</summary>
    public readonly double Neighbours
    {
        get
        {
            double r = SumSquares > 0 && Count > 2 ? _products / SumSquares : 0;
            return r > 2 / Math.Sqrt(Count) ? Math.Min(r, 0.99) : 0;
        }
    }

    /// <summary>What the variance of a fitted parameter is multiplied by, 1 or more.</summary>
    public readonly double Inflation => (1 + Neighbours) / (1 - Neighbours);

    public void Add(double residual)
    {
        SumSquares += residual * residual;
        if (Count > 0)
        {
            _products += residual * _last;
        }

        _last = residual;
        Count++;
    }
}
