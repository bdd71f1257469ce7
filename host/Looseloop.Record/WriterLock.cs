namespace Looseloop.Record;

/// <summary>
/// Held by the one program that writes to a record: a file beside it, locked by the operating system, which lets go of it
/// when the program ends in whatever way. Readers need none.
/// </summary>
internal sealed class WriterLock : IDisposable
{
    private readonly FileStream _file;

    private WriterLock(FileStream file) => _file = file;

    public static WriterLock Take(string recordPath)
    {
        try
        {
            return new WriterLock(new FileStream(recordPath + ".writer", FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None));
        }
        catch (UnauthorizedAccessException error)
        {
            throw new RecordException(
                RecordProblem.NoPermission,
                $"The folder of the record {recordPath} may not be written. What was saved before is untouched. Check its permissions, or use another file with --record.",
                error);
        }
        catch (IOException error) when (error is DirectoryNotFoundException)
        {
            throw new RecordException(RecordProblem.NotFound, $"The folder of the record {recordPath} does not exist.", error);
        }
        catch (IOException error) when (IsReadOnlyDisk(error))
        {
            throw new RecordException(
                RecordProblem.NoPermission,
                $"The disk of the record {recordPath} is read-only. What was saved before is untouched. Use another file with --record.",
                error);
        }
        catch (IOException error) when (IsDiskFull(error))
        {
            throw new RecordException(
                RecordProblem.DiskFull,
                $"The disk is full: nothing can be saved in {recordPath}. What was saved before is untouched. Make room, and go on.",
                error);
        }
        catch (IOException error)
        {
            throw new RecordException(
                RecordProblem.Busy,
                $"Another program is writing to the record {recordPath}. Nothing was changed. End it, or use another file with --record.",
                error);
        }
    }

    public void Dispose() => _file.Dispose();

    // errno EROFS 30 on Linux; ERROR_WRITE_PROTECT 19 on Windows.
    private static bool IsReadOnlyDisk(IOException error) => (error.HResult & 0xFFFF) == (OperatingSystem.IsWindows() ? 19 : 30);

    // errno ENOSPC 28 on Linux; ERROR_DISK_FULL 112 on Windows.
    private static bool IsDiskFull(IOException error) => (error.HResult & 0xFFFF) == (OperatingSystem.IsWindows() ? 112 : 28);
}
