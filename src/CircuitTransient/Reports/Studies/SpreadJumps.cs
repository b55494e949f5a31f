using System.Globalization;
using System.Text.Json;
using CircuitTransient.Reports.Html;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>What jumps between neighbouring corners, on the terminal, on the page and in the
/// document.</summary>
internal static class SpreadJumps
{
    private const int MostInSummary = 5;
    private const int MostValuesNamed = 10;

    /// <summary>Where was looked, and how much that took.</summary>
    public static string Account(SpreadResult spread)
    {
        var jumps = spread.Jumps;
        var all = ReportWords.Count(jumps.AllEdges);
        var edges = jumps.Edges != jumps.AllEdges ? $"{jumps.Edges:N0} of the {all} edges"
            : jumps.Edges == 1 ? "the one edge"
            : $"all {jumps.Edges:N0} edges";
        var ofValue = jumps.Jumps.Count(jump => jump.IsOfValue);
        string[] found =
        [
            .. ofValue == 0 ? [] : new[] { $"{SpreadWords.Count(ofValue, "figure")} jump{S(ofValue)}" },
            .. ofValue == jumps.Jumps.Length ? [] : new[] { Instants(jumps.Jumps.Length - ofValue) },
            .. jumps.LeftOut == 0 ? [] : new[] { $"{jumps.LeftOut} more may, which were not looked into" },
        ];
        var what = found.Length == 0 ? "no figure was seen to jump" : string.Join("; ", found);
        return $"Along {edges} between neighbouring corners, at {jumps.PointsOnEdge} points each "
            + $"({SpreadWords.Count(jumps.Solves, "solve")}, {jumps.ExactSolves:N0} of them by the exact "
            + $"engine), {what}.";
    }

    /// <summary>A jump in words: what, as which value passes what, and where the others stand.</summary>
    public static string Words(SpreadResult spread, EdgeJump jump)
    {
        var range = spread.Figures[jump.Figure];
        var name = SpreadWords.Name(spread, range.Figure);
        var value = spread.Varied.Values[jump.Value];
        var place = $"as {value.Name} passes {Number(jump.Place, value.Unit)}"
            + SpreadWords.Off(value, jump.Place) + Others(spread, jump);
        var alike = jump.Alike == 0 ? ""
            : $"; {SpreadWords.Count(jump.Alike, "more edge")} show{S(jump.Alike)} a step alike";
        var times = $"from {Instant(jump.TimeBefore)} to {Instant(jump.TimeAfter)}";
        return jump.IsOfValue
            ? $"{name} jumps from {Reached(spread, range, jump.ValueBefore)} to "
                + $"{Reached(spread, range, jump.ValueAfter)} {place}{alike}"
            : $"{name}: {(jump.Ring is null ? "another extreme" : "another ring crest")} takes over {place}; "
                + $"its instant jumps {times}{Periods(jump.Ring)}, its value, "
                + $"{Reached(spread, range, Level(range, jump))}, has only a kink there{alike}";
    }

    /// <summary>The jumps of figures and ring crests that take over, on the terminal.</summary>
    public static void Write(SummaryText text, SpreadResult spread)
    {
        var jumps = Apart(spread);
        var told = jumps.Where(jump => jump.IsOfValue || jump.Ring is not null).Take(MostInSummary).ToArray();
        if (told.Length == 0)
        {
            return;
        }

        text.Heading("Jumps between neighbouring corners");
        foreach (var jump in told)
        {
            text.Paragraph(Words(spread, jump), hanging: 2);
        }

        if (told.Length < jumps.Length)
        {
            text.Paragraph($"and {jumps.Length - told.Length} more, in spread.json");
        }
    }

    /// <summary>The jumps, one of a required figure and the same of the figure itself as one.</summary>
    private static EdgeJump[] Apart(SpreadResult spread) =>
    [
        .. spread.Jumps.Jumps.DistinctBy(jump =>
        {
            var range = spread.Figures[jump.Figure];
            var value = spread.Varied.Values[jump.Value];
            return (SpreadWords.Measured(spread, range), jump.IsOfValue, jump.Value,
                Number(jump.Place, value.Unit) + Others(spread, jump),
                Reached(spread, range, jump.ValueBefore), Reached(spread, range, jump.ValueAfter));
        }),
    ];

