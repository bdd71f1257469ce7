namespace Looseloop.Coil;

/// <summary>A body on the top terminal, round about the winding's axis.</summary>
/// <param name="HeightM">Of its centre above the winding's top, metres; negative only for a toroid whose hole clears the winding.</param>
public abstract record TopLoad(double HeightM)
{
    /// <summary>Its word in a coil file.</summary>
    public abstract string Kind { get; }

    /// <summary>Its lowest point above the winding's top, metres.</summary>
    public abstract double LowestM { get; }

    /// <summary>Every length multiplied.</summary>
    public abstract TopLoad Scaled(double factor);

    /// <summary>Distance of a point from its surface, metres; negative inside. Height counts from the winding's top.</summary>
    public abstract double Clearance(double radiusM, double heightM);

    /// <summary>The line that, turned about the axis, makes its surface; height counts from the winding's top.</summary>
    internal abstract Profile Profile { get; }
}

/// <summary>A toroid, given as the trade does: outside diameter by tube diameter.</summary>
/// <param name="MajorDiameterM">Outside diameter, metres.</param>
/// <param name="MinorDiameterM">Diameter of the tube, metres; below half of the outside diameter.</param>
/// <param name="HeightM">Of the tube's centre above the winding's top, metres.</param>
public sealed record Toroid(double MajorDiameterM, double MinorDiameterM, double HeightM) : TopLoad(HeightM)
{
    /// <inheritdoc/>
    public override string Kind => "toroid";

    /// <summary>Radius of the circle on which the tube's centre lies, metres.</summary>
    public double RingRadiusM => (MajorDiameterM - MinorDiameterM) / 2;

    /// <inheritdoc/>
    public override double LowestM => HeightM - (MinorDiameterM / 2);

    /// <inheritdoc/>
    public override TopLoad Scaled(double factor) => new Toroid(MajorDiameterM * factor, MinorDiameterM * factor, HeightM * factor);

    /// <inheritdoc/>
    public override double Clearance(double radiusM, double heightM) =>
        double.Hypot(radiusM - RingRadiusM, heightM - HeightM) - (MinorDiameterM / 2);

    internal override Profile Profile => Profile.Circle(RingRadiusM, HeightM, MinorDiameterM / 2);
}

/// <summary>A sphere.</summary>
/// <param name="DiameterM">Metres.</param>
/// <param name="HeightM">Of its centre above the winding's top, metres.</param>
public sealed record Sphere(double DiameterM, double HeightM) : TopLoad(HeightM)
{
    /// <inheritdoc/>
    public override string Kind => "sphere";

    /// <inheritdoc/>
    public override double LowestM => HeightM - (DiameterM / 2);

    /// <inheritdoc/>
    public override TopLoad Scaled(double factor) => new Sphere(DiameterM * factor, HeightM * factor);

    /// <inheritdoc/>
    public override double Clearance(double radiusM, double heightM) =>
        double.Hypot(radiusM, heightM - HeightM) - (DiameterM / 2);

    internal override Profile Profile => Profile.HalfCircle(HeightM, DiameterM / 2);
}

/// <summary>A thin flat disc.</summary>
/// <param name="DiameterM">Metres.</param>
/// <param name="HeightM">Above the winding's top, metres.</param>
public sealed record Disc(double DiameterM, double HeightM) : TopLoad(HeightM)
{
    /// <inheritdoc/>
    public override string Kind => "disc";

    /// <inheritdoc/>
    public override double LowestM => HeightM;

    /// <inheritdoc/>
    public override TopLoad Scaled(double factor) => new Disc(DiameterM * factor, HeightM * factor);

    /// <inheritdoc/>
    public override double Clearance(double radiusM, double heightM) =>
        double.Hypot(Math.Max(0, radiusM - (DiameterM / 2)), heightM - HeightM);

    internal override Profile Profile => Profile.Flat(HeightM, DiameterM / 2);
}
