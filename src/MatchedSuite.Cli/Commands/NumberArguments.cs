using System.CommandLine;
using System.Globalization;

namespace MatchedSuite.Cli.Commands;

/// <summary>Options with numbers, read the same way in every country.</summary>
internal static class NumberArguments
{
    private static readonly (string Suffix, long Factor)[] Sizes =
        [("KiB", 1L << 10), ("MiB", 1L << 20), ("GiB", 1L << 30), ("K", 1L << 10), ("M", 1L << 20), ("G", 1L << 30)];

    /// <summary>A whole number of at least <paramref name="least"/>.</summary>
    public static Option<long?> Whole(string name, string description, string helpName, long least) => new(name)
    {
        Description = description,
        HelpName = helpName,
        CustomParser = result =>
        {
            if (long.TryParse(result.Tokens[0].Value, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out long value) && value >= least)
                return value;
            result.AddError($"{name}: '{result.Tokens[0].Value}' is no whole number of at least {least}.");
            return null;
        },
    };

    /// <summary>A size in bytes: a whole number with an optional unit KiB, MiB, GiB (or K, M, G).</summary>
    public static Option<long?> Size(string name, string description, long least) => new(name)
    {
        Description = description,
        HelpName = "SIZE",
        CustomParser = result =>
        {
            if (TryReadSize(result.Tokens[0].Value, out long bytes) && bytes >= least)
                return bytes;
            result.AddError($"{name}: '{result.Tokens[0].Value}' is no size of at least {least >> 20} MiB, such as 512MiB or 2GiB.");
            return null;
        },
    };

    /// <summary>A level: a number strictly between 0 and 1.</summary>
    public static Option<double?> Level(string name, string description) => new(name)
    {
        Description = description,
        HelpName = "A",
        CustomParser = result =>
        {
            const NumberStyles style = NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;
            if (double.TryParse(result.Tokens[0].Value, style, CultureInfo.InvariantCulture, out double level) && level is > 0 and < 1)
                return level;
            result.AddError($"{name}: '{result.Tokens[0].Value}' is no level above 0 and below 1, such as 0.05.");
            return null;
        },
    };

    private static bool TryReadSize(string text, out long bytes)
    {
        foreach (var (suffix, factor) in Sizes)
        {
            if (text.EndsWith(suffix, StringComparison.OrdinalIgnoreCase))
                return TryScale(text[..^suffix.Length].TrimEnd(), factor, out bytes);
        }

        return TryScale(text, 1, out bytes);
    }

    private static bool TryScale(string digits, long factor, out long bytes)
    {
        bytes = 0;
        if (!long.TryParse(digits, NumberStyles.None, CultureInfo.InvariantCulture, out long count) || count > long.MaxValue / factor)
            return false;
        bytes = count * factor;
        return true;
    }
}
