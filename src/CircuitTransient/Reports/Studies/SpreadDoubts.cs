using System.Text.Json;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>Parts that are linear up to a limit, and where within the tolerances they pass it.</summary>
internal static class SpreadDoubts
{
    /// <summary>What is to be said beside the verdict and every requirement and rating; null where every part
    /// stays in its range.</summary>
    public static string? Of(SpreadResult spread) => LinearLimits.Doubt([.. Limited(spread)
        .Select(part => part.Nominal with { LinearUpTo = part.Own with { Holds = !part.Passes } })]);

    /// <summary>A sentence for every part that is driven beyond its limit, with the direction of the
    /// error.</summary>
    public static IEnumerable<string> Words(SpreadResult spread)
    {
        foreach (var part in Limited(spread).Where(part => part.Passes))
        {
            var own = part.Own;
            string?[] said =
            [
                Reached(part),
                part.Range.Passed == 0 ? null
                    : part.Range.Passed == part.Range.Corners
                    ? $"passes that at each of the {part.Range.Corners:N0} corners solved"
                    : $"passes that at {part.Range.Passed:N0} of the {part.Range.Corners:N0} corners solved",
                Most(part),
                part.Drawn > 0
                    ? $"passes it in {part.Drawn:N0} of the {spread.Draws!.Draws:N0} draws" : null,
            ];
            var direction = own.Direction is { } words ? $": {words}" : "";
            yield return $"{part.Nominal.Name} is linear up to {Number(own.Declared, own.Unit)} but "
                + $"{string.Join("; ", said.OfType<string>())}{direction}";
        }
    }

    /// <summary>Writes every part that has a limit.</summary>
    public static void Write(Utf8JsonWriter json, SpreadResult spread) =>
        json.Objects("linearUpTo", Limited(spread), part =>
        {
            var own = part.Own;
            json.WriteString("part", part.Nominal.Name);
            json.WriteString("unit", own.Unit);
            json.Number("declared", own.Declared);
            json.Number("nominal", own.Reached);
            json.Number("worst", part.Worst?.Reached);
            json.Number("greatest", part.Range.Used * own.Declared);
            json.WriteNumber("corners", part.Range.Corners);
            json.WriteNumber("cornersPassed", part.Range.Passed);
            json.Number("drawsPassed", part.Drawn);
            json.WriteBoolean("holds", !part.Passes);
            if (own.Direction is { } direction)
            {
                json.WriteString("direction", direction);
            }
        });

    private static string? Reached(LimitedPart part) => (part.Own.Holds, part.Worst?.Holds ?? true) switch
    {
        (true, true) => null,
        (false, true) => $"reaches {Reach(part.Own)} with every value nominal",
        (true, false) => $"reaches {Reach(part.Worst!)} at the worst case",
        _ => $"reaches {Reach(part.Own)} with every value nominal and {Reach(part.Worst!)} at the worst case",
    };

    /// <summary>The most anywhere, where that is more than what has been said.</summary>
    private static string? Most(LimitedPart part)
    {
        var said = Math.Max(part.Own.Reached ?? double.PositiveInfinity, part.Worst?.Reached ?? 0);
        return part.Range.Used * part.Own.Declared is { } most
            && Number(most, part.Own.Unit) != Number(said, part.Own.Unit)
            ? $"reaches {Number(most, part.Own.Unit)} at most" : null;
    }

    private static string Reach(LinearUpToResult linear) => linear.Reached is { } reached
        ? Number(reached, linear.Unit)
        : "no finite value";

    private static IEnumerable<LimitedPart> Limited(SpreadResult spread) =>
        spread.Linear.Select((range, i) => new LimitedPart(
            spread.Nominal.Parts[range.Part], spread.Worst?.Result.Parts[range.Part].LinearUpTo, range,
            spread.Draws is { } draws ? draws.Draws - draws.Unsolvable - draws.Linear[i].Holding : null));

    /// <summary>A part with a limit, and in how many draws it passes it.</summary>
    private sealed record LimitedPart(
        PartResult Nominal, LinearUpToResult? Worst, LinearRange Range, long? Drawn)
    {
        public LinearUpToResult Own => Nominal.LinearUpTo!;

        public bool Passes => !Own.Holds || Worst?.Holds == false || Range.Passed > 0 || !(Range.Used <= 1)
            || Drawn > 0;
    }
}
