using System.Globalization;
using MatchedSuite.Storage;
using YamlDotNet.Core;
using YamlDotNet.Core.Events;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the text of a study file into nodes that know their line and column.</summary>
/// <remarks>Built on the parser's events: no reflection, so a command starts fast, and every message can name its place.
/// Anchors, aliases and tags are refused: a study file says each thing once, in plain words.</remarks>
internal sealed class NodeTree
{
    // The deepest key of a study file stands at level 5; the bound keeps a hostile file from exhausting the stack.
    private const int DeepestLevel = 32;

    private readonly Scanner _scanner;
    private readonly Parser _parser;
    private readonly string _file;

    private NodeTree(string text, string file)
    {
        _scanner = new Scanner(new StringReader(text));
        _parser = new Parser(_scanner);
        _file = file;
    }

    /// <summary>The one document of the text.</summary>
    /// <param name="text">Text of the study file.</param>
    /// <param name="file">Name of the file, for messages.</param>
    /// <exception cref="RefusalException">A syntax error, no document or several, a duplicate key.</exception>
    public static MapNode Parse(string text, string file)
    {
        var tree = new NodeTree(text, file);
        try
        {
            return tree.Document();
        }
        catch (YamlException error)
        {
            // Some errors are reported without a place, as if on line 1; the scanner has stopped at the right one.
            Mark mark = error.Start is { Line: 1, Column: 1 } ? tree._scanner.CurrentPosition : error.Start;
            throw tree.Invalid(mark, Plain(error.Message), error);
        }
        catch (InvalidOperationException error)
        {
            // The scanner gives up this way on a bracket that is opened and never closed.
            throw tree.Invalid(tree._scanner.CurrentPosition, "a bracket or quote above is probably not closed", error);
        }
    }

    private RefusalException Invalid(Mark mark, string reason, Exception error) =>
        new(
            KeyPlace.Of(_file, mark.Line, mark.Column, ""),
            $"the text is not valid YAML ({reason})",
            "keys and values, indented with spaces",
            "Check the indentation, quotes and brackets of this line and the one above.",
            error);

    private MapNode Document()
    {
        _parser.Consume<StreamStart>();
        if (_parser.Accept<StreamEnd>(out _))
            throw Empty();
        _parser.Consume<DocumentStart>();
        Node root = Next("", 0);
        _parser.Consume<DocumentEnd>();
        if (!_parser.Accept<StreamEnd>(out _))
        {
            Mark second = _parser.Current!.Start;
            throw Refuse(second.Line, second.Column, "", "a second document begins here", "one document", "Remove the line '---' and what follows it.");
        }

        return root switch
        {
            MapNode map => map,
            ScalarNode { IsNull: true } => throw Empty(),
            _ => throw Refuse(root.Line, root.Column, "", $"the file holds {root.Description}", "the keys 'schema', 'study', 'data' and 'design'"),
        };
    }

    private Node Next(string path, int level)
    {
        if (level > DeepestLevel)
            throw Refuse(_parser.Current!.Start, path, "the values are nested too deeply", $"at most {DeepestLevel} levels");
        if (_parser.TryConsume<AnchorAlias>(out var alias))
            throw Refuse(alias.Start, path, $"the alias '*{alias.Value}' stands here", "the value itself", "Write the value out; a text that begins with * needs quotes.");
        if (!_parser.Accept<NodeEvent>(out var node))
            throw Refuse(_parser.Current!.Start, path, "the text ends too early", "a value");
        if (!node.Anchor.IsEmpty)
            throw Refuse(node.Start, path, $"the anchor '&{node.Anchor.Value}' stands here", "the value itself", "Remove the anchor; a text that begins with & needs quotes.");
        if (!node.Tag.IsEmpty)
            throw Refuse(node.Start, path, $"the tag '{node.Tag.Value}' stands here", "a value without a tag", "Remove the tag; a text that begins with ! needs quotes.");
        return node switch
        {
            Scalar => OneValue(),
            SequenceStart => List(path, level),
            _ => Map(path, level),
        };
    }

    private ScalarNode OneValue()
    {
        var scalar = _parser.Consume<Scalar>();
        return new ScalarNode(scalar.Value, scalar.Style is not ScalarStyle.Plain, scalar.Start.Line, scalar.Start.Column);
    }

    private ListNode List(string path, int level)
    {
        Mark start = _parser.Consume<SequenceStart>().Start;
        var items = new List<Node>();
        while (!_parser.TryConsume<SequenceEnd>(out _))
            items.Add(Next($"{path}[{items.Count + 1}]", level + 1));
        return new ListNode(items, start.Line, start.Column);
    }

    private MapNode Map(string path, int level)
    {
        Mark start = _parser.Consume<MappingStart>().Start;
        var entries = new List<(ScalarNode Key, Node Value)>();
        var lines = new Dictionary<string, long>();
        while (!_parser.TryConsume<MappingEnd>(out _))
        {
            if (Next(path, level + 1) is not ScalarNode key)
                throw Refuse(start, path, "a list or mapping stands where a key belongs", "a plain key");
            string inner = path.Length == 0 ? key.Text : $"{path}.{key.Text}";
            if (!lines.TryAdd(key.Text, key.Line))
                throw Refuse(key.Line, key.Column, inner, $"the key is written twice, first on line {Number(lines[key.Text])}", "every key once", "Remove one of the two.");
            entries.Add((key, Next(inner, level + 1)));
        }

        return new MapNode(entries, start.Line, start.Column);
    }

    private RefusalException Empty() =>
        new(_file, "the file is empty", "the keys 'schema', 'study', 'data' and 'design'", "docs/study-file.md shows a complete study file.");

    private RefusalException Refuse(Mark mark, string path, string found, string expected, string remedy = "") =>
        Refuse(mark.Line, mark.Column, path, found, expected, remedy);

    private RefusalException Refuse(long line, long column, string path, string found, string expected, string remedy = "") =>
        new(KeyPlace.Of(_file, line, column, path), found, expected, remedy);

    private static string Number(long value) => value.ToString(CultureInfo.InvariantCulture);

    // The parser's own sentence, without its end mark and without the position, which stands in front already.
    private static string Plain(string message)
    {
        int colon = message.StartsWith('(') ? message.IndexOf("): ", StringComparison.Ordinal) : -1;
        string sentence = colon < 0 ? message : message[(colon + 3)..];
        return sentence.TrimEnd('.', ' ');
    }
}
