namespace Looseloop.Bench;

/// <summary>The board in time: what each step costs, and how far its clock is off.</summary>
public sealed record BoardParameters
{
    /// <summary>Most duty bits of its timer: 19 (ESP32) or 13 (S2, S3, C3).</summary>
    public int MostDutyBits { get; init; } = 19;

    /// <summary>How much faster its 80 MHz clock runs than it should, parts per million.</summary>
    public double ClockPpm { get; init; }

    /// <summary>One conversion with its managed call, microseconds.</summary>
    public double ReadUs { get; init; } = 130;

    /// <summary>Half-width of the scatter of that time, microseconds.</summary>
    public double ReadJitterUs { get; init; } = 4;

    /// <summary>Setting the timer's frequency and duty, microseconds.</summary>
    public double SetUs { get; init; } = 160;

    /// <summary>Starting or stopping the timer, microseconds.</summary>
    public double StartStopUs { get; init; } = 60;

    /// <summary>Asking the time, microseconds.</summary>
    public double NowUs { get; init; } = 4;

    /// <summary>Building and handing over one byte of text, microseconds.</summary>
    public double SendUsPerByte { get; init; } = 60;

    /// <summary>Taking and judging one received byte, microseconds.</summary>
    public double ReceiveUsPerByte { get; init; } = 20;

    /// <summary>Looking whether something was received, microseconds.</summary>
    public double PollUs { get; init; } = 25;

    /// <summary>How late a busy wait ends at most, microseconds.</summary>
    public double WaitLateUs { get; init; } = 6;

    public int Baud { get; init; } = 115_200;

    /// <summary>Whether the buffered waveform itself is wired to a second input.</summary>
    public bool HasDirect { get; init; }

    /// <summary>Whether a thermistor is wired to a third input.</summary>
    public bool HasThermistor { get; init; }
}
