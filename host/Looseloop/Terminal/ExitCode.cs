namespace Looseloop.Terminal;

/// <summary>What the program's exit tells a script.</summary>
internal static class ExitCode
{
    public const int Ok = 0;

    /// <summary>It failed; the message says how.</summary>
    public const int Failure = 1;

    /// <summary>The command line, or a file given on it, is not right.</summary>
    public const int Usage = 2;

    /// <summary>No box there, no permission, or something that is not a box.</summary>
    public const int NoBox = 3;

    /// <summary>The link was lost in the middle.</summary>
    public const int LinkLost = 4;

    /// <summary>There is a reading, and it is not to be trusted.</summary>
    public const int NotTrustworthy = 5;

    public const int Interrupted = 130;
    public const int Terminated = 143;
}
