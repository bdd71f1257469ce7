using System.Diagnostics;

namespace Looseloop.RecordBench;

/// <summary>What one run of the program took.</summary>
/// <param name="ExitCode">Its exit code.</param>
/// <param name="Seconds">From start to end, seconds.</param>
/// <param name="PeakBytes">The most memory that was resident at once.</param>
internal sealed record ProgramRun(int ExitCode, double Seconds, long PeakBytes);

/// <summary>The program as a user starts it, found where its project builds it.</summary>
internal sealed class ProgramUnderTest
{
    private readonly string _file;

    private ProgramUnderTest(string file) => _file = file;

    /// <summary>The program built in the same configuration as this one, or null.</summary>
    public static ProgramUnderTest? Find()
    {
        DirectoryInfo? own = new(AppContext.BaseDirectory);
        string tail = Path.Combine(own.Parent!.Name, own.Name);
        for (DirectoryInfo? folder = own; folder is not null; folder = folder.Parent)
        {
            string file = Path.Combine(folder.FullName, "host", "Looseloop", "bin", tail, "looseloop.dll");
            if (File.Exists(file))
            {
                return new ProgramUnderTest(file);
            }
        }

        return null;
    }

    /// <summary>Runs it to its end; what it prints is thrown away.</summary>
    public ProgramRun Run(params string[] args)
    {
        long begin = Stopwatch.GetTimestamp();
        using Process child = Process.Start(new ProcessStartInfo("dotnet", [_file, .. args]) { RedirectStandardOutput = true, RedirectStandardError = true })!;
        child.OutputDataReceived += (_, _) => { };
        child.ErrorDataReceived += (_, _) => { };
        child.BeginOutputReadLine();
        child.BeginErrorReadLine();
        long peak = 0;
        do
        {
            // The system keeps the peak itself; it only has to be asked for before the process is gone.
            child.Refresh();
            peak = Math.Max(peak, PeakOf(child));
        }
        while (!child.WaitForExit(5));
        double seconds = Stopwatch.GetElapsedTime(begin).TotalSeconds;
        return new ProgramRun(child.ExitCode, seconds, peak);
    }

    private static long PeakOf(Process child)
    {
        try
        {
            return child.HasExited ? 0 : child.PeakWorkingSet64;
        }
        catch (InvalidOperationException)
        {
            return 0;
        }
    }
}
