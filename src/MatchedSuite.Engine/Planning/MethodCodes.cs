namespace MatchedSuite.Engine.Planning;

/// <summary>The methods of a plan, each with the number by which rows name it.</summary>
public sealed class MethodCodes
{
    private readonly List<string> _names = [];

    /// <summary>Names in the order of their codes.</summary>
    public IReadOnlyList<string> Names => _names;

    /// <summary>The code of a method, given at its first mention.</summary>
    public short CodeOf(string name)
    {
        int code = _names.IndexOf(name);
        if (code < 0)
        {
            code = _names.Count;
            _names.Add(name);
        }

        return (short)code;
    }
}
