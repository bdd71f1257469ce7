using System.Reflection;

namespace Looseloop;

/// <summary>This program's version.</summary>
internal static class AppVersion
{
    public static string Text { get; } =
        typeof(AppVersion).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "0";
}
