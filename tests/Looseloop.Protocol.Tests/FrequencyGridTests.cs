using Looseloop.Protocol;

namespace Looseloop.Protocol.Tests;

public class FrequencyGridTests
{
    private const int Esp32 = FrequencyGrid.Esp32DutyBits;

    // The LEDC code of nf-interpreter (ESP32 target), evaluated by hand for these requests.
    [Theory]
    [InlineData(40_000, 10, 500, 40_000.00, 80)]
    [InlineData(65_000, 10, 308, 64_935.06, 211)]
    [InlineData(150_000, 9, 267, 149_812.7, 563)]
    [InlineData(300_000, 8, 267, 299_625.5, 1126)]
    [InlineData(1_000_000, 6, 320, 1_000_000, 3135)]
    public void A_request_lands_on_the_known_setting(int requestHz, int bits, int divider, double frequencyHz, double stepHz)
    {
        Assert.Equal(bits, FrequencyGrid.DutyBits(requestHz, Esp32));
        Assert.Equal(divider, FrequencyGrid.Divider(requestHz, bits));
        Assert.Equal(frequencyHz, FrequencyGrid.FrequencyHz(bits, divider), 0.05);
        int upBits = bits;
        int up = divider;
        FrequencyGrid.StepUp(ref upBits, ref up, Esp32);
        Assert.Equal(stepHz, FrequencyGrid.FrequencyHz(upBits, up) - FrequencyGrid.FrequencyHz(bits, divider), 0.6);
    }

    [Theory]
    [InlineData(FrequencyGrid.Esp32DutyBits)]
    [InlineData(FrequencyGrid.S3DutyBits)]
    public void Whole_hertz_from_30_kHz_to_1_MHz_reach_1304_settings_at_1299_frequencies(int mostBits)
    {
        var settings = new HashSet<(int, int)>();
        for (int hz = 30_000; hz <= 1_000_000; hz++)
        {
            int bits = FrequencyGrid.DutyBits(hz, mostBits);
            settings.Add((bits, FrequencyGrid.Divider(hz, bits)));
        }

        Assert.Equal(1304, settings.Count);
        var frequencies = settings.Select(s => FrequencyGrid.FrequencyHz(s.Item1, s.Item2)).Distinct().Order().ToList();
        Assert.Equal(1299, frequencies.Count);
        double largest = frequencies.Zip(frequencies.Skip(1), (low, high) => high / low - 1).Max();
        Assert.Equal(0.00389, largest, 5e-6);

        // Stepping visits the same frequencies, each once, by settings that a request really makes.
        FrequencyGrid.Nearest(frequencies[0], mostBits, out int stepBits, out int stepDivider);
        foreach (double expected in frequencies)
        {
            Assert.Equal(expected, FrequencyGrid.FrequencyHz(stepBits, stepDivider));
            Assert.True(FrequencyGrid.IsRealisable(stepBits, stepDivider, mostBits));
            FrequencyGrid.StepUp(ref stepBits, ref stepDivider, mostBits);
        }
    }

    [Theory]
    [InlineData(FrequencyGrid.Esp32DutyBits)]
    [InlineData(FrequencyGrid.S3DutyBits)]
    public void Stepping_down_undoes_stepping_up_from_8_kHz(int mostBits)
    {
        FrequencyGrid.Nearest(8_100, mostBits, out int bits, out int divider);
        while (FrequencyGrid.FrequencyHz(bits, divider) < 1_000_000)
        {
            int upBits = bits;
            int up = divider;
            FrequencyGrid.StepUp(ref upBits, ref up, mostBits);
            int backBits = upBits;
            int back = up;
            FrequencyGrid.StepDown(ref backBits, ref back, mostBits);
            Assert.Equal((bits, divider), (backBits, back));
            (bits, divider) = (upBits, up);
        }
    }

    [Fact]
    public void Nearest_is_nearest()
    {
        for (double hz = 8_500; hz < 900_000; hz *= 1.000173)
        {
            FrequencyGrid.Nearest(hz, Esp32, out int bits, out int divider);
            double distance = Math.Abs(FrequencyGrid.FrequencyHz(bits, divider) - hz);
            int otherBits = bits;
            int other = divider;
            FrequencyGrid.StepUp(ref otherBits, ref other, Esp32);
            Assert.True(Math.Abs(FrequencyGrid.FrequencyHz(otherBits, other) - hz) >= distance);
            (otherBits, other) = (bits, divider);
            FrequencyGrid.StepDown(ref otherBits, ref other, Esp32);
            Assert.True(Math.Abs(FrequencyGrid.FrequencyHz(otherBits, other) - hz) >= distance);
        }
    }

    // The two truncations of the runtime: parts = (uint)(duty * 10000), count = 2^r * parts / 10000.
    [Fact]
    public void Every_count_of_up_to_13_bits_survives_the_double_truncation()
    {
        for (int bits = 1; bits <= 13; bits++)
        {
            for (int count = 1; count < 1 << bits; count++)
            {
                uint parts = (uint)(FrequencyGrid.AskedDuty(count, bits) * 10000);
                Assert.Equal((uint)count, (1u << bits) * parts / 10000);
            }
        }
    }

    [Fact]
    public void Asking_for_the_plain_ratio_would_land_one_low_120_times_of_128()
    {
        int low = Enumerable.Range(1, 127).Append(128).Count(count => 256 * (uint)(count / 256.0 * 10000) / 10000 == count - 1);
        Assert.Equal(120, low);
    }
}
