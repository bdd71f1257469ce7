namespace Looseloop.Coil;

/// <summary>A reading set beside an expectation.</summary>
public sealed record Comparison
{
    /// <summary>The reading, hertz.</summary>
    public required double ReadHz { get; init; }

    /// <summary>Its standard uncertainty, hertz, absolute.</summary>
    public required double ReadUncertaintyHz { get; init; }

    /// <summary>The expectation, hertz.</summary>
    public required double ExpectedHz { get; init; }

    /// <summary>Its standard uncertainty, hertz.</summary>
    public required double ExpectedUncertaintyHz { get; init; }

    /// <summary>Reading over expectation less one.</summary>
    public double Relative => (ReadHz / ExpectedHz) - 1;

    /// <summary>The difference over its standard uncertainty.</summary>
    public double Z => (ReadHz - ExpectedHz) / double.Hypot(ReadUncertaintyHz, ExpectedUncertaintyHz);

    /// <summary>Whether the two agree at a coverage factor of 2.</summary>
    public bool WithinUncertainty => Math.Abs(Z) <= 2;

    /// <summary>Single causes, those that can account for it first.</summary>
    public required IReadOnlyList<Cause> Causes { get; init; }

    /// <summary>Compares, and looks for single causes by searching the quick model.</summary>
    /// <param name="expectation">The expectation.</param>
    /// <param name="readHz">The reading.</param>
    /// <param name="readUncertaintyHz">Its absolute standard uncertainty.</param>
    public static Comparison Of(CoilExpectation expectation, double readHz, double readUncertaintyHz)
    {
        Demand.Frequency(readHz, "the reading");
        Demand.Uncertainty(readUncertaintyHz, "the uncertainty of the reading");
        CoilGeometry coil = expectation.Coil;
        // The quick model's own small error must not pass for a cause.
        double target = readHz * Expectations.F1Hz(coil, Resolution.Quick) / expectation.F1Hz;
        var causes = new List<Cause> { AddedCapacitance(coil, target) };
        foreach (Dimension dimension in Dimension.Of(coil))
        {
            if (Reach(dimension) is (double low, double high))
            {
                causes.Add(new Cause(
                    dimension.Name, dimension.Value, Targeting.Find(dimension, target, low, high, Resolution.Quick) ?? double.NaN,
                    dimension.Unit, RemarkOn(dimension)));
            }
        }

        return new Comparison
        {
            ReadHz = readHz,
            ReadUncertaintyHz = readUncertaintyHz,
            ExpectedHz = expectation.F1Hz,
            ExpectedUncertaintyHz = expectation.F1UncertaintyHz,
            Causes = [.. causes.OrderBy(c => c.CanAccount ? 0 : 1)],
        };
    }

    private static Cause AddedCapacitance(CoilGeometry coil, double targetHz)
    {
        var model = new FieldModel(coil, Resolution.Quick);
        double Miss(double pF) => ModeSolver.Lowest(model, 1, pF * 1e-12)[0].FrequencyHz - targetHz;
        double? added = Miss(0) < 0 ? null : Root.Bracketed(Miss, 0, 2000, 1e-6);
        return new Cause("added capacitance", 0, added ?? double.NaN, "pF", added is null
            ? "nothing that hangs on the coil raises its frequency"
            : "a probe or its lead on the winding, a person, a wall or a cable near the top");
    }

    // How far a mistake can plausibly go. Sizes of wire, tube and disc move f1 too little, or are too easily measured.
    private static (double Low, double High)? Reach(Dimension dimension) => dimension.Path switch
    {
        "turns" => (0.75 * dimension.Value, 1.33 * dimension.Value),
        "winding_length_mm" => (0.8 * dimension.Value, 1.25 * dimension.Value),
        "base_height_mm" => (1, dimension.Value + 2000),
        _ when dimension.Path.EndsWith("height_mm", StringComparison.Ordinal) => (dimension.Value - 300, dimension.Value + 600),
        _ when dimension.Path.EndsWith("major_diameter_mm", StringComparison.Ordinal) => (0.7 * dimension.Value, 1.4 * dimension.Value),
        _ => null,
    };

    private static string RemarkOn(Dimension dimension) => dimension.Path switch
    {
        "turns" => "a miscount, or a shorted turn (which also costs most of Q)",
        "winding_length_mm" => "the winding measured wrongly, or the pitch not as thought",
        "base_height_mm" => "the ground lies lower or higher than stated, or is smaller than the model's wide plane",
        _ when dimension.Path.EndsWith("height_mm", StringComparison.Ordinal) => "the top load stands higher or lower than stated",
        _ => "the top load is not of the stated size",
    };
}
