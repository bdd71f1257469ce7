using Looseloop.Box;
using Looseloop.Link;
using Looseloop.Record;

namespace Looseloop.Terminal;

/// <summary>Turns what can go wrong into a sentence and an exit code. A user never sees a stack trace.</summary>
internal static class Guard
{
    public static int Run(Shell shell, Func<int> work)
    {
        try
        {
            return work();
        }
        catch (OperationCanceledException)
        {
            shell.Say("Interrupted; the drive is off.");
            return shell.InterruptCode();
        }
        catch (UserError error)
        {
            shell.Error(error.Message);
            return error.ExitCode;
        }
        catch (RecordException error)
        {
            shell.Error(error.Message);
            return ExitCode.Failure;
        }
        catch (LinkLostException error)
        {
            shell.Error(error.Message);
            return ExitCode.LinkLost;
        }
        catch (BoxException error)
        {
            shell.Error(error.Message);
            return error switch
            {
                { Trouble: BoxTrouble.NoAnswer or BoxTrouble.OtherProtocol } => ExitCode.NoBox,
                { Trouble: BoxTrouble.FellSilent or BoxTrouble.Restarted } => ExitCode.LinkLost,
                { FieldPresent: true } => ExitCode.NotTrustworthy,
                _ => ExitCode.Failure,
            };
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            shell.Error(error.Message);
            return ExitCode.Failure;
        }
        catch (Exception error) when (error is not OutOfMemoryException)
        {
            shell.Error($"something went wrong inside the program ({error.GetType().Name}: {error.Message}). Nothing that was saved is lost.");
            if (shell.Environment("LOOSELOOP_DEBUG") is not null)
            {
                shell.ErrorText.WriteLine(error);
            }

            return ExitCode.Failure;
        }
    }
}
