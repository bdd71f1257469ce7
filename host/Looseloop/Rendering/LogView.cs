using System.Diagnostics;
using Looseloop.Procedures.Logging;
using Looseloop.Readings;
using Looseloop.Report.Plots;
using Looseloop.Terminal;
using Spectre.Console;
using Spectre.Console.Rendering;
using PlotCanvas = Looseloop.Report.Plots.BrailleCanvas;

namespace Looseloop.Rendering;

/// <summary>The live view of a log: what it is at, the last reading, f0 and Q over time, the line's health, the last events.</summary>
internal sealed class LogView(Shell shell, LogOptions options) : ILogWatch, IRenderable
{
    private const int EventsShown = 3;

    /// <summary>Redrawing more often costs a slow terminal more than it shows.</summary>
    private static readonly TimeSpan _redraw = TimeSpan.FromMilliseconds(250);

    private readonly Queue<string> _events = new();
    private readonly Stopwatch _sinceDrawn = Stopwatch.StartNew();
    private LiveDisplayContext? _live;
    private LogState? _state;
    private string _task = "";
    private string? _fieldEnd;

    /// <summary>Draws on a live display from now on.</summary>
    public LogView On(LiveDisplayContext live)
    {
        _live = live;
        return this;
    }

    public void Begin(string task, double boardSeconds)
    {
        _task = task;
        Draw(false);
    }

    public void Progress(double share)
    {
    }

    public void Started(RunStart start) => Draw(true);

    public void Kept(Reading reading, LogState state)
    {
        _task = "";
        _state = state;
        Draw(false);
    }

    public void Kept(RunEvent document)
    {
        _events.Enqueue($"{LogWords.Time(shell, document.Utc)}  {LogWords.Kind(document.Kind)}: {document.Detail}");
        if (_events.Count > EventsShown)
        {
            _events.Dequeue();
        }

        Draw(false);
    }

    public void CoolDown(FieldEnd fieldEnd)
    {
        _fieldEnd = LogWords.FieldEnd(shell, fieldEnd);
        Draw(false);
    }

    public void Waiting(LogState state)
    {
        _state = state;
        Draw(false);
    }

    public void Stopped(LogSummary summary)
    {
        _state = summary.State;
        Draw(true);
    }

    public Spectre.Console.Rendering.Measurement Measure(RenderOptions renderOptions, int maxWidth) => new(40, maxWidth);

    public IEnumerable<Segment> Render(RenderOptions renderOptions, int maxWidth)
    {
        IRenderable whole = Whole(renderOptions.Height ?? shell.Out.Profile.Height);
        return whole.Render(renderOptions, maxWidth);
    }

    private Rows Whole(int height)
    {
        var rows = new List<IRenderable>();
        string coil = options.Read.Coil is string name ? $"{name}: " : "";
        string doing = _task.Length > 0 ? _task : _state?.Doing ?? "starting";
        string left = _state is { RemainingS: double s } && double.IsFinite(s) ? $", {LogWords.Span(s)} to go" : "";
        rows.Add(new Text($"{coil}{doing}; {LogWords.Span(_state?.ElapsedS ?? 0)} so far{left}"));
        rows.Add(new Text(_state?.Last is Reading last ? LogWords.Figures(last) : "no reading yet", new Style(decoration: Decoration.Bold)));
        if (_fieldEnd is not null)
        {
            rows.Add(new Text(_fieldEnd));
        }

        // Two plots with titles, axes and legends take five rows each beside their own height.
        int plot = Math.Clamp((height - 20) / 2, 0, 12);
        if (_state is { } state && state.History.Points.Count > 1 && plot >= 3)
        {
            IReadOnlyList<LogPoint> points = state.History.Points;
            double firstS = points[0].TimeS;
            double[] time = [.. points.Select(p => p.TimeS - firstS)];
            rows.Add(new PlotCanvas(DriftSheet.Of("", "f0 in Hz", time, [.. points.Select(p => p.F0Hz)], null, null, []), plot));
            rows.Add(new PlotCanvas(DriftSheet.Of("", "Q", time, [.. points.Select(p => p.Q)], null, null, []), plot));
        }

        if (_state is not null)
        {
            rows.Add(new Text(LogWords.Health(_state), new Style(Color.Grey)));
        }

        rows.AddRange(_events.Select(line => new Text(line, new Style(Color.Grey))));
        return new Rows(rows);
    }

    private void Draw(bool now)
    {
        if (_live is not null && (now || _sinceDrawn.Elapsed >= _redraw))
        {
            _sinceDrawn.Restart();
            _live.Refresh();
        }
    }
}
