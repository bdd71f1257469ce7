namespace Looseloop.Coil;

/// <summary>One thing wrong in a coil file.</summary>
/// <param name="Line">Counted from 1.</param>
/// <param name="Text">What is wrong and what to do.</param>
public sealed record CoilFileError(int Line, string Text)
{
    /// <inheritdoc/>
    public override string ToString() => FormattableString.Invariant($"line {Line}: {Text}");
}
