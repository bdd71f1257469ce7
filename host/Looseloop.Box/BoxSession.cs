using Looseloop.Link;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>
/// One box that has identified itself. Requests run one after another on the caller's thread; while the box works, this
/// side keeps it awake. A cancelled request halts the drive before it returns.
/// </summary>
public sealed class BoxSession : IDisposable
{
    private static readonly TimeSpan _answerTime = TimeSpan.FromSeconds(1);
    private static readonly TimeSpan _quietTime = TimeSpan.FromMilliseconds(700);
    private static readonly TimeSpan _haltTime = TimeSpan.FromMilliseconds(500);
    private const int Tries = 3;

    private readonly LineChannel _channel;
    private IReadOnlyList<Setting> _planned = [];
    private long _firstUs = long.MaxValue;
    private long _lastUs;

    private BoxSession(LineChannel channel, BoxIdentity identity)
    {
        _channel = channel;
        Identity = identity;
        Grid = new SettingGrid(identity.MostDutyBits);
    }

    public BoxIdentity Identity { get; }

    /// <summary>The settings that this box can make.</summary>
    public SettingGrid Grid { get; }

    public BoxLineCounters Counters => _channel.Counters;

    /// <summary>The clock that this box lives by.</summary>
    public TimeProvider Time => _channel.Link.Time;

    /// <summary>Board time from the first to the last thing the box reported in this session, seconds.</summary>
    public double BoardSeconds => _lastUs > _firstUs ? (_lastUs - _firstUs) * 1e-6 : 0;

    /// <summary>The latest board time that the box has reported, microseconds.</summary>
    public long BoardTimeUs => _lastUs;

    /// <summary>
    /// Identifies the box on a link. Opening a port may restart a board, so this waits up to <paramref name="patience"/> for it.
    /// </summary>
    /// <exception cref="BoxException">Nothing answers, or something else does.</exception>
    /// <exception cref="LinkLostException">The port is gone.</exception>
    public static BoxSession Open(IByteLink link, TimeSpan patience, CancellationToken cancel = default)
    {
        var channel = new LineChannel(link);
        channel.Clear();
        long begun = channel.Now;
        do
        {
            cancel.ThrowIfCancellationRequested();
            channel.Send(Verb.Identify);
            long asked = channel.Now;
            while (channel.Since(asked) < _answerTime && channel.Receive(_answerTime - channel.Since(asked)) is BoxMessage message)
            {
                if (message is BoxAnswer answer)
                {
                    return new BoxSession(channel, Identify(link.Name, answer));
                }
            }

            // A box that was left in mid-sweep answers nothing else until it is halted.
            channel.Send(Verb.Halt);
            channel.Receive(TimeSpan.FromMilliseconds(100));
        }
        while (channel.Since(begun) < patience);

        string heard = channel.Counters.Lines > 0
            ? "something else is talking on that port"
            : "nothing came back";
        throw new BoxException(
            BoxTrouble.NoAnswer,
            $"No box answers on {link.Name}: {heard}. Check that this is the box's port, that its firmware is deployed, and that it has power.");
    }

    /// <summary>Asks what may be driven and where the interlock stands.</summary>
    public LimitsAnswer Limits() => Ask<LimitsAnswer>(Verb.Limits);

    /// <summary>Sets what may be driven, hertz, and the interlock's pedestal and threshold, counts, until the box restarts.</summary>
    public LimitsAnswer SetLimits(LimitsAnswer limits) =>
        Ask<LimitsAnswer>(Verb.Limits, limits.LowHz, limits.HighHz, limits.PedestalCounts, limits.FieldCounts);

    /// <summary>Measures with the drive off.</summary>
    /// <param name="milliseconds">For how long, 1..60 000.</param>
    /// <param name="spacingUs">From sample to sample, microseconds; 0 for as fast as the box can.</param>
    /// <param name="channel">Which input.</param>
    /// <param name="cancel">Halts the box.</param>
    public DarkLevel Dark(int milliseconds, int spacingUs = 0, int channel = Channel.Detector, CancellationToken cancel = default)
    {
        _channel.Send(Verb.Dark, milliseconds, spacingUs, channel);
        while (true)
        {
            if (Next(cancel) is DarkAnswer dark)
            {
                return Level(dark);
            }
        }
    }

    /// <summary>Measures at settings. Points whose lines are lost on the way are measured again, up to twice.</summary>
    /// <param name="request">What and how.</param>
    /// <param name="point">Told each point as it arrives; may be null.</param>
    /// <param name="cancel">Halts the box.</param>
    public SweepResult Sweep(SweepRequest request, Action<RawPoint>? point = null, CancellationToken cancel = default)
    {
        var points = new List<RawPoint>();
        int both = request.ThereAndBack ? 2 : 1;
        DarkLevel? look = null;
        foreach (IReadOnlyList<Setting> part in Parts(request.Settings, WireLimits.SweepPoints / both))
        {
            DarkLevel partLook = SweepPart(request with { Settings = part }, points, point, out List<Setting> missing, cancel);
            look ??= partLook;
            for (int again = 0; missing.Count > 0 && again < Tries - 1; again++)
            {
                Counters.PointsAskedAgain += missing.Count;
                SweepPart(request with { Settings = missing, ThereAndBack = false }, points, point, out missing, cancel);
            }
        }

        int expected = request.Settings.Count * both;
        return new SweepResult(points, look ?? default, expected - points.Count);
    }

