using System.Text.Json;
using CircuitTransient.Numerics;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>The document of a scan, <c>scan.json</c>; its shape is described by
/// <c>scan.schema.json</c>.</summary>
public static class ScanJson
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient scan 1";

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("scan.schema.json");

    /// <summary>The document.</summary>
    public static string Write(ScanResult result) => JsonWriting.Document(json =>
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Circuit(result.Circuit);
        json.Objects("scanned", result.Axes, axis => WriteAxis(json, axis));
        json.Objects("figures", result.Figures, figure =>
        {
            json.WriteString("name", figure.Name);
            json.WriteString("unit", figure.Unit);
            json.WriteString("kind", Kind(figure.Kind));
        });
        json.Object("asWritten", () => WritePoint(json, result.Nominal));
        json.Objects("points", result.Points, point => WritePoint(json, point));
        json.WriteNumber("unsolved", result.UnsolvedCount);
        json.WriteBoolean("allHold", result.AllHold);
        json.Objects("findings", result.Findings, finding => WriteFinding(json, finding));
        json.Objects("linearRanges", result.Linear, linear => WriteLinear(json, linear));
        if (result.Scatter is { } scatter)
        {
            json.Object("scatter", () => WriteScatter(json, scatter));
        }

        json.WriteEndObject();
    });

    private static void WriteAxis(Utf8JsonWriter json, ScanAxis axis)
    {
        json.WriteString("name", axis.Varied.Name);
        json.WriteString("unit", axis.Varied.Unit);
        json.WriteString("kind", axis.Varied.Kind switch
        {
            VariedKind.NamedValue => "value",
            VariedKind.SourcePhase => "phase",
            VariedKind.EventTime => "event",
            _ => "part",
        });
        json.WriteString("range", axis.Words);
        json.WriteString("spacing", axis.Spacing switch
        {
            ScanSpacing.Logarithmic => "logarithmic",
            ScanSpacing.Preferred => "preferred",
            _ => "even",
        });
        json.Number("asWritten", axis.Varied.Nominal);
        json.Array("values", axis.Values, value => json.NumberValue(value));
    }

    private static void WritePoint(Utf8JsonWriter json, ScanPoint point)
    {
        json.Array("at", point.At, value => json.NumberValue(value));
        if (point.Found is { } found)
        {
            json.Array("values", found.Values, json.NumberValue);
            json.Array("times", found.Times, json.NumberValue);
            json.WriteBoolean("inDoubt", point.IsInDoubt);
        }
        else
        {
            json.WriteNull("values");
            json.WriteNull("times");
            json.WriteString("trouble", point.Trouble);
        }

        if (!point.Slopes.IsEmpty)
        {
            json.Array("slopes", point.Slopes, slope => json.NumberValue(slope));
        }
    }

    private static void WriteFinding(Utf8JsonWriter json, FigureScan finding)
    {
        json.WriteString("figure", finding.Figure.Name);
        WritePlace(json, "greatest", finding.Greatest);
        WritePlace(json, "least", finding.Least);
        json.Objects("jumps", finding.Jumps, jump =>
        {
            json.Number("at", jump.At);
            json.Number("before", jump.Before);
            json.Number("after", jump.After);
        });
        if (!finding.IsJudged)
        {
            return;
        }

        json.WriteBoolean("holds", finding.HoldsThroughout);
        json.Number("room", finding.Room);
        json.Objects("breaks", finding.Breaks, found =>
        {
            json.Array("at", found.At, value => json.NumberValue(value));
            json.WriteNumber("along", found.Axis);
            json.WriteBoolean("holdsBelow", found.HoldsBelow);
            json.WriteBoolean("jump", found.IsJump);
            json.WriteBoolean("bySlope", found.IsBySlope);
        });
        json.Objects("holding", finding.Holding, stretch =>
        {
            json.Number("from", stretch.From);
            json.Number("to", stretch.To);
        });
    }

    private static void WritePlace(Utf8JsonWriter json, string name, ScanPlace? place)
    {
        if (place is null)
        {
            json.WriteNull(name);
            return;
        }

        json.Object(name, () =>
        {
            json.Number("value", place.Value);
            json.Array("at", place.At, value => json.NumberValue(value));
            json.Number("time", place.Time);
            json.WriteBoolean("inDoubt", place.IsInDoubt);
            json.WriteString("how", place.How switch
            {
                RangeExtremeKind.Smooth => "slope zero",
                RangeExtremeKind.Kink => "kink",
                RangeExtremeKind.Jump => "jump",
                RangeExtremeKind.Compared => "compared",
                RangeExtremeKind.Flat => "flat",
                _ => "end",
            });
        });
    }

    private static void WriteLinear(Utf8JsonWriter json, LinearScan linear)
    {
        json.WriteString("part", linear.Part);
        json.Number("limit", linear.Limit);
        json.WriteString("unit", linear.Unit);
        json.WriteBoolean("kept", linear.Scan.HoldsThroughout);
        json.Number("greatest", linear.Scan.Greatest?.Value * linear.Limit);
        json.Array("at", linear.Scan.Greatest?.At ?? [], value => json.NumberValue(value));
        json.Objects("keptOver", linear.Scan.Holding, stretch =>
        {
            json.Number("from", stretch.From);
            json.Number("to", stretch.To);
        });
    }

    private static void WriteScatter(Utf8JsonWriter json, ScatterResult scatter)
    {
        json.WriteString("event", scatter.Scatter.Varied.Name);
        json.Number("stated", scatter.Scatter.Varied.Nominal);
        json.Number("by", scatter.Scatter.By);
        json.Number("from", scatter.Scatter.From);
        json.Number("to", scatter.Scatter.To);
        json.WriteNumber("unsolved", scatter.UnsolvedCount);
        json.Objects("points", scatter.Points, point => WritePoint(json, point));
        json.Objects("linearRanges", scatter.Linear, linear => WriteLinear(json, linear));
        json.Objects("figures", scatter.Figures, figure =>
        {
            WriteFinding(json, figure.Scan);
            json.Number("mean", figure.Mean);
            json.Objects("quantiles", figure.Quantiles, quantile =>
            {
                json.Number("fraction", quantile.Fraction);
                json.Number("value", quantile.Value);
            });
            if (figure.Scan.IsJudged)
            {
                json.Number("holdingFraction", figure.Holding);
            }
        });
    }

    private static string Kind(StudyFigureKind kind) => kind switch
    {
        StudyFigureKind.Maximum => "maximum",
        StudyFigureKind.Minimum => "minimum",
        StudyFigureKind.Reading => "reading",
        StudyFigureKind.Margin => "margin",
        StudyFigureKind.RatingUsed => "rating used",
        _ => throw new System.Diagnostics.UnreachableException($"no word for {kind}"),
    };
}
