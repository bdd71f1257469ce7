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
    private readonly IByteLink _link;
    private readonly BoardClock _clock = new();
    private readonly BoxExchange _exchange;
    private readonly HeldPlan _plan;
    private readonly DrivenWork _work;
    private readonly SilenceTrial _silence;

    private BoxSession(LineChannel channel, BoxIdentity identity)
    {
        _link = channel.Link;
        _exchange = new BoxExchange(channel, _clock);
        _plan = new HeldPlan(_exchange);
        _work = new DrivenWork(_exchange, _clock, _plan);
        _silence = new SilenceTrial(channel, _exchange, _clock, _plan);
        Identity = identity;
        Grid = new SettingGrid(identity.MostDutyBits);
    }

    public BoxIdentity Identity { get; }

    /// <summary>The settings that this box can make.</summary>
    public SettingGrid Grid { get; }

    public BoxLineCounters Counters => _exchange.Counters;

    /// <summary>The clock that this box lives by.</summary>
    public TimeProvider Time => _link.Time;

    /// <summary>Board time from the first to the last thing the box reported in this session, seconds.</summary>
    public double BoardSeconds => _clock.Seconds;

    /// <summary>The latest board time that the box has reported, microseconds.</summary>
    public long BoardTimeUs => _clock.LatestUs;

    /// <summary>
    /// Identifies the box on a link. Opening a port may restart a board, so this waits up to <paramref name="patience"/> for it.
    /// </summary>
    /// <exception cref="BoxException">Nothing answers, or something else does.</exception>
    /// <exception cref="LinkLostException">The port is gone.</exception>
    public static BoxSession Open(IByteLink link, TimeSpan patience, CancellationToken cancel = default)
    {
        var channel = new LineChannel(link);
        return new BoxSession(channel, BoxGreeting.Exchange(channel, patience, cancel));
    }

    /// <summary>Asks what may be driven and where the interlock stands.</summary>
    public LimitsAnswer Limits() => _exchange.Ask<LimitsAnswer>(Verb.Limits);

    /// <summary>Sets what may be driven, hertz, and the interlock's pedestal and threshold, counts, until the box restarts.</summary>
    public LimitsAnswer SetLimits(LimitsAnswer limits) =>
        _exchange.Ask<LimitsAnswer>(Verb.Limits, limits.LowHz, limits.HighHz, limits.PedestalCounts, limits.FieldCounts);

    /// <summary>Measures with the drive off.</summary>
    /// <param name="milliseconds">For how long, 1..60 000.</param>
    /// <param name="spacingUs">From sample to sample, microseconds; 0 for as fast as the box can.</param>
    /// <param name="channel">Which input.</param>
    /// <param name="cancel">Halts the box.</param>
    public DarkLevel Dark(int milliseconds, int spacingUs = 0, int channel = Channel.Detector, CancellationToken cancel = default)
    {
        _exchange.Send(Verb.Dark, milliseconds, spacingUs, channel);
        while (true)
        {
            if (_exchange.Next(cancel) is DarkAnswer dark)
            {
                return _exchange.Level(dark);
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
        foreach (IReadOnlyList<Setting> part in HeldPlan.Parts(request.Settings, WireLimits.SweepPoints / both))
        {
            DarkLevel partLook = SweepPart(request with { Settings = part }, points, point, out List<Setting> missing, cancel);
            look ??= partLook;
            for (int again = 0; missing.Count > 0 && again < BoxExchange.Tries - 1; again++)
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
    public SilenceResult FallSilent(SweepRequest request, TimeSpan longest, CancellationToken cancel = default) =>
        _silence.Run(request, longest, cancel);

    /// <summary>Takes a series of ring-downs.</summary>
    public RingResult Ring(RingRequest request, CancellationToken cancel = default)
    {
        Setting setting = request.Setting;
        _exchange.Send(
            Verb.Ring, setting.DutyBits, setting.Divider, setting.DutyCount, request.DriveUs, request.DelayUs, request.StaggerUs,
            request.Samples, request.Repeats);
        var samples = new List<DecaySample>();
        DarkLevel look = _work.Follow(
            message =>
            {
                if (message is DecayAnswer decay)
                {
                    samples.AddRange(decay.SinceStopUs.Select((us, i) => new DecaySample(decay.Repeat, us, decay.Counts[i])));
                }
            },
            cancel);
        return new RingResult(samples, look);
    }

    /// <summary>Lets time pass on the box's clock.</summary>
    public void Pause(TimeSpan duration) => _link.Pause(duration);

    /// <summary>Stops whatever the box is doing. Never throws for a box that does not answer: its own silence stop will act.</summary>
    public void Halt() => _exchange.Halt();

    /// <summary>Closes the link.</summary>
    public void Dispose() => _link.Dispose();

    private DarkLevel SweepPart(
        SweepRequest request, List<RawPoint> points, Action<RawPoint>? told, out List<Setting> missing, CancellationToken cancel)
    {
        _plan.Set(request.Settings);
        int order = request.ThereAndBack ? SweepOrder.ThereAndBack : SweepOrder.AsPlanned;
        _exchange.Send(Verb.Sweep, request.DwellUs, request.Samples, request.SpacingUs, order, request.Pack, request.Channel);
        var gathering = new SweepGathering(request, points, told);
        DarkLevel look = _work.Follow(
            message =>
            {
                switch (message)
                {
                    case PointAnswer answer:
                        _clock.See(answer.TimeUs);
                        gathering.Add(answer);
                        break;
                    case PackAnswer answer:
                        _clock.See(answer.LastUs);
                        gathering.Add(answer);
                        break;
                }
            },
            cancel);
        missing = gathering.Missing();
        return look;
    }
}
