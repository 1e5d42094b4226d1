namespace MatchedSuite.Study.Matching;

/// <summary>What became of one row of the sample sheet; every row has exactly one.</summary>
public enum Disposition
{
    /// <summary>In a complete set that is analysed.</summary>
    Used,

    /// <summary>The link column is empty.</summary>
    SetMissing,

    /// <summary>The role (visit, arm) column is empty.</summary>
    RoleMissing,

    /// <summary>The role (visit, arm) is none of those the study names.</summary>
    RoleOfNoInterest,

    /// <summary>The file of measurements has no such sample.</summary>
    NotInValues,

    /// <summary>The person already stands in another set.</summary>
    PersonInTwoSets,

    /// <summary>The subject's samples name two arms.</summary>
    InTwoArms,

    /// <summary>The sample was taken on a day outside the window of its visit.</summary>
    OutsideWindow,

    /// <summary>Another sample, earlier in the sheet, already stands in this place of the set; in matched sets: another of the same person.</summary>
    DuplicatePlace,

    /// <summary>The subject had the same treatment in both periods, or two treatments in one.</summary>
    SequenceUnclear,

    /// <summary>The set lacks the other role; the subject lacks the visit or period it would be compared with.</summary>
    NoPartner,

    /// <summary>The set, in matched sets the reference person, breaks a promise of the matching and such are dropped.</summary>
    OutsideTolerance,

    /// <summary>The set's stratum is empty or its members disagree on it.</summary>
    StratumUnclear,
}
