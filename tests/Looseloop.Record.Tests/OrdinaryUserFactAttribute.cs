namespace Looseloop.Record.Tests;

/// <summary>A test of permissions: skipped for the superuser and on Windows, where file modes hold nobody back.</summary>
public sealed class OrdinaryUserFactAttribute : FactAttribute
{
    public OrdinaryUserFactAttribute()
    {
        if (OperatingSystem.IsWindows() || Environment.UserName == "root")
        {
            Skip = "file modes do not hold back the superuser; run the tests as an ordinary user on Linux";
        }
    }
}
