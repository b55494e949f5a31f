using System.Text.Json;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>Parts that are linear up to a limit, and what they reach nominal and at the worst case.</summary>
internal static class SpreadDoubts
{
    /// <summary>What is to be said beside the verdict and every requirement and rating; null where every part
    /// stays in its range.</summary>
    public static string? Of(SpreadResult spread) => LinearLimits.Doubt([.. Limited(spread)
        .Select(pair => pair.Nominal.LinearUpTo!.Holds && pair.Worst is { } worst ? worst : pair.Nominal)]);

    /// <summary>A sentence for every part that is driven beyond its limit, with the direction of the
    /// error.</summary>
    public static IEnumerable<string> Words(SpreadResult spread)
    {
        foreach (var (nominal, worst) in Limited(spread))
        {
            var (own, there) = (nominal.LinearUpTo!, worst?.LinearUpTo);
            var direction = own.Direction is { } words ? $": {words}" : "";
            var reached = (own.Holds, there?.Holds ?? true) switch
            {
                (true, true) => "",
                (false, true) => $"{Reach(own)} with every value nominal",
                (true, false) => $"{Reach(there!)} at the worst case",
                _ => $"{Reach(own)} with every value nominal and {Reach(there!)} at the worst case",
            };
            if (reached.Length > 0)
            {
                yield return $"{nominal.Name} is linear up to {Number(own.Declared, own.Unit)} but reaches "
                    + $"{reached}{direction}";
            }
        }
    }

    /// <summary>Writes every part that has a limit.</summary>
    public static void Write(Utf8JsonWriter json, SpreadResult spread) =>
        json.Objects("linearUpTo", Limited(spread), pair =>
        {
            var (own, there) = (pair.Nominal.LinearUpTo!, pair.Worst?.LinearUpTo);
            json.WriteString("part", pair.Nominal.Name);
            json.WriteString("unit", own.Unit);
            json.Number("declared", own.Declared);
            json.Number("nominal", own.Reached);
            json.Number("worst", there?.Reached);
            json.WriteBoolean("holds", own.Holds && there?.Holds != false);
            if (own.Direction is { } direction)
            {
                json.WriteString("direction", direction);
            }
        });

    private static string Reach(LinearUpToResult linear) => linear.Reached is { } reached
        ? Number(reached, linear.Unit)
        : "no finite value";

    private static IEnumerable<(PartResult Nominal, PartResult? Worst)> Limited(SpreadResult spread) =>
        from part in spread.Nominal.Parts
        where part.LinearUpTo is not null
        select (part, spread.Worst?.Result.Parts.FirstOrDefault(p => p.Name == part.Name));
}
