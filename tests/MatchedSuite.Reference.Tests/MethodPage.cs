using System.Globalization;

namespace MatchedSuite.Reference.Tests;

/// <summary>One page of docs/methods, whose worked example must show what the method computes.</summary>
internal sealed class MethodPage
{
    private readonly string _name;
    private readonly string[] _lines;

    private MethodPage(string name, string[] lines) => (_name, _lines) = (name, lines);

    /// <summary>Reads docs/methods/<paramref name="name"/>.md.</summary>
    public static MethodPage Of(string name) =>
        new(name, File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "docs", "methods", name + ".md")));

    /// <summary>Fails unless the page has the table row "| quantity | value |", the numbers to seven digits.</summary>
    /// <param name="quantity">First cell of the row.</param>
    /// <param name="value">Text of the second cell; numbers in it are written to seven digits.</param>
    public void Shows(string quantity, FormattableString value)
    {
        object?[] digits = [.. value.GetArguments().Select(number => ((double)number!).ToString("G7", CultureInfo.InvariantCulture))];
        string row = $"| {quantity} | {string.Format(CultureInfo.InvariantCulture, value.Format, digits)} |";
        Assert.True(_lines.Contains(row), $"docs/methods/{_name}.md has no row '{row}'.");
    }
}
