using System.Globalization;
using MatchedSuite.Storage;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Single values of a section as texts, numbers, truths and names.</summary>
internal static class ScalarReading
{
    private const string Truth = "true or false";

    /// <summary>A text, trimmed, as written: the number 1 is "1", the truth yes is "yes"; null when the key is not written.</summary>
    public static string? Text(this Section section, string key, string expected)
    {
        if (section.Scalar(key, expected) is not { } scalar)
            return null;
        return NotBlank(section, key, scalar, expected);
    }

    /// <summary>A text that must be written.</summary>
    public static string RequiredText(this Section section, string key, string expected) =>
        section.Text(key, expected) ?? throw section.Absent(key, expected);

    /// <summary>A list of different texts, trimmed; null when the key is not written.</summary>
    public static List<string>? Texts(this Section section, string key, string expected, int fewest = 0)
    {
        if (section.Scalars(key, expected) is not { } scalars)
            return null;
        if (scalars.Count < fewest)
            throw section.Refuse(key, scalars.Count == 0 ? "the list is empty" : "the list has a single entry", expected);
        var texts = new List<string>(scalars.Count);
        foreach (ScalarNode scalar in scalars)
        {
            string text = NotBlank(section, key, scalar, expected);
            if (texts.Contains(text))
                throw section.Refuse(key, scalar, $"'{text}' stands in the list twice", expected, "Remove one of the two.");
            texts.Add(text);
        }

        return texts;
    }

    /// <summary>A finite number; null when the key is not written.</summary>
    public static double? Real(this Section section, string key, Func<double, bool> allowed, string expected)
    {
        if (section.Scalar(key, expected) is not { } scalar)
            return null;
        if (!TryNumber(scalar, out double value) || !allowed(value))
            throw section.Refuse(key, scalar, WrongNumber(scalar), expected);
        return value;
    }

    /// <summary>A whole number within limits; null when the key is not written.</summary>
    public static long? Whole(this Section section, string key, long smallest, long largest)
    {
        string expected = string.Create(CultureInfo.InvariantCulture, $"a whole number from {smallest} to {largest}");
        if (section.Scalar(key, expected) is not { } scalar)
            return null;
        if (!TryWhole(scalar, out long value) || value < smallest || value > largest)
            throw section.Refuse(key, scalar, WrongNumber(scalar), expected);
        return value;
    }

    /// <summary>A share in [0, 1], written as a number or in percent; null when the key is not written.</summary>
    public static double? Share(this Section section, string key)
    {
        const string Expected = "a share from 0 to 1, such as 0.05, or from 0% to 100%, such as 5%";
        if (section.Scalar(key, Expected) is not { } scalar)
            return null;
        bool percent = scalar.Text.EndsWith('%');
        double value = percent ? Percent(scalar.Text) : TryNumber(scalar, out double number) ? number : double.NaN;
        return value is >= 0 and <= 1 ? value : throw section.Refuse(key, scalar, WrongNumber(scalar), Expected);
    }

    /// <summary>True or false; null when the key is not written.</summary>
    public static bool? IsTrue(this Section section, string key) =>
        section.Scalar(key, Truth) switch
        {
            null => null,
            { Quoted: false, Text: "true" or "True" or "TRUE" } => true,
            { Quoted: false, Text: "false" or "False" or "FALSE" } => false,
            var other => throw section.Refuse(key, other, $"{other.Description} stands here", Truth, other.Quoted ? "Write it without quotes." : ""),
        };

    /// <summary>One of the values of an enumeration; null when the key is not written.</summary>
    public static T? Choice<T>(this Section section, string key)
        where T : struct, Enum => section.Named(key, WrittenName.All<T>()) is { } name && WrittenName.TryParse(name, out T value) ? value : null;

    /// <summary>One of the known names; null when the key is not written.</summary>
    public static string? Named(this Section section, string key, IReadOnlyList<string> known)
    {
        string expected = "one of " + Listing.Of(known);
        return section.Scalar(key, expected) is { } scalar ? section.KnownName(key, scalar, known, expected) : null;
    }

    /// <summary>A list of different known names; null when the key is not written.</summary>
    public static List<string>? NamedList(this Section section, string key, IReadOnlyList<string> known)
    {
        string expected = "a list of one or more of " + Listing.Of(known);
        if (section.Texts(key, expected, fewest: 1) is not { } names)
            return null;
        foreach (ScalarNode scalar in section.Scalars(key, expected)!)
            section.KnownName(key, scalar, known, expected);
        return names;
    }

    /// <summary>A list of different values of an enumeration; null when the key is not written.</summary>
    public static IReadOnlyList<T>? Choices<T>(this Section section, string key)
        where T : struct, Enum =>
        section.NamedList(key, WrittenName.All<T>()) is { } names
            ? [.. Enum.GetValues<T>().Where(value => names.Contains(WrittenName.Of(value))).OrderBy(value => names.IndexOf(WrittenName.Of(value)))]
            : null;

    private static string KnownName(this Section section, string key, ScalarNode scalar, IReadOnlyList<string> known, string expected)
    {
        if (known.Contains(scalar.Text))
            return scalar.Text;
        string remedy = NearestName.Of(scalar.Text, known) is { } nearest ? $"Did you mean '{nearest}'?" : "";
        throw section.Refuse(key, scalar, $"'{scalar.Text}' is not known", expected, remedy);
    }

    private static string NotBlank(Section section, string key, ScalarNode scalar, string expected)
    {
        string text = scalar.Text.Trim();
        return text.Length > 0 ? text : throw section.Refuse(key, scalar, "the text is blank", expected);
    }

    private static string WrongNumber(ScalarNode scalar)
    {
        if (scalar.Quoted && !scalar.Text.EndsWith('%'))
            return $"the text '{scalar.Text}' in quotes is no number";
        return TryNumber(scalar, out _) || scalar.Text.EndsWith('%') ? $"{scalar.Text} is not allowed here" : $"'{scalar.Text}' is no number";
    }

    private static bool TryWhole(ScalarNode scalar, out long value)
    {
        value = 0;
        if (scalar.Quoted)
            return false;
        if (long.TryParse(scalar.Text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out value))
            return true;
        if (!TryNumber(scalar, out double number) || number != Math.Floor(number) || Math.Abs(number) > 1L << 53)
            return false;
        value = (long)number;
        return true;
    }

    private static bool TryNumber(ScalarNode scalar, out double value)
    {
        value = double.NaN;
        const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;
        bool digits = scalar.Text.Length > 0 && (char.IsAsciiDigit(scalar.Text[^1]) || scalar.Text[^1] == '.');
        return !scalar.Quoted && digits && double.TryParse(scalar.Text, Style, CultureInfo.InvariantCulture, out value) && double.IsFinite(value);
    }

    // The decimal is divided by 100 in decimal arithmetic, so that 5% and 0.05 are the same double.
    private static double Percent(string text)
    {
        string digits = text[..^1].TrimEnd(' ');
        return decimal.TryParse(digits, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out decimal value) ? (double)(value / 100) : double.NaN;
    }
}
