using MatchedSuite.Engine.Output;
using MatchedSuite.Engine.Running;
using MatchedSuite.Storage;

namespace MatchedSuite.Cli.Terminal;

/// <summary>Turns every way a command can end into one message and an exit code.</summary>
internal static class FailureReport
{
    /// <summary>Runs <paramref name="work"/>; a failure is reported, never thrown on.</summary>
    public static int Guard(Voice voice, Func<int> work)
    {
        try
        {
            return work();
        }
        catch (RefusalException error)
        {
            return Report(voice, error, ExitCode.Refused);
        }
        catch (GateBrokenException error)
        {
            return Report(voice, error, ExitCode.GateBroken);
        }
        catch (FolderBusyException error)
        {
            return Report(voice, error, ExitCode.Busy);
        }
        catch (IOException error)
        {
            string message = $"{error.Message} Nothing was written; look at the space and the permissions of the disk, then run again.";
            voice.Error(voice.ShowsTraces ? $"{message}\n{error}" : message);
            return ExitCode.Failed;
        }
        catch (OperationCanceledException)
        {
            voice.Error("interrupted; nothing was written");
            return ExitCode.Interrupted;
        }
        catch (Exception error)
        {
            return Report(voice, error, ExitCode.Failed);
        }
    }

    private static int Report(Voice voice, Exception error, int code)
    {
        voice.Error(voice.ShowsTraces ? $"{error.Message}\n{error}" : error.Message);
        return code;
    }
}
