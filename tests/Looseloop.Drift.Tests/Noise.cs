namespace Looseloop.Drift.Tests;

/// <summary>Gaussian noise with a seed (Box and Muller).</summary>
internal sealed class Noise(int seed)
{
    private readonly Random _random = new(seed);

    public double Next() => Math.Sqrt(-2 * Math.Log(1 - _random.NextDouble())) * Math.Cos(2 * Math.PI * _random.NextDouble());

    public double Uniform() => _random.NextDouble();
}