    /// <summary>Begins a sweep and then says nothing, as a host that has died: what does the box do?</summary>
    /// <param name="request">A sweep that takes much longer than the silence.</param>
    /// <param name="longest">How long to say nothing; a box that still works then is halted.</param>
    /// <param name="cancel">Halts the box.</param>
    public SilenceResult FallSilent(SweepRequest request, TimeSpan longest, CancellationToken cancel = default)
    {
        Plan(request.Settings);
        _channel.Send(
            Verb.Sweep, request.DwellUs, request.Samples, request.SpacingUs, SweepOrder.AsPlanned, request.Pack, request.Channel);
        BoxMessage? message;
        while ((message = NextOrFault(cancel)) is not (PointAnswer or PackAnswer))
        {
            if (message is FaultAnswer refusal)
            {
                throw new BoxException(refusal.Code);
            }
        }

        // The first point proves that it drives. From here on only this side's last line counts.
        int fault = FaultCode.None;
        while (_channel.SinceSent < longest)
        {
            if (cancel.IsCancellationRequested)
            {
                Halt();
                cancel.ThrowIfCancellationRequested();
            }

            message = _channel.Receive(longest - _channel.SinceSent);
            if (message is FaultAnswer answer)
            {
                fault = answer.Code;
            }
            else if (message is DoneAnswer done)
            {
                See(done.TimeUs);
                return new SilenceResult(true, fault != FaultCode.None ? fault : done.FaultCode, _channel.SinceSent);
            }
        }

        Halt();
        return new SilenceResult(false, fault, longest);
    }

    /// <summary>Takes a series of ring-downs.</summary>
    public RingResult Ring(RingRequest request, CancellationToken cancel = default)
    {
        Setting setting = request.Setting;
        _channel.Send(
            Verb.Ring, setting.DutyBits, setting.Divider, setting.DutyCount, request.DriveUs, request.DelayUs, request.StaggerUs,
            request.Samples, request.Repeats);
        var samples = new List<DecaySample>();
        DarkLevel look = default;
        int fault = FaultCode.None;
        while (true)
        {
            switch (NextOrFault(cancel))
            {
                case DarkAnswer dark:
                    look = Level(dark);
                    break;
                case DecayAnswer decay:
                    samples.AddRange(decay.SinceStopUs.Select((us, i) => new DecaySample(decay.Repeat, us, decay.Counts[i])));
                    break;
                case FaultAnswer answer:
                    fault = FaultOrThrow(answer, begun: look.Samples > 0);
                    break;
                case DoneAnswer done:
                    See(done.TimeUs);
                    return fault != FaultCode.None || done.Ending == Ending.Faulted
                        ? throw new BoxException(fault != FaultCode.None ? fault : done.FaultCode)
                        : new RingResult(samples, look);
            }
        }
    }

    /// <summary>Lets time pass on the box's clock.</summary>
    public void Pause(TimeSpan duration) => _channel.Link.Pause(duration);

    /// <summary>Stops whatever the box is doing. Never throws for a box that does not answer: its own silence stop will act.</summary>
    public void Halt()
    {
        try
        {
            _channel.Send(Verb.Halt);
            long begun = _channel.Now;
            while (_channel.Since(begun) < _haltTime && _channel.Receive(_haltTime) is BoxMessage message && message is not HaltedAnswer)
            {
            }
        }
        catch (LinkLostException)
        {
            // Gone already; the box stops by itself.
        }
    }

    /// <summary>Closes the link.</summary>
    public void Dispose() => _channel.Link.Dispose();

    private DarkLevel SweepPart(
        SweepRequest request, List<RawPoint> points, Action<RawPoint>? told, out List<Setting> missing, CancellationToken cancel)
    {
        Plan(request.Settings);
        int order = request.ThereAndBack ? SweepOrder.ThereAndBack : SweepOrder.AsPlanned;
        _channel.Send(Verb.Sweep, request.DwellUs, request.Samples, request.SpacingUs, order, request.Pack, request.Channel);
        var gathering = new SweepGathering(request, points, told);
        DarkLevel look = default;
        int fault = FaultCode.None;
        while (true)
        {
            switch (NextOrFault(cancel))
            {
                case DarkAnswer dark:
                    look = Level(dark);
                    break;
                case PointAnswer answer:
                    See(answer.TimeUs);
                    gathering.Add(answer);
                    break;
                case PackAnswer answer:
                    See(answer.LastUs);
                    gathering.Add(answer);
                    break;
                case FaultAnswer answer:
                    fault = FaultOrThrow(answer, begun: look.Samples > 0);
                    break;
                case DoneAnswer done:
                    See(done.TimeUs);
                    missing = gathering.Missing();
                    return fault != FaultCode.None || done.Ending == Ending.Faulted
                        ? throw new BoxException(fault != FaultCode.None ? fault : done.FaultCode)
                        : look;
            }
        }
    }

