using Looseloop.Report.Plots;
using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>Plots that a user asked for as a file.</summary>
internal static class PlotOutput
{
    /// <summary>Writes a picture, or says what kinds there are.</summary>
    public static void Save(Shell shell, string path, PlotSheet sheet)
    {
        if (Path.GetExtension(path).ToLowerInvariant() is not (".png" or ".svg"))
        {
            throw new UserError($"A plot is a .png or a .svg file, not {path}.");
        }

        PlotPicture.Save(sheet, path);
        shell.Say($"The plot is in {path}.");
    }
}
