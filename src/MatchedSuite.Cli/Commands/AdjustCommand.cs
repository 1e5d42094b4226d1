using System.CommandLine;
using System.Globalization;
using MatchedSuite.Cli.Terminal;
using MatchedSuite.Engine.Tables;

namespace MatchedSuite.Cli.Commands;

/// <summary><c>matched adjust TABLE</c>: adjustment of p-values that come from elsewhere.</summary>
internal static class AdjustCommand
{
    public static Command Create(CommonOptions common)
    {
        var table = new Argument<string>("TABLE") { Description = "table with a column of p-values: CSV, TSV or Parquet" };
        var p = new Option<string>("--p") { Description = "column with the p-values", HelpName = "COLUMN", Required = true };
        var family = new Option<string?>("--family") { Description = "column with families; each is adjusted by itself", HelpName = "COLUMN" };
        var weight = new Option<string?>("--weight") { Description = "column with weights for holm and weighted-bh", HelpName = "COLUMN" };
        var methods = new Option<string[]>("--method")
        {
            Description = "adjustments, separated by commas; default: holm,bh", HelpName = "M[,M...]", AllowMultipleArgumentsPerToken = false,
        };
        Option<double?> level = NumberArguments.Level("--level", "level that adjusted p-values are compared with; default: 0.05");
        var @out = new Option<string?>("--out") { Description = "file for the table with the adjusted columns (.csv, .tsv, .parquet); default: CSV to standard output", HelpName = "FILE" };
        var list = new Option<string?>("--list") { Description = "file with one name a line: print how many of these rows are true discoveries at least", HelpName = "FILE" };
        var name = new Option<string?>("--name") { Description = "column with the names of --list; default: the first column", HelpName = "COLUMN" };
        var command = new Command("adjust", "adjust the p-values of an existing table for their number") { table, p, family, weight, methods, level, @out, list, name };
        command.SetAction(parsed => common.Run(parsed, voice =>
        {
            var usual = new TableAdjustmentOptions { Table = parsed.GetRequiredValue(table), P = parsed.GetRequiredValue(p) };
            TableAdjustmentOptions options = usual with
            {
                Family = parsed.GetValue(family),
                Weight = parsed.GetValue(weight),
                Methods = parsed.GetValue(methods) is { Length: > 0 } written ? Names(written) : usual.Methods,
                Level = parsed.GetValue(level) ?? usual.Level,
                Name = parsed.GetValue(name),
            };
            return Run(options, parsed.GetValue(@out), parsed.GetValue(list), voice);
        }));
        return command;
    }

    private static int Run(TableAdjustmentOptions options, string? file, string? list, Voice voice)
    {
        TableAdjustment adjustment = TableAdjustment.Run(options);
        string? bound = list is null ? null : Bound(adjustment, list, options.Level);
        if (file is not null)
            adjustment.Write(file);
        else if (bound is null)
            voice.Result(adjustment.Write);
        if (bound is not null)
            voice.Result(bound);
        foreach (var (method, rejected) in adjustment.Findings)
            voice.Note(string.Create(CultureInfo.InvariantCulture, $"{method} finds {rejected:N0} of {adjustment.Tested:N0} at level {options.Level}"));
        if (adjustment.Tested < adjustment.Rows)
            voice.Note(string.Create(CultureInfo.InvariantCulture, $"rows without a p-value: {adjustment.Rows - adjustment.Tested:N0}; they do not count"));
        if (file is not null)
            voice.Note($"table in {file}");
        return ExitCode.Done;
    }

    private static string Bound(TableAdjustment adjustment, string list, double level)
    {
        var (discoveries, listed) = adjustment.BoundOf(list);
        return string.Create(CultureInfo.InvariantCulture, $"true discoveries among the {listed:N0} listed: at least {discoveries:N0} (confidence {1 - level:0.####})\n");
    }

    private static string[] Names(string[] written) =>
        [.. written.SelectMany(text => text.Split(',', StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries)).Distinct()];
}
