using Spectre.Console;

namespace MatchedSuite.Cli.Terminal;

/// <summary>A progress bar on standard error, for terminals only.</summary>
internal sealed class ProgressLine : IDisposable
{
    private readonly ManualResetEventSlim _over = new();
    private readonly Thread _painter;
    private volatile Shown _shown = new(0, "reading");

    /// <summary>Starts to paint the bar.</summary>
    public ProgressLine(bool colours)
    {
        IAnsiConsole console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Out = new AnsiConsoleOutput(Console.Error),
            ColorSystem = colours ? ColorSystemSupport.Detect : ColorSystemSupport.NoColors,
        });
        _painter = new Thread(() => Paint(console)) { IsBackground = true };
        _painter.Start();
    }

    /// <summary>Moves the bar.</summary>
    public void Show(double reached, string text) => _shown = new Shown(reached, text);

    /// <summary>Takes the bar away.</summary>
    public void Dispose()
    {
        _over.Set();
        _painter.Join();
        _over.Dispose();
    }

    private void Paint(IAnsiConsole console) =>
        console.Progress()
            .AutoClear(true)
            .Columns(new TaskDescriptionColumn(), new ProgressBarColumn(), new PercentageColumn(), new ElapsedTimeColumn())
            .Start(context =>
            {
                ProgressTask task = context.AddTask("endpoints", maxValue: 1);
                do
                {
                    Shown shown = _shown;
                    task.Value = shown.Reached;
                    task.Description = Markup.Escape(shown.Text);
                }
                while (!_over.Wait(100));
            });

    private sealed record Shown(double Reached, string Text);
}
