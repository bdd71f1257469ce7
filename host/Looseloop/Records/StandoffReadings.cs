using System.CommandLine;
using Looseloop.Box;
using Looseloop.Boxes;
using Looseloop.Commands;
using Looseloop.Procedures.Read;
using Looseloop.Procedures.Standoff;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.Rendering;
using Looseloop.Resonance;
using Looseloop.Terminal;

namespace Looseloop.Records;

/// <summary>Takes the readings of a standoff and keeps each as it comes, as a run.</summary>
internal sealed class StandoffReadings(Shell shell, RecordStore store, RecordFacts facts, IMover mover)
{
    private const string ProcedureName = "standoff";

    public StandoffRun Take(ParseResult parsed, string coil, IReadOnlyDictionary<string, string> setUp, int places, double? nearHz)
    {
        using IMover moving = mover;
        var runId = Guid.CreateVersion7();
        var pickup = new List<Reading>();
        var loop = new List<Reading>();
        RunStatus status = RunStatus.Fault;
        bool begun = false;
        try
        {
            foreach ((StandoffMove moved, List<Reading> readings) in new[] { (StandoffMove.Pickup, pickup), (StandoffMove.Loop, loop) })
            {
                for (int place = 0; place < places; place++)
                {
                    BoxSession box = moving.Place(moved, place);
                    if (!begun)
                    {
                        store.Append(new RunStart { Id = runId, Utc = shell.Time.GetUtcNow(), Procedure = ProcedureName, HostVersion = AppVersion.Text, Box = box.Identity, Coil = coil });
                        begun = true;
                    }

                    Reading reading = Read(parsed, box, moving.Law, coil, setUp, nearHz) with { Note = $"{moved.ToString().ToLowerInvariant()} at place {place + 1}" };
                    store.Append(runId, reading);
                    readings.Add(reading);
                    nearHz ??= double.IsFinite(reading.F0Hz) ? reading.F0Hz : null;
                    shell.Say($"{reading.Note}: f0 {reading.F0Hz:0.0} Hz, Q {reading.Q:0.0}, peak {reading.PeakCounts:0} counts, {reading.Verdict.ToString().ToLowerInvariant()}.");
                }
            }

            status = RunStatus.Completed;
        }
        catch (OperationCanceledException)
        {
            status = RunStatus.Interrupted;
            throw;
        }
        finally
        {
            if (begun)
            {
                store.Append(new RunStop(runId, shell.Time.GetUtcNow(), status, status == RunStatus.Completed ? "All places were read." : "It did not reach its end.", pickup.Count + loop.Count));
            }
        }

        return new StandoffRun(pickup, loop);
    }

    private Reading Read(
        ParseResult parsed, BoxSession box, DetectorLaw? declared, string coil, IReadOnlyDictionary<string, string> setUp, double? nearHz)
    {
        var options = new ReadOptions
        {
            Law = declared ?? UndeclaredBox.LawOf(box),
            NearHz = nearHz,
            Coil = coil,
            SetUp = setUp,
            HostVersion = AppVersion.Text,
            Time = shell.Time,
        };

        // What an earlier standoff found must not be in the readings of this one.
        options = KnownFacts.Apply(options, box.Identity, facts) with { Pull = null };
        var progress = new ProgressLine(shell, parsed.GetValue(CommonOptions.Quiet));
        try
        {
            return new ReadProcedure(box, options, progress, shell.Cancel).Run().Reading;
        }
        finally
        {
            progress.End();
        }
    }
}
