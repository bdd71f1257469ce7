using System.Numerics;
using System.Runtime.InteropServices;

namespace Looseloop.Resonance;

/// <summary>Inner loops over columns of doubles; no allocation.</summary>
internal static class Columns
{
    /// <summary>Sum of the products of two columns of one length.</summary>
    public static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        int whole = a.Length - (a.Length % Vector<double>.Count);
        ReadOnlySpan<Vector<double>> wideA = MemoryMarshal.Cast<double, Vector<double>>(a[..whole]);
        ReadOnlySpan<Vector<double>> wideB = MemoryMarshal.Cast<double, Vector<double>>(b[..whole]);
        Vector<double> wide = Vector<double>.Zero;
        for (int i = 0; i < wideA.Length && i < wideB.Length; i++)
        {
            wide += wideA[i] * wideB[i];
        }

        double sum = Vector.Sum(wide);
        for (int i = whole; i < a.Length; i++)
        {
            sum += a[i] * b[i];
        }

        return sum;
    }

    /// <summary>Adds a multiple of one column to another of the same length.</summary>
    public static void AddMultiple(Span<double> to, double factor, ReadOnlySpan<double> column)
    {
        int whole = to.Length - (to.Length % Vector<double>.Count);
        Span<Vector<double>> wideTo = MemoryMarshal.Cast<double, Vector<double>>(to[..whole]);
        ReadOnlySpan<Vector<double>> wide = MemoryMarshal.Cast<double, Vector<double>>(column[..whole]);
        for (int i = 0; i < wideTo.Length && i < wide.Length; i++)
        {
            wideTo[i] += factor * wide[i];
        }

        for (int i = whole; i < to.Length; i++)
        {
            to[i] += factor * column[i];
        }
    }

    /// <summary>Euclidean length of a column.</summary>
    public static double Norm(ReadOnlySpan<double> a) => Math.Sqrt(Dot(a, a));
}
