using System.Diagnostics;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>The built executable, run as a user runs it.</summary>
internal static class MatchedProgram
{
    private static readonly TimeSpan Patience = TimeSpan.FromMinutes(2);

    /// <summary>Full path of the executable that <c>make build</c> leaves.</summary>
    public static string Executable { get; } = Path.Combine(RepositoryRoot(), "bin", OperatingSystem.IsWindows() ? "matched.exe" : "matched");

    /// <summary>Runs it in a folder and waits for its end.</summary>
    public static Finished Run(string folder, params string[] arguments)
    {
        using Process process = Start(folder, arguments);
        return WaitFor(process, arguments);
    }

    /// <summary>Runs the same program on the .NET runtime, compiled while it runs, in a folder and waits for its end.</summary>
    /// <param name="folder">Where it runs.</param>
    /// <param name="setting">A setting of the runtime to switch off, such as <c>EnableAVX2</c>; null for none.</param>
    /// <param name="arguments">The command line.</param>
    public static Finished RunOnRuntime(string folder, string? setting, params string[] arguments)
    {
        var start = StartOf("dotnet", folder, ["exec", Path.Combine(AppContext.BaseDirectory, "matched.dll"), .. arguments]);
        if (setting is not null)
            start.Environment[$"DOTNET_{setting}"] = "0";
        using Process process = Process.Start(start)!;
        return WaitFor(process, arguments);
    }

    private static Finished WaitFor(Process process, string[] arguments)
    {
        Task<string> output = process.StandardOutput.ReadToEndAsync();
        Task<string> error = process.StandardError.ReadToEndAsync();
        if (!process.WaitForExit(Patience))
        {
            process.Kill(entireProcessTree: true);
            throw new TimeoutException($"matched {string.Join(' ', arguments)} did not end within {Patience}.");
        }

        return new Finished(process.ExitCode, output.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }

    /// <summary>Starts it and leaves it running.</summary>
    public static Process Start(string folder, params string[] arguments)
    {
        Assert.True(File.Exists(Executable), $"{Executable} is not there; run 'make build' first.");
        return Process.Start(StartOf(Executable, folder, arguments))!;
    }

    private static ProcessStartInfo StartOf(string program, string folder, string[] arguments) => new(program, arguments)
    {
        WorkingDirectory = folder,
        RedirectStandardOutput = true,
        RedirectStandardError = true,
    };

    private static string RepositoryRoot()
    {
        for (DirectoryInfo? folder = new(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (File.Exists(Path.Combine(folder.FullName, "MatchedSuite.sln")))
                return folder.FullName;
        }

        throw new InvalidOperationException("The tests run outside the repository.");
    }
}

/// <summary>How a run of the program ended.</summary>
internal sealed record Finished(int ExitCode, string Output, string Error);