    /// <summary>The jumps on the page.</summary>
    public static Markup Section(SpreadResult spread)
    {
        var jumps = spread.Jumps;
        var items = Apart(spread).Select(jump => Markup.Of($"<li>{Markup.Name(Words(spread, jump))}</li>\n"));
        return jumps.Jumps.IsEmpty ? default : Markup.Of($"""
            <h3>Jumps between neighbouring corners</h3>
            <ul>
            {Markup.Join(items)}</ul>

            """);
    }

    /// <summary>Everything about them.</summary>
    public static void Write(Utf8JsonWriter json, SpreadResult spread) => json.Object("jumps", () =>
    {
        var jumps = spread.Jumps;
        json.WriteNumber("edges", jumps.Edges);
        json.Number("allEdges", jumps.AllEdges);
        json.WriteNumber("pointsOnEdge", jumps.PointsOnEdge);
        json.WriteNumber("solves", jumps.Solves);
        json.WriteNumber("exactSolves", jumps.ExactSolves);
        json.WriteNumber("leftOut", jumps.LeftOut);
        json.WriteString("words", Account(spread));
        json.Objects("found", jumps.Jumps, jump => WriteJump(json, spread, jump));
    });

    private static void WriteJump(Utf8JsonWriter json, SpreadResult spread, EdgeJump jump)
    {
        json.WriteString("figure", spread.Figures[jump.Figure].Figure.Name);
        json.WriteString("of", jump.IsOfValue ? "value" : "time");
        json.WriteString("along", spread.Varied.Values[jump.Value].Name);
        json.Number("at", jump.Place);
        json.Number("within", jump.Bracket);
        json.WritePropertyName("corner");
        SpreadJson.WriteNumbers(json, jump.Point);
        json.Number("valueBefore", jump.ValueBefore);
        json.Number("valueAfter", jump.ValueAfter);
        json.Number("timeBefore", jump.TimeBefore);
        json.Number("timeAfter", jump.TimeAfter);
        json.Number("slopeBefore", jump.SlopeBefore);
        json.Number("slopeAfter", jump.SlopeAfter);
        json.Number("ringFrequency", jump.Ring?.Frequency);
        json.Number("ringPeriods", jump.Ring?.Periods);
        json.WriteNumber("alikeEdges", jump.Alike);
        json.WriteString("words", Words(spread, jump));
    }

    private static string Others(SpreadResult spread, EdgeJump jump)
    {
        var others = Enumerable.Range(0, jump.Point.Length).Where(i => i != jump.Value).ToArray();
        var named = others.Take(MostValuesNamed)
            .Select(i => Standing(spread.Varied.Values[i], jump.Point[i]));
        return others.Length == 0 ? ""
            : $", with {string.Join(", ", named)}"
                + (others.Length > MostValuesNamed ? $" and {others.Length - MostValuesNamed} more" : "");
    }

    private static string Standing(VariedValue value, double place)
    {
        var off = SpreadWords.Off(value, place);
        var where = place == value.Nominal ? "nominal"
            : off.Length == 0 ? Number(place, value.Unit) : off.Trim(' ', '(', ')');
        return $"{value.Name} {where}";
    }

    private static string Instants(int count) => count == 1
        ? "the instant of one figure jumps, as another extreme takes over"
        : $"the instants of {count} figures jump, as other extremes take over";

    private static string S(int count) => count == 1 ? "s" : "";

    private static string Reached(SpreadResult spread, FigureRange range, double value) =>
        double.IsFinite(value) ? SpreadWords.Quantity(spread, range, value) : "none";

    /// <summary>The figure where two extremes are level; what rounding left of zero is zero.</summary>
    private static double Level(FigureRange range, EdgeJump jump)
    {
        const double nothing = 1e-6; // of the figure's range: the place is known no better
        return Math.Abs(jump.ValueAfter) < nothing * ((range.Greatest?.Value - range.Least?.Value) ?? 0)
            ? 0 : jump.ValueAfter;
    }

    private static string Instant(double time) => double.IsFinite(time) ? Number(time, "s") : "none";

    private static string Periods(RingStep? ring) => ring is null ? "" : (ring.Periods switch
    {
        0.5 => ", half a period",
        1 => ", one period",
        var periods => $", {periods.ToString(CultureInfo.InvariantCulture)} periods",
    }) + $" of the {Number(ring.Frequency, "Hz")} ring";
}
