using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Scans;

/// <summary>How far what is judged is from breaking, as a fraction of what is allowed, so that requirements
/// of different quantities can be compared.</summary>
internal static class ScanRoom
{
    /// <summary>The room at the worst place; null of what is only observed.</summary>
    public static double? Of(Circuit circuit, FigureScan findings)
    {
        if (!findings.IsJudged)
        {
            return null;
        }

        if (findings.Worst is not { } worst)
        {
            return double.NegativeInfinity;
        }

        var room = findings.Figure.Kind == StudyFigureKind.RatingUsed
            ? 1 - worst.Value
            : worst.Value / Allowed(circuit.Requirements[findings.Figure.Index].Bound, worst.Value);
        return !findings.HoldsThroughout && room >= 0 ? double.NegativeInfinity : room;
    }

    private static double Allowed(Bound bound, double margin)
    {
        var allowed = bound switch
        {
            Limits limits => Math.Max(Math.Abs(limits.Lower ?? 0), Math.Abs(limits.Upper ?? 0)),
            SettlesTo settles => Math.Abs(settles.Within * settles.Target),
            _ => 0,
        };
        return allowed > 0 ? allowed : Math.Max(Math.Abs(margin), double.Epsilon);
    }
}
