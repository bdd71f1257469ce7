using System.Numerics;
using System.Runtime.InteropServices;

namespace Looseloop.Coil;

/// <summary>The two inner loops of dense linear algebra, on the processor's vector unit.</summary>
internal static class VectorMath
{
    /// <summary>Sum of a[i] b[i].</summary>
    public static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        ReadOnlySpan<Vector<double>> va = MemoryMarshal.Cast<double, Vector<double>>(a);
        ReadOnlySpan<Vector<double>> vb = MemoryMarshal.Cast<double, Vector<double>>(b[..a.Length]);
        Vector<double> s0 = Vector<double>.Zero;
        Vector<double> s1 = Vector<double>.Zero;
        int i = 0;
        for (; i + 1 < va.Length; i += 2)
        {
            s0 += va[i] * vb[i];
            s1 += va[i + 1] * vb[i + 1];
        }

        if (i < va.Length)
        {
            s0 += va[i] * vb[i];
        }

        double sum = Vector.Sum(s0 + s1);
        for (int j = va.Length * Vector<double>.Count; j < a.Length; j++)
        {
            sum += a[j] * b[j];
        }

        return sum;
    }

    /// <summary>One row against four others, fetched once.</summary>
    public static void FourDots(
        ReadOnlySpan<double> a, ReadOnlySpan<double> b0, ReadOnlySpan<double> b1, ReadOnlySpan<double> b2, ReadOnlySpan<double> b3,
        out double d0, out double d1, out double d2, out double d3)
    {
        ReadOnlySpan<Vector<double>> va = MemoryMarshal.Cast<double, Vector<double>>(a);
        ReadOnlySpan<Vector<double>> v0 = MemoryMarshal.Cast<double, Vector<double>>(b0[..a.Length]);
        ReadOnlySpan<Vector<double>> v1 = MemoryMarshal.Cast<double, Vector<double>>(b1[..a.Length]);
        ReadOnlySpan<Vector<double>> v2 = MemoryMarshal.Cast<double, Vector<double>>(b2[..a.Length]);
        ReadOnlySpan<Vector<double>> v3 = MemoryMarshal.Cast<double, Vector<double>>(b3[..a.Length]);
        Vector<double> s0 = Vector<double>.Zero;
        Vector<double> s1 = Vector<double>.Zero;
        Vector<double> s2 = Vector<double>.Zero;
        Vector<double> s3 = Vector<double>.Zero;
        for (int i = 0; i < va.Length; i++)
        {
            Vector<double> x = va[i];
            s0 += x * v0[i];
            s1 += x * v1[i];
            s2 += x * v2[i];
            s3 += x * v3[i];
        }

        d0 = Vector.Sum(s0);
        d1 = Vector.Sum(s1);
        d2 = Vector.Sum(s2);
        d3 = Vector.Sum(s3);
        for (int j = va.Length * Vector<double>.Count; j < a.Length; j++)
        {
            d0 += a[j] * b0[j];
            d1 += a[j] * b1[j];
            d2 += a[j] * b2[j];
            d3 += a[j] * b3[j];
        }
    }

    /// <summary>y += factor x.</summary>
    public static void AddScaled(Span<double> y, double factor, ReadOnlySpan<double> x)
    {
        Span<Vector<double>> vy = MemoryMarshal.Cast<double, Vector<double>>(y);
        ReadOnlySpan<Vector<double>> vx = MemoryMarshal.Cast<double, Vector<double>>(x[..y.Length]);
        Vector<double> f = new(factor);
        for (int i = 0; i < vy.Length; i++)
        {
            vy[i] += f * vx[i];
        }

        for (int j = vy.Length * Vector<double>.Count; j < y.Length; j++)
        {
            y[j] += factor * x[j];
        }
    }
}
