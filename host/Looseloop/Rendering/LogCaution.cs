using Looseloop.Terminal;

namespace Looseloop.Rendering;

/// <summary>What must be said, and agreed to, before a log may stand beside a coil that will be energised.</summary>
internal static class LogCaution
{
    private static readonly string[] _sentences =
    [
        "Between runs: this log goes on while the coil is energised now and then.",
        "Before each time it is energised, loop, pickup, box and this computer are taken away, or are rated for the field they stand in.",
        "While a field is present the box does not drive. It reads on when the pickup has been silent for the lock-out's time.",
        "A silent pickup is no proof that a coil is dead: driver off and locked out, tank discharged and shorted, before anybody goes near.",
    ];

    /// <summary>Says it, and asks where a person can answer; without one it is only said.</summary>
    public static bool Accepted(Shell shell, bool quiet)
    {
        foreach (string sentence in _sentences)
        {
            shell.Say(sentence);
        }

        if (quiet || !shell.InIsTerminal || !shell.ErrorIsTerminal)
        {
            return true;
        }

        shell.ErrorText.Write("Is that seen to? yes/no: ");
        string? answer = shell.InText.ReadLine();
        return answer is not null && answer.Trim().Equals("yes", StringComparison.OrdinalIgnoreCase);
    }
}
