using System.CommandLine;
using MatchedSuite.Storage;

namespace MatchedSuite.Cli;

/// <summary>What is wrong with a command line, one sentence each.</summary>
internal static class UsageComplaint
{
    /// <summary>The complaints; a word that no command knows is answered with the nearest one.</summary>
    public static IEnumerable<string> Of(ParseResult parsed)
    {
        if (parsed.UnmatchedTokens.Count == 0)
            return parsed.Errors.Select(error => error.Message);
        string word = parsed.UnmatchedTokens[0];
        Command command = parsed.CommandResult.Command;
        string[] known = [.. command.Subcommands.Select(one => one.Name), .. command.Options.Select(option => option.Name)];
        string nearest = NearestName.Of(word, known) is { } name ? $" Did you mean '{name}'?" : "";
        string where = command is RootCommand ? "" : $" for '{command.Name}'";
        return [$"'{word}' is no command or option{where}.{nearest}"];
    }
}
