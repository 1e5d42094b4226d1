using System.Diagnostics;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Tests.Files;

public sealed class InputFileTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void The_digest_is_that_of_the_standard()
    {
        // FIPS 180-2, appendix B.1: the message "abc".
        var known = FileFingerprint.Of(_folder.Write("abc", "abc"));
        Assert.Equal(new FileFingerprint(3, "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"), known);
        // FIPS 180-2, appendix B.3: one million letters a; longer than any buffer.
        var million = FileFingerprint.Of(_folder.Write("million", new string('a', 1_000_000)));
        Assert.Equal(new FileFingerprint(1_000_000, "cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0"), million);
    }

    [Fact]
    public void A_missing_file_is_refused() =>
        Refused.By(() => FileFingerprint.Of(_folder.File("none")), _folder.File("none"), "there is no such file", "a file to read");

    [Fact]
    public void A_missing_folder_is_refused()
    {
        string path = Path.Combine(_folder.File("none"), "samples.csv");
        Refused.By(() => InputFile.Open(path), path, "there is no such folder", "a file to read");
    }

    [Fact]
    public void A_folder_is_refused() => Refused.By(() => InputFile.Open(_folder.Path), _folder.Path, "this is a folder", "a file");

    [Fact]
    public void An_empty_file_is_refused()
    {
        string path = _folder.Write("empty.csv", "");
        Refused.By(() => InputFile.Open(path), path, "the file is empty", "a header and at least one row");
    }

    [Fact]
    public void A_file_without_read_permission_is_refused()
    {
        string path = _folder.File("secret.csv");
        var refusal = InputFile.Unopened(path, new UnauthorizedAccessException("denied"));
        Assert.Equal((path, "this user may not read it"), (refusal.Where, refusal.Found));
        Assert.Equal($"{path}: this user may not read it. Expected a file with read permission. Ask its owner for access, or change its mode.", refusal.Message);
    }

    [Fact]
    public void A_pipe_is_refused_since_inputs_are_read_more_than_once()
    {
        string path = _folder.File("pipe");
        using (var made = Process.Start("mkfifo", path)) made.WaitForExit();
        // Opening a pipe waits for its other end.
        using var other = new FileStream(path, FileMode.Open, FileAccess.ReadWrite);
        Refused.By(() => InputFile.Open(path), path, "this is a pipe or a device", "a file on disk");
    }
}
