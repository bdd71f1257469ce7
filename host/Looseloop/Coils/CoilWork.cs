using Looseloop.Coil;
using Looseloop.Terminal;

namespace Looseloop.Coils;

/// <summary>Turns what the computations refuse into a sentence for the user.</summary>
internal static class CoilWork
{
    public static T Run<T>(Func<T> work)
    {
        try
        {
            return work();
        }
        catch (ImpossibleGeometryException error)
        {
            throw new UserError($"The coil cannot be built:{string.Concat(error.Problems.Select(p => $"\n  {p.Path}: {p.Text}"))}");
        }
        catch (ArgumentException error)
        {
            // The runtime adds the parameter's name and value in its own words.
            string text = error.Message.Split(" (Parameter", 2)[0].Split('\n')[0];
            throw new UserError(char.ToUpperInvariant(text[0]) + text[1..] + ".");
        }
    }
}
