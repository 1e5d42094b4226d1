namespace MatchedSuite.Study.Tests;

/// <summary>Study files that say everything a design can say.</summary>
internal static class StudyTexts
{
    public const string Pairs = """
        schema: 1
        study:
          name: Harbour twins
          question: Do co-twins who work night shifts differ?
          seed: 20260301
        data:
          samples: samples.csv
          sample: sample_id
          values: panel.parquet
          layout: endpoint-rows
          endpoint: marker
          missing: ["", "NA", "-"]
          delimiter: ";"
          decimal: ","
        design:
          kind: pairs
          set: twin_pair
          subject: participant
          role: {column: shift_work, index: yes, reference: no}
          stratum: zygosity
          replicates: mean
          match-on:
            - {column: age, within: 2}
            - {column: sex, equal: true}
          covariates: [bmi, smoking]
          person-time: years
        endpoints:
          dictionary: endpoints.csv
          include: ["crp*", il6]
          exclude: [crp_old]
          kind: binary
          transform: log2
          below-limit: root2
          scale: sd
        analysis:
          continuous: [paired-t, signed-rank]
          binary: [mcnemar-exact]
          ordinal: [signed-rank]
          count: [paired-poisson]
          sides: greater
          confidence: 0.9
          adjust: [holm, bh]
          family: by-family
          alpha: 0.01
          fdr: 0.1
          resamples: 999
          minimum-sets: 5
          zeros: pratt
          intervals: [fcr, simultaneous]
          sensitivity: {gamma: true, e-value: true, influence: false}
          equivalence: {margin: 0.1}
        gates:
          unmatched-at-most: 5%
          tolerance: drop
          missing-at-most: 0.5
        output:
          folder: results
          overwrite: refuse
          report: false
          top: 10
          identifiers: shown
        """;

    public const string Sets = """
        schema: 1
        study: {name: Cases and controls}
        data: {samples: samples.csv}
        design:
          kind: sets
          set: risk_set
          role: {column: status, index: case, reference: control}
          reuse: allowed
        """;

    public const string Visits = """
        schema: 1
        study: {name: Visits}
        data: {samples: samples.csv, sample: id, values: long.csv, layout: long, endpoint: marker, value: result}
        design:
          kind: visits
          subject: participant
          visit:
            column: visit
            order: [baseline, month6, year1]
            reference: baseline
            window: {column: day, limits: [{visit: month6, from: 150, to: 210}]}
          contrasts: [each-vs-reference, omnibus]
        analysis:
          continuous: [paired-t, mixed-model]
          across: contrasts
        """;

    public const string ChangeByArm = """
        schema: 1
        study: {name: Arms}
        data: {samples: samples.csv}
        design:
          kind: change-by-arm
          subject: participant
          visit: {column: visit, order: [before, after]}
          arm: {column: arm, index: active, reference: placebo}
        """;

    public const string Crossover = """
        schema: 1
        study: {name: Crossover}
        data: {samples: samples.csv}
        design:
          kind: crossover
          subject: participant
          period: {column: period, order: [1, 2]}
          treatment: {column: treatment, index: A, reference: B}
        """;

    public const string Exposure = """
        schema: 1
        study: {name: Measured exposure}
        data: {samples: samples.csv}
        design:
          kind: pairs
          set: pair
          exposure: {column: hours}
        """;

    /// <summary>A study text with one passage changed, which must occur exactly once.</summary>
    public static string With(this string text, string passage, string replacement)
    {
        Assert.Equal(2, text.Split(passage).Length);
        return text.Replace(passage, replacement, StringComparison.Ordinal);
    }
}
