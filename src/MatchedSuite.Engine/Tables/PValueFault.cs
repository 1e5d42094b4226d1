namespace MatchedSuite.Engine.Tables;

/// <summary>Why a text is no p-value.</summary>
public enum PValueFault
{
    /// <summary>It is one.</summary>
    None,

    /// <summary>It is no finite decimal number.</summary>
    NotANumber,

    /// <summary>It is below 0, by however little.</summary>
    Negative,

    /// <summary>It is above 1.</summary>
    AboveOne,
}
