namespace Looseloop.Readings;

/// <summary>The steps of commissioning a box, in their order; hardware-notes/commissioning.md has a section for each.</summary>
public enum CommissioningStep
{
    /// <summary>The drive's frequency against a counter, at three settings.</summary>
    Frequency,

    /// <summary>The mean of the driver's output at D and 1 - D.</summary>
    Duty,

    /// <summary>The pickup with the drive off.</summary>
    Dark,

    /// <summary>The detector's law.</summary>
    Ladder,

    /// <summary>That law against the waveform's own power, where the box has the input.</summary>
    Direct,

    /// <summary>How long to wait after a jump, by doubling the dwell.</summary>
    Settling,

    /// <summary>The box stops by itself when the host falls silent.</summary>
    Watchdog,

    /// <summary>The box does not drive while a field is present.</summary>
    Interlock,

    /// <summary>A first reading of a coil.</summary>
    FirstCoil,
}
