using System.Text;

namespace MatchedSuite.Storage.Tests;

/// <summary>A folder for the files of one test, deleted with what is in it.</summary>
internal sealed class ScratchFolder : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("storage-tests-").FullName;

    public string File(string name) => System.IO.Path.Combine(Path, name);

    public string Write(string name, string text) => Write(name, Encoding.UTF8.GetBytes(text));

    public string Write(string name, byte[] bytes)
    {
        System.IO.File.WriteAllBytes(File(name), bytes);
        return File(name);
    }

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
