using CircuitTransient.Syntax;

namespace CircuitTransient.Studies.Scans;

/// <summary>What a scan's words mean as the target of a study.</summary>
internal static class ScanTargets
{
    /// <summary>The target.</summary>
    public static StudyTarget Of(ScannedSyntax scanned) => Target(scanned) with
    {
        Written = scanned.Source,
        Span = scanned.NameSpan,
    };

    /// <summary>Whether two are the same value.</summary>
    public static bool AreAlike(ScannedSyntax one, ScannedSyntax other) => Target(one) == Target(other);

    private static StudyTarget Target(ScannedSyntax scanned) => scanned.Kind switch
    {
        ScannedKind.Value => new NamedValueTarget(scanned.Name),
        ScannedKind.Part => new PartValueTarget(scanned.Name),
        ScannedKind.Phase => new SourcePhaseTarget(scanned.Name),
        ScannedKind.Event => new EventTimeTarget(scanned.Name, scanned.Closes),
        _ => throw new System.Diagnostics.UnreachableException($"no target for {scanned.Kind}"),
    };
}
