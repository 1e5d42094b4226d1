using System.Globalization;
using System.Runtime.InteropServices;
using System.Text.Json;

namespace MatchedSuite.Engine.Output;

/// <summary>How a run went on one machine: the only part of the manifest that differs from run to run.</summary>
internal sealed class ExecutionRecord(int threads, long memory)
{
    private readonly long _start = Environment.TickCount64;
    private readonly DateTime _started = DateTime.UtcNow;
    private readonly List<(string Step, long Milliseconds)> _steps = [];
    private long _last = Environment.TickCount64;

    /// <summary>Time that the threads together spent on testing endpoints, reading not counted.</summary>
    public TimeSpan Evaluation { get; set; }

    /// <summary>A step is over; its time counts from the end of the one before.</summary>
    public void StepDone(string step)
    {
        long now = Environment.TickCount64;
        _steps.Add((step, now - _last));
        _last = now;
    }

    /// <summary>Writes the section.</summary>
    public void Write(Utf8JsonWriter json)
    {
        json.WriteStartObject("execution");
        json.WriteString("host", Environment.MachineName);
        json.WriteString("system", RuntimeInformation.OSDescription);
        json.WriteString("runtime", RuntimeInformation.FrameworkDescription);
        json.WriteNumber("threads", threads);
        json.WriteNumber("memory_bytes", memory);
        json.WriteString("started", _started.ToString("O", CultureInfo.InvariantCulture));
        json.WriteNumber("milliseconds", Environment.TickCount64 - _start);
        json.WriteNumber("evaluation_thread_milliseconds", (long)Evaluation.TotalMilliseconds);
        json.WriteStartObject("steps_milliseconds");
        foreach (var (step, milliseconds) in _steps)
            json.WriteNumber(step, milliseconds);
        json.WriteEndObject();
        json.WriteEndObject();
    }
}
