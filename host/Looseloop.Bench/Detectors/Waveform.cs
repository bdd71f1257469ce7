using System.Numerics;
using System.Runtime.InteropServices;

namespace Looseloop.Bench.Detectors;

/// <summary>One period of a waveform from the phasors of its harmonics, at evenly spaced points.</summary>
internal sealed class Waveform
{
    /// <summary>Points in a period: more than three for each period of the highest harmonic that the bench carries.</summary>
    public const int Points = 128;

    private const int MostHarmonics = 40;

    private static readonly double[] _cos = Table(Math.Cos);
    private static readonly double[] _sin = Table(Math.Sin);

    private readonly double[] _values = new double[Points];

    /// <summary>The values, volts.</summary>
    public double[] Values => _values;

    /// <summary>Fills the values with Re sum of phasor h times e^(j h angle), h from 1.</summary>
    public void Fill(Complex[] phasors)
    {
        Array.Clear(_values);
        Span<Vector<double>> values = MemoryMarshal.Cast<double, Vector<double>>(_values.AsSpan());
        double largest = 0;
        for (int h = 1; h < phasors.Length; h++)
        {
            largest = Math.Max(largest, Math.Max(Math.Abs(phasors[h].Real), Math.Abs(phasors[h].Imaginary)));
        }

        for (int h = 1; h < phasors.Length; h++)
        {
            double re = phasors[h].Real;
            double im = phasors[h].Imaginary;
            if (Math.Abs(re) + Math.Abs(im) < 1e-9 * largest)
            {
                continue;
            }

            ReadOnlySpan<Vector<double>> cos = MemoryMarshal.Cast<double, Vector<double>>(_cos.AsSpan(h * Points, Points));
            ReadOnlySpan<Vector<double>> sin = MemoryMarshal.Cast<double, Vector<double>>(_sin.AsSpan(h * Points, Points));
            for (int i = 0; i < values.Length; i++)
            {
                values[i] += (re * cos[i]) - (im * sin[i]);
            }
        }
    }

    /// <summary>Mean of the absolute value; crossings of zero between two points are taken as straight.</summary>
    public double MeanAbsolute()
    {
        double sum = 0;
        double before = _values[Points - 1];
        foreach (double value in _values)
        {
            double a = Math.Abs(before);
            double b = Math.Abs(value);
            sum += before * value >= 0 ? 0.5 * (a + b) : 0.5 * ((a * a) + (b * b)) / (a + b);
            before = value;
        }

        return sum / Points;
    }

    /// <summary>
    /// Mean of ln|v|. Between two points v is taken as straight, over which the integral of ln|v| is (v ln|v| - v), zeros
    /// included: the points alone would miss the poles of the logarithm.
    /// </summary>
    public double MeanLogarithm()
    {
        double sum = 0;
        double before = _values[Points - 1];
        double beforeIntegral = Integral(before);
        foreach (double value in _values)
        {
            double integral = Integral(value);
            double rise = value - before;
            double middle = 0.5 * (value + before);
            sum += Math.Abs(rise) > 1e-3 * Math.Abs(middle) ? (integral - beforeIntegral) / rise : Math.Log(Math.Abs(middle));
            before = value;
            beforeIntegral = integral;
        }

        return sum / Points;
    }

    /// <summary>scale ln of the mean of exp(v / scale).</summary>
    public double LogMeanExponential(double scale)
    {
        double largest = double.NegativeInfinity;
        foreach (double value in _values)
        {
            largest = Math.Max(largest, value);
        }

        double sum = 0;
        foreach (double value in _values)
        {
            sum += Math.Exp((value - largest) / scale);
        }

        return largest + (scale * Math.Log(sum / Points));
    }

    /// <summary>The largest value of sign * v, by a parabola through the largest point and its neighbours.</summary>
    public double Peak(double sign)
    {
        int at = 0;
        for (int i = 1; i < Points; i++)
        {
            if (sign * _values[i] > sign * _values[at])
            {
                at = i;
            }
        }

        double left = sign * _values[(at + Points - 1) % Points];
        double middle = sign * _values[at];
        double right = sign * _values[(at + 1) % Points];
        double bend = (2 * middle) - left - right;
        double slope = right - left;
        return bend > 0 ? middle + (slope * slope / (8 * bend)) : middle;
    }

    private static double Integral(double value) => value == 0 ? 0 : (value * Math.Log(Math.Abs(value))) - value;

    private static double[] Table(Func<double, double> function)
    {
        var table = new double[(MostHarmonics + 1) * Points];
        for (int h = 0; h <= MostHarmonics; h++)
        {
            for (int i = 0; i < Points; i++)
            {
                table[(h * Points) + i] = function(2 * Math.PI * (h * i % Points) / Points);
            }
        }

        return table;
    }
}
