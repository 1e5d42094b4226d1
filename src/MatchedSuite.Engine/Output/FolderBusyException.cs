namespace MatchedSuite.Engine.Output;

/// <summary>Another run holds the output folder; the program ends with exit code 4.</summary>
public sealed class FolderBusyException(string folder, Exception cause)
    : Exception($"{folder}: another run holds this output folder. Wait until it ends, or choose another folder.", cause);
