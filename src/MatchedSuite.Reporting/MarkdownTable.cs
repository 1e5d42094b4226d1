using System.Text;

namespace MatchedSuite.Reporting;

/// <summary>A table as Markdown; cells may hold any text.</summary>
internal sealed class MarkdownTable
{
    private readonly StringBuilder _text = new();

    /// <summary>A table with its header; a heading that begins with <c>&gt;</c> stands over a column of numbers.</summary>
    public MarkdownTable(params string[] headings)
    {
        Row([.. headings.Select(heading => heading.TrimStart('>'))]);
        _text.Append('|').AppendJoin('|', headings.Select(heading => heading.StartsWith('>') ? " ---: " : " --- ")).Append("|\n");
    }

    /// <summary>Adds a row.</summary>
    public MarkdownTable Row(params string[] cells)
    {
        _text.Append("| ").AppendJoin(" | ", cells.Select(Cell)).Append(" |\n");
        return this;
    }

    /// <inheritdoc/>
    public override string ToString() => _text.ToString();

    // A bar or a line end inside a cell would break the row.
    private static string Cell(string text) =>
        text.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("|", "\\|", StringComparison.Ordinal).ReplaceLineEndings(" ");
}
