using System.Globalization;
using System.Text.RegularExpressions;

namespace Looseloop.External.Tests;

/// <summary>One set of the NIST Statistical Reference Datasets, nonlinear regression, as its file gives it.</summary>
internal sealed partial record NistSet(
    double[] X, double[] Y, double[] Start1, double[] Start2, double[] Certified, double[] CertifiedSd, double CertifiedRss)
{
    public static NistSet Load(string name)
    {
        var parameters = new List<double[]>();
        var x = new List<double>();
        var y = new List<double>();
        double rss = double.NaN;
        bool data = false;
        foreach (string line in File.ReadLines(SharedData.File("nist-strd", name + ".dat")))
        {
            Match parameter = ParameterLine().Match(line);
            if (parameter.Success)
            {
                parameters.Add(Numbers(parameter.Groups[1].Value));
            }
            else if (line.StartsWith("Residual Sum of Squares:", StringComparison.Ordinal))
            {
                rss = Numbers(line[(line.IndexOf(':') + 1)..])[0];
            }
            else if (DataLine().IsMatch(line))
            {
                data = true;
            }
            else if (data && !string.IsNullOrWhiteSpace(line))
            {
                double[] row = Numbers(line);
                y.Add(row[0]);
                x.Add(row[1]);
            }
        }

        double[] Column(int i) => [.. parameters.Select(row => row[i])];
        return new NistSet([.. x], [.. y], Column(0), Column(1), Column(2), Column(3), rss);
    }

    private static double[] Numbers(string text) =>
        [.. text.Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(part => double.Parse(part, CultureInfo.InvariantCulture))];

    [GeneratedRegex(@"^\s*b\d+\s*=\s*(.*\S)\s*$")]
    private static partial Regex ParameterLine();

    [GeneratedRegex(@"^Data:\s+y\s+x\s*$")]
    private static partial Regex DataLine();
}
