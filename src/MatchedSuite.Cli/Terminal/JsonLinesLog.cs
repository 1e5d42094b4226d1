using System.Globalization;
using System.Text.Json;

namespace MatchedSuite.Cli.Terminal;

/// <summary>A log of JSON lines: one object a line with time (UTC), level and message.</summary>
internal sealed class JsonLinesLog : IDisposable
{
    private readonly FileStream _file;

    private JsonLinesLog(FileStream file) => _file = file;

    /// <summary>Opens a log to be appended to.</summary>
    /// <exception cref="IOException">The file cannot be opened.</exception>
    public static JsonLinesLog Append(string path) => new(new FileStream(path, FileMode.Append, FileAccess.Write, FileShare.Read));

    /// <summary>Writes one line and hands it to the system at once.</summary>
    public void Write(string level, string message)
    {
        lock (_file)
        {
            using (var json = new Utf8JsonWriter(_file))
            {
                json.WriteStartObject();
                json.WriteString("time", DateTime.UtcNow.ToString("O", CultureInfo.InvariantCulture));
                json.WriteString("level", level);
                json.WriteString("message", message);
                json.WriteEndObject();
            }

            _file.WriteByte((byte)'\n');
            _file.Flush();
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _file.Dispose();
}
