using System.Globalization;
using Looseloop.Terminal;
using nietras.SeparatedValues;

namespace Looseloop.Tables;

/// <summary>One row of a frequency response: anybody's, or one that <c>read --save</c> wrote.</summary>
/// <param name="FrequencyHz">Frequency at the coil, hertz.</param>
/// <param name="Amplitude">Amplitude, any unit, the zero taken off.</param>
/// <param name="Uncertainty">Its standard uncertainty, or NaN where the table has none.</param>
/// <param name="Group">Points that share a constant: the harmonic of the drive. 1 where the table does not say.</param>
/// <param name="Weight">Relative strength of the drive at this point. 1 where the table does not say.</param>
internal readonly record struct ResponseRow(double FrequencyHz, double Amplitude, double Uncertainty, int Group, double Weight);

/// <summary>Reads tables of frequency and amplitude: comma, semicolon or tab separated, with or without a header.</summary>
internal static class ResponseTable
{
    private static readonly Dictionary<string, double> _units = new(StringComparer.OrdinalIgnoreCase)
    {
        ["hz"] = 1,
        ["khz"] = 1e3,
        ["mhz"] = 1e6,
        ["ghz"] = 1e9,
    };

    private static readonly string[] _frequencyNames = ["frequency", "freq", "f"];
    private static readonly string[] _amplitudeNames = ["amplitude", "amp", "magnitude", "level", "y", "v"];
    private static readonly string[] _realNames = ["re", "real", "s21_re"];
    private static readonly string[] _imaginaryNames = ["im", "imag", "imaginary", "s21_im"];
    private static readonly string[] _uncertaintyNames = ["uncertainty", "amplitude_uncertainty", "sigma", "u", "sd"];

    /// <summary>What the amplitude column holds.</summary>
    public enum Scale
    {
        Amplitude,
        Power,
        Decibel,
    }

    /// <summary>Reads a table.</summary>
    /// <param name="path">The file.</param>
    /// <param name="scale">What its second column holds.</param>
    /// <exception cref="UserError">The file cannot be read as a table; the message names the line and what to do.</exception>
    public static IReadOnlyList<ResponseRow> Read(string path, Scale scale)
    {
        string text = ReadText(path);
        var rows = new List<ResponseRow>();
        using SepReader reader = Sep.Reader(options => options with { HasHeader = false, DisableColCountCheck = true, Trim = SepTrim.All }).FromText(text);
        Columns? columns = null;
        foreach (SepReader.Row row in reader)
        {
            string[] cells = new string[row.ColCount];
            for (int i = 0; i < cells.Length; i++)
            {
                cells[i] = row[i].ToString().Trim('"');
            }

            if (cells.All(cell => cell.Length == 0) || cells[0].StartsWith('#'))
            {
                continue;
            }

            if (columns is null)
            {
                columns = Columns.Of(cells);
                if (columns.FromHeader)
                {
                    continue;
                }
            }

            rows.Add(columns.Row(cells, path, row.LineNumberFrom, scale));
        }

        return rows.Count > 0 ? rows : throw new UserError($"{path} holds no points. It needs a column of frequencies and one of amplitudes.");
    }

    private static string ReadText(string path)
    {
        try
        {
            return File.ReadAllText(path);
        }
        catch (Exception error) when (error is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new UserError($"There is no file {path}.");
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            throw new UserError($"{path} cannot be read: {error.Message}");
        }
    }

