namespace Looseloop.Bench;

/// <summary>What stands and happens around the coil.</summary>
public sealed record Room
{
    /// <summary>What people near the coil add to its capacitance, picofarad.</summary>
    public double PeoplePf { get; init; }

    /// <summary>What the box and its cable add to the coil's capacitance, picofarad.</summary>
    public double CablePf { get; init; }

    /// <summary>A primary left in, a second coil, a shorted turn: whatever else couples to the coil.</summary>
    public IReadOnlyList<Neighbour> Neighbours { get; init; } = [];

    /// <summary>Fields that are there without the drive.</summary>
    public IReadOnlyList<Carrier> Carriers { get; init; } = [];

    public MainsHum Hum { get; init; } = new();

    public Bursts Bursts { get; init; } = new();

    public WarmUp WarmUp { get; init; } = new();

    /// <summary>Air temperature at the thermistor, degrees Celsius.</summary>
    public double TemperatureC { get; init; } = 21;
}

/// <summary>Another circuit that is coupled to the coil and stays with it (it belongs to the coil as it stands).</summary>
public sealed record Neighbour
{
    /// <summary>Its own resonant frequency, hertz; 0: a closed turn without a capacitor.</summary>
    public double F0Hz { get; init; }

    /// <summary>Its quality factor; of a closed turn, its reactance over its resistance at the coil's f0.</summary>
    public double Q { get; init; } = 50;

    /// <summary>Coupling coefficient to the coil's lowest mode.</summary>
    public double CouplingToCoil { get; init; }

    /// <summary>Coupling coefficient to the loop.</summary>
    public double CouplingToLoop { get; init; }

    /// <summary>What its charge gives at the pickup, as a share of what the coil's gives.</summary>
    public double PickupShare { get; init; }
}

/// <summary>A steady or gated sine at the pickup that does not come from the drive: a broadcast, an energised coil.</summary>
public sealed record Carrier
{
    public double FrequencyHz { get; init; } = 198_000;

    /// <summary>Its amplitude at the detector's input, volts.</summary>
    public double Volts { get; init; }

    /// <summary>If not 0, it is gated: on once in this many seconds.</summary>
    public double PeriodS { get; init; }

    /// <summary>How long it is on in each period, seconds.</summary>
    public double OnS { get; init; }

    /// <summary>It is silent before this time, seconds from the world's begin.</summary>
    public double FromS { get; init; }

    /// <summary>It is silent from this time on, seconds from the world's begin: an energised run that ends.</summary>
    public double ToS { get; init; } = double.PositiveInfinity;
}

/// <summary>Mains hum.</summary>
public sealed record MainsHum
{
    public double FrequencyHz { get; init; } = 50;

    /// <summary>Its amplitude at the detector's output, millivolts.</summary>
    public double OutputMv { get; init; }

    /// <summary>Its share that comes at twice the mains frequency, 0 to 1.</summary>
    public double SecondShare { get; init; } = 0.3;

    /// <summary>By which fraction it modulates what the pickup receives, 0 to 1.</summary>
    public double Modulation { get; init; }
}

/// <summary>Short disturbances at random times: switches, sparks.</summary>
public sealed record Bursts
{
    /// <summary>How many there are in a second, on average.</summary>
    public double PerSecond { get; init; }

    /// <summary>What a burst adds at the detector's output, millivolts: exponentially distributed about this mean.</summary>
    public double OutputMv { get; init; } = 50;

    /// <summary>How long each lasts, microseconds.</summary>
    public double LengthUs { get; init; } = 400;
}

/// <summary>Drift of the coil over time: f0 (1 + start e^(-t/T) + rate t), and Q likewise.</summary>
public sealed record WarmUp
{
    /// <summary>How far f0 is off its final value at the start, parts per million.</summary>
    public double StartPpm { get; init; }

    /// <summary>The time constant, seconds.</summary>
    public double TimeS { get; init; } = 900;

    /// <summary>Steady drift of f0, parts per million an hour.</summary>
    public double PpmPerHour { get; init; }

    /// <summary>How far Q is off its final value at the start, per cent.</summary>
    public double StartQPercent { get; init; }

    /// <summary>Steady drift of Q, per cent an hour.</summary>
    public double QPercentPerHour { get; init; }
}
