namespace Looseloop.Resonance;

/// <summary>What the fit allows beside the resonance.</summary>
public enum BackgroundModel
{
    /// <summary>
    /// A constant complex feed-through, in the form that power can determine: y^2 = (P + n1 x)/(1 + x^2) + C.
    /// f0 and Q do not depend on which of the two feed-throughs with the same power it is.
    /// </summary>
    FeedThrough,

    /// <summary>Nothing: y^2 = P/(1 + x^2). Biased by any feed-through: 1 % moves f0 by more than 1 % of the bandwidth.</summary>
    None,
}
