using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>The invented studies, one line each by their kind of design.</summary>
public static class DemoTable
{
    /// <summary>Every demo: its kind of design and how it is written into a folder, which answers the path of its study file.</summary>
    public static IReadOnlyList<(DesignKind Kind, Func<string, string> Write)> All { get; } =
    [
        (DesignKind.Pairs, folder => TwinDemo.Write(folder)),
        (DesignKind.Sets, folder => SetDemo.Write(folder)),
        (DesignKind.Visits, folder => VisitDemo.Write(folder)),
    ];
}
