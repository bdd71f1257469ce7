namespace Looseloop.Coil;

/// <summary>Constants of the field equations, SI.</summary>
public static class PhysicalConstants
{
    /// <summary>Magnetic constant, H/m. The classic 4 pi e-7, which published tables use; it differs from CODATA 2018 by 1e-10.</summary>
    public const double Mu0 = 4e-7 * Math.PI;

    /// <summary>Speed of light, m/s (exact).</summary>
    public const double SpeedOfLight = 299792458.0;

    /// <summary>Electric constant, F/m.</summary>
    public const double Epsilon0 = 1.0 / (Mu0 * SpeedOfLight * SpeedOfLight);

    /// <summary>Resistivity of annealed copper at 20 C, ohm metre (IACS, IEC 60028).</summary>
    public const double CopperResistivity = 1.7241e-8;

    /// <summary>Temperature coefficient of copper's resistance at 20 C, 1/K (IEC 60028).</summary>
    public const double CopperPerKelvin = 0.00393;
}
