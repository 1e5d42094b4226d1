using System.Globalization;
using System.Text;
using MatchedSuite.Engine.Running;

namespace MatchedSuite.Cli.Terminal;

/// <summary>How the program speaks: results to standard output, everything else to standard error and the log.</summary>
internal sealed class Voice : IRunObserver, IDisposable
{
    private readonly Loudness _loudness;
    private readonly bool _colours;
    private readonly JsonLinesLog? _log;
    private ProgressLine? _progress;

    private Voice(Loudness loudness, bool colours, JsonLinesLog? log)
    {
        _loudness = loudness;
        _colours = colours && !Console.IsErrorRedirected && Environment.GetEnvironmentVariable("NO_COLOR") is null or "";
        _log = log;
    }

    /// <summary>True where stack traces may be shown.</summary>
    public bool ShowsTraces => _loudness == Loudness.Verbose;

    /// <summary>True where nothing but errors is printed.</summary>
    public bool IsQuiet => _loudness == Loudness.Quiet;

    /// <summary>Opens a voice; the log, if any, is appended to.</summary>
    public static Voice Open(Loudness loudness, string? logPath, bool colours) =>
        new(loudness, colours, logPath is null ? null : JsonLinesLog.Append(logPath));

    /// <inheritdoc/>
    public void Step(string text)
    {
        _log?.Write("step", text);
        if (_loudness == Loudness.Verbose)
            Say(text, colour: null);
    }

    /// <inheritdoc/>
    public void Note(string text)
    {
        _log?.Write("note", text);
        if (_loudness != Loudness.Quiet)
            Say(text, colour: null);
    }

    /// <inheritdoc/>
    public void Warning(string text)
    {
        _log?.Write("warning", text);
        if (_loudness != Loudness.Quiet)
            Say($"warning: {text}", ConsoleColor.Yellow);
    }

    /// <inheritdoc/>
    public void Progress(double reached, int endpoints)
    {
        if (_loudness == Loudness.Quiet || Console.IsErrorRedirected)
            return;
        _progress ??= new ProgressLine(_colours);
        _progress.Show(reached, string.Create(CultureInfo.InvariantCulture, $"{endpoints:N0} endpoints"));
    }

    /// <inheritdoc/>
    public void ProgressOver()
    {
        _progress?.Dispose();
        _progress = null;
    }

    /// <summary>An error that ends the program.</summary>
    public void Error(string text)
    {
        ProgressOver();
        _log?.Write("error", text);
        Say($"error: {text}", ConsoleColor.Red);
    }

    /// <summary>A result for standard output.</summary>
    public void Result(string text)
    {
        ProgressOver();
        Console.Out.Write(text);
        Console.Out.Flush();
    }

    /// <summary>A long result for standard output, written as it comes.</summary>
    public void Result(Action<TextWriter> write)
    {
        ProgressOver();
        using var writer = new StreamWriter(Console.OpenStandardOutput(), new UTF8Encoding(false));
        write(writer);
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        ProgressOver();
        _log?.Dispose();
    }

    private void Say(string text, ConsoleColor? colour)
    {
        ProgressOver();
        if (_colours && colour is { } shown)
            Console.ForegroundColor = shown;
        Console.Error.WriteLine($"matched: {text}");
        if (_colours && colour is not null)
            Console.ResetColor();
    }
}
