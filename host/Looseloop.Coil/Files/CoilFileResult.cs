namespace Looseloop.Coil;

/// <summary>A coil file read: the coil, or everything that is wrong with it.</summary>
/// <param name="Coil">Null where there are errors.</param>
/// <param name="Errors">In the order of the lines; empty where the file is good.</param>
public sealed record CoilFileResult(CoilGeometry? Coil, IReadOnlyList<CoilFileError> Errors);
