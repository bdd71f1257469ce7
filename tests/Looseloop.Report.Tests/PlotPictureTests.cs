using System.Buffers.Binary;
using System.Xml.Linq;
using Looseloop.Report.Plots;
using SkiaSharp;

namespace Looseloop.Report.Tests;

public class PlotPictureTests
{
    [Fact]
    public void A_PNG_has_the_size_asked_for()
    {
        byte[] png = PlotPicture.Png(Sheets.Curve(), 640, 400);

        // PNG (ISO/IEC 15948) 5.2 and 11.2.2: the signature, then IHDR with width and height.
        Assert.Equal([0x89, 0x50, 0x4E, 0x47, 0x0D, 0x0A, 0x1A, 0x0A], png[..8]);
        Assert.Equal(640, BinaryPrimitives.ReadInt32BigEndian(png.AsSpan(16)));
        Assert.Equal(400, BinaryPrimitives.ReadInt32BigEndian(png.AsSpan(20)));
    }

    [Fact]
    public void Words_are_drawn_with_the_font_that_travels_along()
    {
        // The strip above the plot area holds the title and nothing else: with no font both are blank.
        using SKBitmap with = SKBitmap.Decode(PlotPicture.Png(Sheets.Curve() with { Title = "MMMMMMMM" }, 640, 400));
        using SKBitmap without = SKBitmap.Decode(PlotPicture.Png(Sheets.Curve() with { Title = "." }, 640, 400));
        Assert.True(DarkPixels(with) > DarkPixels(without) + 100);

        static int DarkPixels(SKBitmap picture)
        {
            int dark = 0;
            for (int y = 0; y < 30; y++)
            {
                for (int x = 0; x < picture.Width; x++)
                {
                    dark += picture.GetPixel(x, y).Red < 128 ? 1 : 0;
                }
            }

            return dark;
        }
    }

    [Fact]
    public void An_SVG_is_well_formed()
    {
        XDocument svg = XDocument.Parse(PlotPicture.Svg(Sheets.Drift(), 640, 400));
        Assert.Equal("svg", svg.Root!.Name.LocalName);
    }

    [Fact]
    public void The_ending_of_the_file_says_which_kind()
    {
        DirectoryInfo folder = Directory.CreateTempSubdirectory("looseloop-plot-");
        try
        {
            string png = Path.Combine(folder.FullName, "a.PNG");
            string svg = Path.Combine(folder.FullName, "a.svg");
            PlotPicture.Save(Sheets.Curve(), png);
            PlotPicture.Save(Sheets.Drift(), svg);
            Assert.Equal(0x89, File.ReadAllBytes(png)[0]);
            Assert.Contains("<svg", File.ReadAllText(svg), StringComparison.Ordinal);
            Assert.Throws<ArgumentException>(() => PlotPicture.Save(Sheets.Curve(), Path.Combine(folder.FullName, "a.bmp")));
        }
        finally
        {
            folder.Delete(recursive: true);
        }
    }

    [Fact]
    public void Thinning_keeps_every_excursion()
    {
        double[] x = [.. Enumerable.Range(0, 100_000).Select(i => (double)i)];
        double[] y = new double[x.Length];
        y[12345] = 7;
        y[98765] = -3;
        PlotSeries thin = new PlotSeries("one", x, y, SeriesLook.Points).Thinned(1000);
        Assert.InRange(thin.X.Count, 1000, 2000);
        Assert.Equal(7, thin.Y.Max());
        Assert.Equal(-3, thin.Y.Min());
        Assert.Equal(12345, thin.X[thin.Y.ToList().IndexOf(7)]);
    }
}
