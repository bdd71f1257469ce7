namespace Looseloop.Resonance;

/// <summary>
/// The Cramer-Rao bound of a dense, even, centred sweep without feed-through, in closed form, narrow band, noise constant in
/// amplitude: u(f0) = c_f0 BW (sigma/A) / sqrt N and u(Q)/Q = c_Q (sigma/A) / sqrt N.
/// </summary>
public static class EvenSweepBound
{
    /// <summary>c_f0 = sqrt(2k / (atan k + k (k^2-1)/(k^2+1)^2)); smallest, 1.5772, at k = 1.189.</summary>
    /// <param name="spanBandwidths">k, the whole span of the sweep in bandwidths, above 0.</param>
    public static double F0(double spanBandwidths)
    {
        double k = spanBandwidths;
        double d = (k * k) + 1;
        return Math.Sqrt(2 * k / (Math.Atan(k) + (k * ((k * k) - 1) / (d * d))));
    }

    /// <summary>c_Q from the moments of the derivatives by amplitude and bandwidth; smallest, 5.19409, at k = 2.418.</summary>
    /// <param name="spanBandwidths">k, the whole span of the sweep in bandwidths, above 0.</param>
    public static double Q(double spanBandwidths)
    {
        double k = spanBandwidths;
        double d = (k * k) + 1;
        double aa = Math.Atan(k) / k;
        double ab = (Math.Atan(k) - (k / d)) / (2 * k);
        double bb = ((3 * Math.Atan(k)) - (k * ((5 * k * k) + 3) / (d * d))) / (8 * k);
        return Math.Sqrt(aa / ((aa * bb) - (ab * ab)));
    }
}
