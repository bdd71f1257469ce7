namespace Looseloop.Firmware.Tests.Gate;

/// <summary>One thing in an assembly that the boards' runtime would refuse or misunderstand.</summary>
/// <param name="Rule">One of <see cref="Rule"/>.</param>
/// <param name="Place">The type, member or table it stands in.</param>
/// <param name="Detail">What it is.</param>
internal sealed record Finding(string Rule, string Place, string Detail)
{
    public override string ToString() => $"{Place}: {Rule}: {Detail}";
}
