namespace Looseloop.Link.Tests;

/// <summary>A test that needs pseudo-terminals.</summary>
public sealed class LinuxFactAttribute : FactAttribute
{
    public LinuxFactAttribute()
    {
        Skip = PseudoTerminal.IsSupported ? null : "needs Linux pseudo-terminals";
    }
}

/// <summary>Cases that need pseudo-terminals.</summary>
public sealed class LinuxTheoryAttribute : TheoryAttribute
{
    public LinuxTheoryAttribute()
    {
        Skip = PseudoTerminal.IsSupported ? null : "needs Linux pseudo-terminals";
    }
}

/// <summary>A test that root would pass through: permissions do not hold for root.</summary>
public sealed class OrdinaryUserFactAttribute : FactAttribute
{
    public OrdinaryUserFactAttribute()
    {
        if (!OperatingSystem.IsLinux())
        {
            Skip = "needs Linux pseudo-terminals";
        }
        else if (Environment.IsPrivilegedProcess)
        {
            Skip = "running as root, whom no permission stops";
        }
    }
}
