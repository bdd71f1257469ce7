namespace Looseloop.External.Tests;

/// <summary>The models as printed in the files of the NIST Statistical Reference Datasets.</summary>
internal static class NistModels
{
    public static ModelFunction Of(string name) => name switch
    {
        "Eckerle4" => Eckerle4,
        "Gauss1" or "Gauss2" or "Gauss3" => Gauss,
        "MGH17" => Mgh17,
        "Thurber" => Thurber,
        "BoxBOD" or "Misra1a" => Saturation,
        "Rat43" => Rat43,
        "Lanczos3" => Lanczos,
        _ => throw new ArgumentOutOfRangeException(nameof(name), name, "no such model"),
    };

    // y = (b1/b2) exp(-0.5 ((x-b3)/b2)^2)
    private static double Eckerle4(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double u = (x - b[2]) / b[1];
        double e = Math.Exp(-0.5 * u * u);
        double y = b[0] / b[1] * e;
        d[0] = e / b[1];
        d[1] = y * ((u * u) - 1) / b[1];
        d[2] = y * u / b[1];
        return y;
    }

    // y = b1 exp(-b2 x) + b3 exp(-((x-b4)/b5)^2) + b6 exp(-((x-b7)/b8)^2)
    private static double Gauss(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double e = Math.Exp(-b[1] * x);
        d[0] = e;
        d[1] = -b[0] * x * e;
        double y = b[0] * e;
        for (int k = 2; k < 8; k += 3)
        {
            double u = (x - b[k + 1]) / b[k + 2];
            double g = Math.Exp(-u * u);
            d[k] = g;
            d[k + 1] = 2 * b[k] * g * u / b[k + 2];
            d[k + 2] = 2 * b[k] * g * u * u / b[k + 2];
            y += b[k] * g;
        }

        return y;
    }

    // y = b1 + b2 exp(-x b4) + b3 exp(-x b5)
    private static double Mgh17(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double e4 = Math.Exp(-x * b[3]);
        double e5 = Math.Exp(-x * b[4]);
        d[0] = 1;
        d[1] = e4;
        d[2] = e5;
        d[3] = -x * b[1] * e4;
        d[4] = -x * b[2] * e5;
        return b[0] + (b[1] * e4) + (b[2] * e5);
    }

    // y = (b1 + b2 x + b3 x^2 + b4 x^3) / (1 + b5 x + b6 x^2 + b7 x^3)
    private static double Thurber(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double numerator = b[0] + (x * (b[1] + (x * (b[2] + (x * b[3])))));
        double denominator = 1 + (x * (b[4] + (x * (b[5] + (x * b[6])))));
        double y = numerator / denominator;
        double power = 1;
        for (int k = 0; k < 4; k++)
        {
            d[k] = power / denominator;
            power *= x;
        }

        power = x;
        for (int k = 4; k < 7; k++)
        {
            d[k] = -y * power / denominator;
            power *= x;
        }

        return y;
    }

    // y = b1 (1 - exp(-b2 x))
    private static double Saturation(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double e = Math.Exp(-b[1] * x);
        d[0] = 1 - e;
        d[1] = b[0] * x * e;
        return b[0] * (1 - e);
    }

    // y = b1 / (1 + exp(b2 - b3 x))^(1/b4)
    private static double Rat43(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double e = Math.Exp(b[1] - (b[2] * x));
        double power = Math.Pow(1 + e, -1 / b[3]);
        double y = b[0] * power;
        d[0] = power;
        d[1] = -y / b[3] * e / (1 + e);
        d[2] = y / b[3] * e * x / (1 + e);
        d[3] = y * Math.Log(1 + e) / (b[3] * b[3]);
        return y;
    }

    // y = b1 exp(-b2 x) + b3 exp(-b4 x) + b5 exp(-b6 x)
    private static double Lanczos(ReadOnlySpan<double> b, double x, Span<double> d)
    {
        double y = 0;
        for (int k = 0; k < 6; k += 2)
        {
            double e = Math.Exp(-b[k + 1] * x);
            d[k] = e;
            d[k + 1] = -b[k] * x * e;
            y += b[k] * e;
        }

        return y;
    }
}
