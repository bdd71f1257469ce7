namespace Looseloop.Report.Plots;

/// <summary>Turns values into dots.</summary>
internal sealed class DotPainter(DotField field, double xLow, double xHigh, double yLow, double yHigh)
{
    /// <summary>Draws a series.</summary>
    public void Series(PlotSeries series, int index)
    {
        // A few measured points get a little cross each, or a curve under them would hide them.
        bool crosses = series.Look == SeriesLook.Points && field.Across > field.Columns && series.X.Count <= field.Columns / 3;
        (int X, int Y)? before = null;
        for (int i = 0; i < series.X.Count; i++)
        {
            if (!double.IsFinite(series.X[i]) || !double.IsFinite(series.Y[i]))
            {
                before = null;
                continue;
            }

            (int X, int Y) here = (Across(series.X[i]), Down(series.Y[i]));
            if (series.Look == SeriesLook.Line && before is { } from)
            {
                Line(from, here, index);
            }
            else
            {
                field.Set(here.X, here.Y, index);
            }

            if (crosses)
            {
                field.Set(here.X - 1, here.Y, index);
                field.Set(here.X + 1, here.Y, index);
                field.Set(here.X, here.Y - 1, index);
                field.Set(here.X, here.Y + 1, index);
            }

            before = here;
        }
    }

    /// <summary>Draws a mark: every other dot.</summary>
    public void Mark(PlotMark mark)
    {
        if (mark.Vertical)
        {
            for (int y = 0; y < field.Down; y += 2)
            {
                field.Set(Across(mark.Value), y, -1);
            }
        }
        else
        {
            for (int x = 0; x < field.Across; x += 2)
            {
                field.Set(x, Down(mark.Value), -1);
            }
        }
    }

    private int Across(double x) => (int)Math.Round((x - xLow) / (xHigh - xLow) * (field.Across - 1));

    private int Down(double y) => (int)Math.Round((yHigh - y) / (yHigh - yLow) * (field.Down - 1));

    // J. E. Bresenham, IBM Systems Journal 4 (1965) 25.
    private void Line((int X, int Y) from, (int X, int Y) to, int index)
    {
        int dx = Math.Abs(to.X - from.X);
        int dy = -Math.Abs(to.Y - from.Y);
        int stepX = from.X < to.X ? 1 : -1;
        int stepY = from.Y < to.Y ? 1 : -1;
        int error = dx + dy;
        (int x, int y) = from;
        while (true)
        {
            field.Set(x, y, index);
            if (x == to.X && y == to.Y)
            {
                return;
            }

            int twice = 2 * error;
            if (twice >= dy)
            {
                error += dy;
                x += stepX;
            }

            if (twice <= dx)
            {
                error += dx;
                y += stepY;
            }
        }
    }
}