    private sealed record Columns(int Frequency, double Unit, int Amplitude, int Imaginary, int Uncertainty, int Group, int Weight, bool FromHeader)
    {
        public static Columns Of(string[] cells)
        {
            if (cells.Length > 0 && double.TryParse(cells[0], NumberStyles.Float, CultureInfo.InvariantCulture, out _))
            {
                return new Columns(0, 1, 1, -1, cells.Length > 2 ? 2 : -1, -1, -1, false);
            }

            int frequency = Find(cells, _frequencyNames);
            int amplitude = Find(cells, _amplitudeNames);
            int imaginary = amplitude < 0 ? Find(cells, _imaginaryNames) : -1;
            amplitude = imaginary >= 0 ? Find(cells, _realNames) : amplitude;
            frequency = frequency < 0 ? 0 : frequency;
            return new Columns(
                frequency, UnitOf(cells[frequency]), amplitude < 0 ? (frequency == 0 ? 1 : 0) : amplitude, imaginary, Find(cells, _uncertaintyNames),
                Find(cells, ["group"]), Find(cells, ["weight"]), true);
        }

        public ResponseRow Row(string[] cells, string path, int line, Scale scale)
        {
            double frequencyHz = Number(cells, Frequency, "frequency", path, line) * Unit;
            double value = Number(cells, Amplitude, "amplitude", path, line);
            if (Imaginary >= 0)
            {
                // A complex response: the fit looks at its magnitude.
                value = double.Hypot(value, Number(cells, Imaginary, "imaginary part", path, line));
            }

            double sigma = Uncertainty >= 0 ? Number(cells, Uncertainty, "uncertainty", path, line) : double.NaN;
            if (frequencyHz <= 0)
            {
                throw new UserError($"{path}, line {line}: a frequency must be above 0. Correct the line or take it out.");
            }

            (value, sigma) = ToAmplitude(value, sigma, scale);
            int group = Group >= 0 ? (int)Number(cells, Group, "group", path, line) : 1;
            double weight = Weight >= 0 ? Number(cells, Weight, "weight", path, line) : 1;
            return new ResponseRow(frequencyHz, value, sigma > 0 ? sigma : double.NaN, group, weight);
        }

        private static (double Value, double Sigma) ToAmplitude(double value, double sigma, Scale scale)
        {
            switch (scale)
            {
                case Scale.Power:
                    double root = Math.Sign(value) * Math.Sqrt(Math.Abs(value));
                    return (root, sigma / (2 * Math.Max(Math.Abs(root), 1e-300)));
                case Scale.Decibel:
                    double amplitude = Math.Pow(10, value / 20);
                    return (amplitude, sigma * amplitude * Math.Log(10) / 20);
                default:
                    return (value, sigma);
            }
        }

        private static double Number(string[] cells, int column, string what, string path, int line)
        {
            string cell = column < cells.Length ? cells[column] : "";
            if (!double.TryParse(cell, NumberStyles.Float, CultureInfo.InvariantCulture, out double value))
            {
                string found = cell.Length == 0 ? $"there is no {what}" : $"the {what} '{cell}' is not a number";
                throw new UserError($"{path}, line {line}: {found}. Correct the line or take it out; decimals take a point.");
            }

            return double.IsFinite(value)
                ? value
                : throw new UserError($"{path}, line {line}: the {what} is {cell}. Take the line out: a fit over it would mean nothing.");
        }

        private static int Find(string[] cells, string[] names) =>
            Array.FindIndex(cells, cell => names.Contains(Bare(cell), StringComparer.OrdinalIgnoreCase));

        /// <summary>"Frequency (kHz)", "frequency_khz" and "f/kHz" all name a frequency in kilohertz.</summary>
        private static string Bare(string header)
        {
            string[] words = header.Split([' ', '_', '/', '(', ')', '[', ']'], StringSplitOptions.RemoveEmptyEntries);
            return string.Join('_', words.Where((word, i) => i == 0 || !(_units.ContainsKey(word) || word is "counts" or "V" or "mV" or "dB")));
        }

        private static double UnitOf(string header) =>
            header.Split([' ', '_', '/', '(', ')', '[', ']'], StringSplitOptions.RemoveEmptyEntries)
                .Select(word => _units.GetValueOrDefault(word, 0))
                .FirstOrDefault(unit => unit > 0, 1);
    }
}
