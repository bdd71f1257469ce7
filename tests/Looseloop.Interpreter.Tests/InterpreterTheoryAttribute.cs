namespace Looseloop.Interpreter.Tests;

/// <summary>A test that needs the boards' interpreter, which is not part of the project.</summary>
[AttributeUsage(AttributeTargets.Method)]
internal sealed class InterpreterTheoryAttribute : TheoryAttribute
{
    private readonly bool _compilesPlant;

    public InterpreterTheoryAttribute()
    {
        if (!OperatingSystem.IsLinux() || !Directory.Exists(InterpretedBoard.Folder))
        {
            Skip = "the boards' interpreter for Linux is not there: it is looked for in " + InterpretedBoard.Folder
                + "; the same firmware is tested on the virtual board and by the metadata gate";
        }
    }

    /// <summary>True if the test brings a circuit of its own, which takes a C compiler.</summary>
    public bool CompilesPlant
    {
        get => _compilesPlant;
        init
        {
            _compilesPlant = value;
            if (value && Skip is null && !Plant.CompiledPlant.IsPossible)
            {
                Skip = "there is no C compiler (cc) for the test's own circuit";
            }
        }
    }
}