    private void Plan(IReadOnlyList<Setting> settings)
    {
        if (_planned.SequenceEqual(settings))
        {
            return;
        }

        _planned = [];
        Ask<PlannedAnswer>(Verb.Plan);
        int planned = 0;
        foreach (PlanLines.Line line in PlanLines.For(settings))
        {
            planned = Ask<PlannedAnswer>(line.Verb, line.Fields).Settings;
        }

        if (planned != settings.Count)
        {
            throw new BoxException(BoxTrouble.Restarted, $"The box holds {planned} settings of {settings.Count}: it lost part of its plan. Try again.");
        }

        _planned = [.. settings];
    }

    private T Ask<T>(string verb, params ReadOnlySpan<long> fields)
        where T : BoxMessage
    {
        _channel.Send(verb, fields);
        for (int tries = 1; ; tries++)
        {
            long asked = _channel.Now;
            bool garbled = false;
            while (!garbled && _channel.Since(asked) < _answerTime && _channel.Receive(_answerTime - _channel.Since(asked)) is BoxMessage message)
            {
                switch (message)
                {
                    case T answer:
                        return answer;
                    case FaultAnswer { Code: FaultCode.UnreadableLine or FaultCode.LineTooLong }:
                        garbled = true;
                        break;
                    case FaultAnswer fault:
                        throw new BoxException(fault.Code);
                }
            }

            if (tries == Tries)
            {
                throw new BoxException(BoxTrouble.FellSilent, $"The box on {_channel.Link.Name} no longer answers. Check its power and cable, then try again.");
            }

            Counters.Repeated++;
            _channel.Resend();
        }
    }

    private BoxMessage Next(CancellationToken cancel)
    {
        BoxMessage message = NextOrFault(cancel);
        return message is FaultAnswer fault ? throw new BoxException(fault.Code) : message;
    }

    private BoxMessage NextOrFault(CancellationToken cancel)
    {
        if (cancel.IsCancellationRequested)
        {
            Halt();
            cancel.ThrowIfCancellationRequested();
        }

        BoxMessage? message = _channel.Receive(_quietTime, keepAwake: true);
        if (message is null)
        {
            Halt();
            throw new BoxException(
                BoxTrouble.FellSilent,
                $"The box on {_channel.Link.Name} fell silent in the middle of its work; its drive stops by itself. Check its power and cable, then read again.");
        }

        if (message is AliveAnswer alive)
        {
            See(alive.TimeUs);
        }

        return message;
    }

    /// <summary>A refusal ends the request here; a fault of work already begun is followed by <c>done</c>.</summary>
    private int FaultOrThrow(FaultAnswer fault, bool begun)
    {
        bool refusedByLook = fault.Code is FaultCode.FieldPresent or FaultCode.PickupBelowRange;
        if (fault.Code == FaultCode.PlanEmpty)
        {
            _planned = [];
        }

        return begun || refusedByLook ? fault.Code : throw new BoxException(fault.Code);
    }

    private DarkLevel Level(DarkAnswer dark)
    {
        See(dark.FromUs);
        See(dark.ToUs);
        return new DarkLevel(dark.Channel, dark.Samples, dark.Sum, dark.SumSquares, dark.Min, dark.Max, dark.FromUs, dark.ToUs);
    }

    private void See(long boardUs)
    {
        _firstUs = Math.Min(_firstUs, boardUs);
        _lastUs = Math.Max(_lastUs, boardUs);
    }

    private static IEnumerable<IReadOnlyList<Setting>> Parts(IReadOnlyList<Setting> settings, int mostPoints)
    {
        var part = new List<Setting>();
        foreach (Setting setting in settings)
        {
            // A plan entry for each is the worst case; runs only take fewer.
            if (part.Count == mostPoints || (part.Count >= WireLimits.PlanEntries && PlanLines.For([.. part, setting]).Sum(line => line.Entries) > WireLimits.PlanEntries))
            {
                yield return part;
                part = [];
            }

            part.Add(setting);
        }

        if (part.Count > 0)
        {
            yield return part;
        }
    }

    private static BoxIdentity Identify(string port, BoxAnswer answer) =>
        answer.ProtocolVersion == ProtocolVersion.Current
            ? new BoxIdentity(
                port, answer.Board, $"{answer.Major}.{answer.Minor}.{answer.Patch}", answer.ProtocolVersion, answer.BootId,
                answer.MostDutyBits, answer.LowestHz, answer.HighestHz, answer.FullCounts, answer.Inputs)
            : throw new BoxException(
                BoxTrouble.OtherProtocol,
                $"The box on {port} speaks version {answer.ProtocolVersion} of the protocol, this program version {ProtocolVersion.Current}. "
                + "Deploy the firmware that came with this program.");
}
