using Looseloop.Coil;
using Looseloop.Drift;

namespace Looseloop.Coils;

/// <summary>One fraction of the amplitude and its window.</summary>
internal sealed record WindowRow(double Fraction, DetuningWindow Window);

/// <summary>Everything <c>window</c> says.</summary>
internal sealed record WindowFigures
{
    public required double ColdHz { get; init; }

    public required double ColdQ { get; init; }

    /// <summary>True where Q is what the copper allows and not a reading: the window is then at least this wide.</summary>
    public required bool QIsBound { get; init; }

    public required double LoadedHz { get; init; }

    public required double LoadedQ { get; init; }

    public required IReadOnlyList<WindowRow> Cold { get; init; }

    public required IReadOnlyList<WindowRow> Loaded { get; init; }

    public required bool OscillatorIsResonant { get; init; }

    public required double ComponentRelative { get; init; }

    /// <summary>How far the component moves the oscillator up and down, hertz, about the cold f0.</summary>
    public required (double DownHz, double UpHz) ComponentShift { get; init; }

    /// <summary>Amplitude left where a driver tuned to the cold f0 meets the loaded coil.</summary>
    public required double ColdDriveOnLoaded { get; init; }

    /// <summary>When a logged warm-up leaves the first window, or null.</summary>
    public WindowExit? Exit { get; init; }

    /// <summary>Whether a driver set by its component's marking alone is sure to be inside the first window.</summary>
    public bool UntrimmedWillDo =>
        Cold[0].Window.Contains(ColdHz + ComponentShift.UpHz) && Cold[0].Window.Contains(ColdHz + ComponentShift.DownHz);

    /// <summary>Whether a driver fixed on the cold f0 is still inside the loaded coil's first window.</summary>
    public bool FixedWillDo => Loaded[0].Window.Contains(ColdHz) && Exit is null or { Kind: WindowExitKind.Stays };

    public static WindowFigures Of(
        double f0Hz, double q, bool qIsBound, LoadedState loaded, double topF, double[] fractions, bool resonant, double component)
    {
        double loadedHz = loaded.FrequencyHz(f0Hz, topF);
        return new WindowFigures
        {
            ColdHz = f0Hz,
            ColdQ = q,
            QIsBound = qIsBound,
            LoadedHz = loadedHz,
            LoadedQ = loaded.Q,
            Cold = [.. fractions.Select(a => new WindowRow(a, DetuningWindow.Exact(f0Hz, q, a)))],
            Loaded = [.. fractions.Select(a => new WindowRow(a, DetuningWindow.Exact(loadedHz, loaded.Q, a)))],
            OscillatorIsResonant = resonant,
            ComponentRelative = component,
            ComponentShift = (
                DetuningWindow.OscillatorShiftHz(f0Hz, component, resonant), DetuningWindow.OscillatorShiftHz(f0Hz, -component, resonant)),
            ColdDriveOnLoaded = DetuningWindow.AmplitudeAt(loadedHz, loaded.Q, f0Hz),
        };
    }
}
