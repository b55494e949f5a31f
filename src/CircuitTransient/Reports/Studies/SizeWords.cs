using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>A sizing in words, alike on the terminal, on the page and in pictures.</summary>
internal static class SizeWords
{
    private const double OnBound = 1e-9; // of the bound: as exact as every figure is

    /// <summary>A part's value: as few digits as a preferred one has, else six.</summary>
    public static string Value(double value, string unit) => Amount.Of(value, unit);

    /// <summary>Values by part: <c>Rsn 560 Ω, Csn 10 µF</c>.</summary>
    public static string Values(SizeResult result, SizePoint point) => string.Join(", ",
        result.Problem.Parts.Select((part, i) => $"{part.Name} {Value(point.Values[i], part.Unit)}"));

    /// <summary>A constraint's margin.</summary>
    public static string Margin(SizeConstraint constraint, double share) => share switch
    {
        double.NegativeInfinity => "broken without limit, or not judged",
        >= 0 and <= OnBound => "on the bound",
        >= 0 => $"{ReportWords.Number(share * constraint.Scale, constraint.Unit)} to spare",
        _ => $"broken by {ReportWords.Number(-share * constraint.Scale, constraint.Unit)}",
    };

    /// <summary>The verdict in one sentence.</summary>
    public static string Verdict(SizeResult result)
    {
        var parts = string.Join(" and ", result.Problem.Parts.Select(part => part.Name));
        if (result.Chosen is { } chosen)
        {
            return result.IsFound
                ? $"{Values(result, chosen)}: everything holds{Confirmed(result)}."
                : $"{Values(result, chosen)} is not confirmed: a self-check of its full solution failed.";
        }

        return result.Conflict is null && result.Exact is { } exact
            ? $"No {result.Request.Series} values of {parts} hold, though {Values(result, exact)} would: " +
                "try a finer series."
            : $"No value of {parts} in the range looked at meets every requirement and rating.";
    }

    /// <summary>What makes the verdict on the proposed values doubtful, a sentence each.</summary>
    public static IEnumerable<string> Doubts(SizeResult result)
    {
        if (result.Chosen is null)
        {
            return [];
        }

        var passed = result.Proposed.Parts.Where(part => part.LinearUpTo is { Holds: false })
            .Select(part => (part.Name, Limit: part.LinearUpTo!))
            .Select(part => $"In doubt: {part.Name} is linear up to "
                + $"{ReportWords.Number(part.Limit.Declared, part.Limit.Unit)} but reaches "
                + $"{ReportWords.Number(part.Limit.Reached, part.Limit.Unit)}: what holds here holds for the "
                + "model.");
        var rising = result.Proposed.Observations.Where(observed => observed.EndsRising)
            .Select(observed => $"In doubt: {observed.Name} still rises at the study's end, "
                + $"{ReportWords.Number(result.Problem.File.Until, "s")}: a later `until` may break what "
                + "holds here.");
        return passed.Concat(rising);
    }

    /// <summary>What is made least or greatest.</summary>
    public static string Aim(SizeResult result) => result.Request.Aim switch
    {
        Extremal { IsGreatest: false } aim => $"least {aim.Of.Content.Trim()}",
        Extremal aim => $"greatest {aim.Of.Content.Trim()}",
        _ => "most room to the nearest bound",
    };

    /// <summary>What a picture shows.</summary>
    public static string PictureTitle(SizeResult result)
    {
        var circuit = result.Problem.File;
        var parts = string.Join(" and ", result.Problem.Parts.Select(part => part.Name));
        var hold = result.Axes.Length == 1 ? "holds" : "hold";
        return $"{circuit.Title ?? circuit.Source.Name}: where {parts} {hold}";
    }

    /// <summary>Whether what is made least or greatest is a figure that the values do not show
    /// themselves.</summary>
    public static bool HasOwnAim(SizeResult result) =>
        result.Problem is { AimSign: not 0, AimPart: < 0 };

    /// <summary>What breaks at the end of a stretch of values.</summary>
    public static string End(SizeResult result, int? constraint) => constraint switch
    {
        null => "the range ends",
        FeasibleInterval.Unsolvable => NoSolution,
        { } index => $"broken is {result.Problem.Constraints[index].Name}",
    };

    /// <summary>What stands in place of a constraint where there is nothing to judge.</summary>
    public const string NoSolution = "there is no unique solution";

    /// <summary>How the circuit does as its file has it.</summary>
    public static string AsItStands(SizeResult result)
    {
        var (point, problem) = (result.AsItStands, result.Problem);
        var tightest = problem.Constraints[Tightest(point)];
        var corners = !HasCorners(result) ? ""
            : result.Account.IsComplete ? " at the corners of its tolerances"
            : " at the corners of its tolerances that were searched";
        var margin = Margin(tightest, point.Worst);
        var values = Values(result, point);
        return !point.IsSolved ? $"As it stands ({values}) the circuit has no unique solution."
            : point.Holds ? $"As it stands ({values}) the circuit holds{corners}, {margin} at the tightest."
            : $"As it stands ({values}) the circuit does not hold{corners}: {tightest.Name}, {margin}.";
    }

    /// <summary>Why nothing holds.</summary>
    public static ImmutableArray<string> Conflict(SizeResult result)
    {
        var constraints = result.Problem.Constraints;
        return result.Conflict switch
        {
            null => [],
            { Alone.IsEmpty: true, Pairs.IsEmpty: true } =>
                ["No two of them exclude each other, but all together do."],
            var conflict =>
            [
                .. conflict.Alone.Select(i => $"Whatever the value, this is broken: {constraints[i].Name}."),
                .. conflict.Pairs.Select(pair => Pair(result, pair)),
            ],
        };
    }

