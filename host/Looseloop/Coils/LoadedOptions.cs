using System.CommandLine;
using Looseloop.Arguments;
using Looseloop.Coil;

namespace Looseloop.Coils;

/// <summary>What arcs are assumed to do, for the loaded column.</summary>
internal sealed class LoadedOptions
{
    private readonly Option<double?> _streamer = NumberOption.Create(
        "--streamer-pf", "Capacitance that streamers add, pF (2: common practice, no source).");

    private readonly Option<double?> _q = NumberOption.Create("--loaded-q", "Q with arcs (20: common practice, no source).");

    public void AddTo(Command command)
    {
        command.Options.Add(_streamer);
        command.Options.Add(_q);
    }

    public LoadedState Of(ParseResult parsed) => new(
        parsed.GetValue(_streamer) is double pF ? pF * 1e-12 : LoadedState.CommonPractice.StreamerF,
        parsed.GetValue(_q) ?? LoadedState.CommonPractice.Q);
}
