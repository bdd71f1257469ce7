namespace Looseloop.Interpreter.Tests;

/// <summary>A test that needs the boards' interpreter, which is not part of the project.</summary>
[AttributeUsage(AttributeTargets.Method)]
internal sealed class InterpreterTheoryAttribute : TheoryAttribute
{
    public InterpreterTheoryAttribute()
    {
        if (!OperatingSystem.IsLinux() || !Directory.Exists(InterpretedBoard.Folder))
        {
            Skip = "the boards' interpreter for Linux is not there: it is looked for in " + InterpretedBoard.Folder
                + "; the same firmware is tested on the virtual board and by the metadata gate";
        }
    }
}
