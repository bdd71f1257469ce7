using ScottPlot;
using SkiaSharp;

namespace Looseloop.Report.Plots;

/// <summary>
/// The font that travels with the program (DejaVu Sans, its licence beside it): a machine without fonts would draw plots
/// without a word on them.
/// </summary>
internal sealed class EmbeddedFont : IFontResolver
{
    public const string Name = "DejaVu Sans";

    private static readonly Lock _once = new();
    private static bool _installed;

    // One typeface for the life of the program: plots share it and must not dispose of it.
    private static readonly Lazy<SKTypeface> _typeface = new(() =>
    {
        using Stream stream = typeof(EmbeddedFont).Assembly.GetManifestResourceStream("DejaVuSans.ttf")!;
        return SKTypeface.FromStream(stream);
    });

    /// <summary>Puts the font before those of the machine; once.</summary>
    public static void Install()
    {
        lock (_once)
        {
            if (!_installed)
            {
                Fonts.FontResolvers.Insert(0, new EmbeddedFont());
                Fonts.Default = Name;
                Fonts.Sans = Name;
                _installed = true;
            }
        }
    }

    public SKTypeface? CreateTypeface(string fontName, FontWeight weight, FontSlant slant, FontSpacing spacing) =>
        fontName == Name ? _typeface.Value : null;

    public SKTypeface? CreateTypeface(string fontName, bool bold, bool italic) => fontName == Name ? _typeface.Value : null;
}
