using System.Runtime.InteropServices;

namespace Looseloop.Boxes;

/// <summary>Whether the host's own clock is disciplined, as the kernel has it (adjtimex(2), Linux).</summary>
/// <param name="IsDisciplined">True if the kernel says that it is synchronised.</param>
/// <param name="Detail">What it says, in a sentence.</param>
internal sealed record KernelClock(bool IsDisciplined, string Detail)
{
    private const int TimeError = 5;
    private const int StatusUnsynchronised = 0x40;

    /// <summary>Larger than struct timex on every Linux that .NET runs on.</summary>
    private const int TimexBytes = 512;

    /// <summary>Asks. Reads only; needs no privilege.</summary>
    public static KernelClock Ask()
    {
        if (!OperatingSystem.IsLinux())
        {
            return new KernelClock(false, "This system does not tell whether its clock is disciplined.");
        }

        // modes (int), then offset, freq, maxerror, esterror (long), then status (int): the C type long has the size of a pointer.
        byte[] timex = new byte[TimexBytes];
        int state = AdjTimeX(timex);
        if (state < 0)
        {
            return new KernelClock(false, "The kernel would not tell whether its clock is disciplined.");
        }

        int status = BitConverter.ToInt32(timex, 5 * IntPtr.Size);
        double maxErrorS = (IntPtr.Size == 8 ? BitConverter.ToInt64(timex, 3 * 8) : BitConverter.ToInt32(timex, 3 * 4)) * 1e-6;
        bool disciplined = state != TimeError && (status & StatusUnsynchronised) == 0;
        return new KernelClock(disciplined, disciplined
            ? FormattableString.Invariant($"The kernel's clock is synchronised (off by {maxErrorS * 1000:0} ms at most).")
            : "The kernel says that its clock is not synchronised.");
    }

    [DllImport("libc", EntryPoint = "adjtimex")]
    private static extern int AdjTimeX([In, Out] byte[] timex);
}
