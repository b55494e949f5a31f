using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>What a scan found, in words: alike on the terminal, in pictures and on the page.</summary>
internal static class ScanWords
{
    private const int MostStretches = 3;

    /// <summary>One place: <c>Rsn = 62.4 Ω</c>, <c>Kmain closes at 3.2 ms</c>.</summary>
    public static string Place(ScanAxis axis, double value) => axis.Varied.Kind == VariedKind.EventTime
        ? $"{axis.Varied.Name} at {axis.Say(value)}"
        : $"{axis.Varied.Name} = {axis.Say(value)}";

    /// <summary>A place of all scanned values.</summary>
    public static string Place(ImmutableArray<ScanAxis> axes, ImmutableArray<double> at) =>
        string.Join(", ", axes.Select((axis, i) => Place(axis, at[i])));

    /// <summary>What is scanned: <c>Rsn</c>, <c>Kmain closing</c>.</summary>
    public static string Subject(ScanAxis axis) => axis.Varied.Kind == VariedKind.EventTime
        ? axis.Varied.Name.EndsWith(" closes", StringComparison.Ordinal)
            ? axis.Varied.Name[..^" closes".Length] + " closing"
            : axis.Varied.Name[..^" opens".Length] + " opening"
        : axis.Varied.Name;

    /// <summary>The whole scan: <c>Rsn from 10 Ω to 1 kΩ, 51 points</c>.</summary>
    public static string Range(ScanResult result) => string.Join(" over ", result.Axes.Select(axis =>
        $"{Subject(axis)} from {axis.Say(axis.From)} to {axis.Say(axis.To)}"));

    /// <summary>Over which stretches something holds.</summary>
    /// <param name="axis">The scanned value.</param>
    /// <param name="holding">The stretches.</param>
    /// <param name="hasGaps">Whether some points have no solution, so that not all else breaks.</param>
    public static string Holding(ScanAxis axis, ImmutableArray<ScanStretch> holding, bool hasGaps)
    {
        if (holding.IsEmpty)
        {
            return hasGaps ? "broken wherever there is a solution" : "broken throughout";
        }

        if (hasGaps)
        {
            return $"holds only {Stretches(axis, holding)}";
        }

        var (first, last) = (holding[0], holding[^1]);
        return (holding.Length, first.From == axis.From, last.To == axis.To) switch
        {
            (1, true, true) => "holds throughout",
            (1, true, false) => $"holds up to {axis.Say(last.To)}, breaks beyond",
            (1, false, true) => $"breaks below {axis.Say(first.From)}, holds from there on",
            _ => $"holds only {Stretches(axis, holding)}",
        };
    }

    /// <summary>Stretches of a scanned value: <c>from 10 Ω to 62.4 Ω and from 80 Ω to 1 kΩ</c>.</summary>
    public static string Stretches(ScanAxis axis, ImmutableArray<ScanStretch> stretches)
    {
        var shown = stretches.Take(MostStretches).Select(s => s.From == s.To
            ? $"at {axis.Say(s.From)}"
            : $"from {axis.Say(s.From)} to {axis.Say(s.To)}");
        var more = stretches.Length > MostStretches
            ? $" and {stretches.Length - MostStretches} more stretches"
            : "";
        return string.Join(" and ", shown) + more;
    }

    /// <summary>How an extreme was found.</summary>
    public static string How(RangeExtremeKind how) => how switch
    {
        RangeExtremeKind.Smooth => "slope zero",
        RangeExtremeKind.Kink => "a kink: another crest takes over",
        RangeExtremeKind.End => "end of the range",
        RangeExtremeKind.Jump => "beside a jump",
        RangeExtremeKind.Compared => "values compared",
        RangeExtremeKind.Flat => "the same throughout",
        _ => throw new System.Diagnostics.UnreachableException($"no words for {how}"),
    };

    /// <summary>A figure's value: a rating's in per cent, else in its unit.</summary>
    public static string Value(StudyFigure figure, double? value) => figure.Kind == StudyFigureKind.RatingUsed
        ? value is { } used && double.IsFinite(used) ? ReportWords.Percent(used) : "without limit"
        : value is { } number
            ? double.IsFinite(number) ? EngineeringNumber.Format(number, figure.Unit) : "without limit"
            : "none";

    /// <summary>What a judged figure is about: the requirement's statement, or the part and its
    /// rating.</summary>
    public static string Statement(Circuit circuit, StudyFigure figure)
    {
        if (figure.Kind == StudyFigureKind.Margin)
        {
            var requirement = circuit.Requirements[figure.Index];
            var because = requirement.Reason is { } reason ? $" because \"{reason}\"" : "";
            return $"{requirement.Statement}{because}";
        }

        return figure.Name;
    }

    /// <summary>The margin or use at a place in words: <c>41 V to spare</c>, <c>broken by 12 A</c>.</summary>
    public static string Verdict(StudyFigure figure, double value) => (figure.Kind, value) switch
    {
        (StudyFigureKind.RatingUsed, _) => $"{Value(figure, value)} used",
        (_, >= 0) => $"{Value(figure, value)} to spare",
        _ when double.IsFinite(value) => $"broken by {Value(figure, -value)}",
        _ => "broken without limit",
    };

    /// <summary>What a panel shows: <c>greatest current through Ls (at most 200 A from 1.8 s to 6
    /// s)</c>.</summary>
    public static string Title(Circuit circuit, StudyFigure figure)
    {
        if (Reached(circuit, figure) is not { } line)
        {
            return figure.Name;
        }

        var requirement = circuit.Requirements[figure.Index];
        return requirement.Statement.StartsWith(requirement.Name + " ", StringComparison.Ordinal)
            ? $"{line.Name} ({requirement.Statement[(requirement.Name.Length + 1)..]})"
            : line.Name;
    }

    /// <summary>The extreme that a margin speaks of and its limit, where the bound is one-sided or the same
    /// to both sides.</summary>
    public static ReachedLine? Reached(Circuit circuit, StudyFigure figure)
    {
        if (figure.Kind != StudyFigureKind.Margin)
        {
            return null;
        }

        var requirement = circuit.Requirements[figure.Index];
        return requirement.Bound switch
        {
            Limits { Lower: null, Upper: { } upper } =>
                new($"greatest {requirement.Name}", requirement.Unit, upper, -1, "at most"),
            Limits { Lower: { } lower, Upper: null } =>
                new($"least {requirement.Name}", requirement.Unit, lower, 1, "at least"),
            Limits { Lower: { } low, Upper: { } high } when low == -high =>
                new($"greatest magnitude of {requirement.Name}", requirement.Unit, high, -1, "at most"),
            _ => null,
        };
    }
}

/// <summary>How a reached value follows from a margin.</summary>
/// <param name="Name">What is reached.</param>
/// <param name="Limit">What the requirement allows.</param>
/// <param name="Sign">−1 where the margin is the limit less the value, else 1.</param>
/// <param name="Bound">The requirement's word: <c>at most</c>.</param>
internal sealed record ReachedLine(string Name, string Unit, double Limit, int Sign, string Bound)
{
    private const double Rounding = 1e-13; // of the limit: what the difference of two such leaves of zero

    /// <summary>The value reached with a margin.</summary>
    public double Of(double margin)
    {
        var reached = Limit + (Sign * margin);
        return Math.Abs(reached) <= Rounding * Math.Abs(Limit) ? 0 : reached;
    }
}