    private static string Pair(SizeResult result, ExcludedPair pair)
    {
        var first = result.Problem.Constraints[pair.First];
        var second = result.Problem.Constraints[pair.Second];
        return $"These exclude each other, each can be held but not both: {first.Name}; and {second.Name}. " +
            $"They come nearest with {Values(result, pair.Nearest)}: the one " +
            $"{Margin(first, pair.Nearest.Shares[pair.First])}, the other " +
            $"{Margin(second, pair.Nearest.Shares[pair.Second])}.";
    }

    /// <summary>The value of what is made least or greatest.</summary>
    public static string AimValue(SizeResult result, SizePoint point) =>
        result.Problem.AimPart >= 0
            ? Value(point.Aim ?? 0, result.Problem.AimUnit!)
            : ReportWords.Number(point.Aim, result.Problem.AimUnit ?? "");

    /// <summary>The constraint with the least room.</summary>
    public static int Tightest(SizePoint point) => point.Shares.IndexOf(point.Worst);

    /// <summary>What was searched, and how.</summary>
    public static ImmutableArray<string> Searched(SizeResult result)
    {
        var words = ImmutableArray.CreateBuilder<string>();
        foreach (var part in result.Problem.Parts)
        {
            var range = $"{Value(part.Lowest, part.Unit)} to {Value(part.Highest, part.Unit)}";
            words.Add($"{part.Name} (now {Value(part.Nominal, part.Unit)}) was sought from {range}"
                + (part.IsRangeStated ? "." : ", the range taken where none is said."));
        }

        words.Add(result.Problem.Parts.Length == 1
            ? $"{result.Points.Length} values were solved exactly; boundaries are bisected to 1e-12. A " +
                "stretch narrower than the scan's step that comes near no bound at a scanned value would " +
                "be missed."
            : $"{result.Points.Length} pairs of values were solved exactly, {result.Axes[0].Length} by " +
                $"{result.Axes[1].Length}; a region smaller than a cell of that grid may be missed.");
        foreach (var (part, i) in result.Problem.Parts.Select((part, i) => (part, i)))
        {
            if (result.Chosen is { } chosen && result.AtEnd(chosen.Values[i], part))
            {
                words.Add($"{part.Name} is proposed at the end of its range: a wider one may do better.");
            }
        }

        if (result.Unsolved > 0)
        {
            words.Add($"{result.Unsolved} of them have no unique solution and count as broken.");
        }

        if (result.Request.WithSpread)
        {
            words.Add(Spread(result));
        }

        return words.ToImmutable();
    }

    private static string Confirmed(SizeResult result) => HasCorners(result)
        ? $"{Held(result)}; confirmed by full solutions with self-checks, nominal and at the worst " +
            $"corner of each ({result.Confirmed.Length})"
        : ", confirmed by a full solution with its self-checks";

    private static string Held(SizeResult result) => result.Account.IsComplete
        ? $", at all {result.Account.Count} corners of the tolerances too"
        : $" where it was searched, not proven: at {result.Account.Count} of the " +
            $"2^{result.Problem.Corners.Toleranced.Length} corners of the tolerances";

    private static bool HasCorners(SizeResult result) =>
        result.Request.WithSpread && !result.Problem.Corners.Toleranced.IsEmpty;

    /// <summary>What is to be said of stretches and of values of any size that were not confirmed at every
    /// corner; empty where they were.</summary>
    public static string Unproven(SizeResult result) =>
        HasCorners(result) && !(result.Account is { IsComplete: true, ConfirmsEnds: true })
        ? " (searched, not proven)"
        : "";

    /// <summary>What is to be said of the preferred values that hold.</summary>
    public static string OfListed(SizeResult result)
    {
        var holding = result.Preferred.Count(point => point.Holds);
        return !HasCorners(result) ? ""
            : result.Account.Listed < holding ? $", the best {result.Account.Listed} at the corners too"
            : result.Account.IsComplete ? ""
            : " (searched, not proven)";
    }

    private static string Spread(SizeResult result)
    {
        var corners = result.Problem.Corners;
        if (corners.Toleranced.IsEmpty)
        {
            return "No value has a tolerance, so there were no corners to look at.";
        }

        var account = result.Account;
        var names = string.Join(", ", corners.Toleranced.Select(result.Problem.NameOf));
        if (result.Chosen is null)
        {
            return account.IsComplete
                ? $"All {account.Count} corners of {names} were solved in the middle of the range, " +
                    $"and the scan looked at the worst of them ({result.Corners.Length})."
                : $"The scan looked at the worst corners of {names} that a search found " +
                    $"({result.Corners.Length}).";
        }

        var scanned = result.Corners.Length == 1
            ? "The scan looked at the one corner that decides"
            : $"The scan looked at the {result.Corners.Length} corners that decide";
        return account.IsComplete
            ? $"{scanned}, the proposed values were solved at all {account.Count} corners of {names}; " +
                "a worst case inside the tolerances, away from every corner, is not excluded."
            : $"{scanned}, the proposed values were solved at {account.Count} of the " +
                $"2^{corners.Toleranced.Length} corners of {names}: where each value's own effect points " +
                "to, random ones, and on from the worst by single exchanges.";
    }
}
