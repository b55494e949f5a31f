using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>Turns a range as written into the values a scan takes, or says what is wrong with it.</summary>
internal sealed class ScanAxisLowering(Circuit circuit, ScannedSyntax scanned, VariedValue varied)
{
    /// <summary>The most points a scan takes.</summary>
    public const int MostPoints = 100_000;

    private const double Rounding = 1e-9; // of a step: the last one may end this far past the range

    private readonly RangeSyntax range = scanned.Range!;

    private readonly List<Diagnostic> mistakes = [];

    /// <summary>The axis of a range that was written.</summary>
    public Outcome<ScanAxis> Lower()
    {
        if (Value(range.From) is not { } from || Value(range.To) is not { } to || !IsUsable(from, to))
        {
            return new(null, [.. mistakes]);
        }

        var (spacing, values) = range.Spacing switch
        {
            StepCountSyntax { Count: var count } => (ScanSpacing.Even, Even(from, to, count)),
            StepsADecadeSyntax decade => (ScanSpacing.Logarithmic, Logarithmic(from, to, decade)),
            StepWidthSyntax width => (ScanSpacing.Even, Stepped(from, to, width)),
            PreferredValuesSyntax preferred => (ScanSpacing.Preferred, Preferred(from, to, preferred)),
            _ => throw new System.Diagnostics.UnreachableException($"no values for {range.Spacing}"),
        };
        return mistakes.Count > 0
            ? new(null, [.. mistakes])
            : new(new ScanAxis(varied, scanned.Source[range.Span], spacing, values), []);
    }

    private double? Value(NumberSyntax number)
    {
        var text = scanned.Source[number.Span];
        if (!Unit.TryRead(varied.Unit, out var unit) && varied.Unit.Length > 0)
        {
            Say(number.Span, $"`{varied.Name}` is in {varied.Unit}, for which no value can be written",
                "scan what it is made of");
            return null;
        }

        if (number.Mark is { } mark)
        {
            if (MarkingCode.TryRead(mark, unit.Dimension, out var marked))
            {
                return marked;
            }
        }
        else if (number.Dimension == unit.Dimension && (number.HasUnit || varied.Unit.Length == 0))
        {
            return number.Value;
        }

        var shown = varied.Kind == VariedKind.SourcePhase ? "°" : varied.Unit;
        if (number.HasUnit)
        {
            Say(number.Span, $"`{text}` does not fit `{varied.Name}`, which is in {Word(shown)}",
                $"the circuit file has {Said(varied.Nominal)}");
        }
        else
        {
            Say(number.Span, $"`{text}` has no unit; `{varied.Name}` is in {Word(shown)}",
                $"write `{(shown == "°" ? text + shown : UnitAdvice.WithUnit(text, shown))}`");
        }

        return null;
    }

    private bool IsUsable(double from, double to)
    {
        var span = TextSpan.Between(range.From.Span, range.To.Span);
        if (from == to)
        {
            Say(span, $"the range is empty: it begins and ends at `{scanned.Source[range.From.Span]}`",
                "write two different values");
        }
        else if (from > to)
        {
            Say(span, "the range runs backwards",
                $"write `from {scanned.Source[range.To.Span]} to {scanned.Source[range.From.Span]}`");
        }
        else if (varied.Kind == VariedKind.EventTime && from < 0)
        {
            Say(range.From.Span, "an event before t = 0 is before the study", "begin at `0 s`");
        }
        else if (varied.Kind == VariedKind.EventTime && StudyEnd(circuit, varied) is { } end && to > end)
        {
            Say(range.To.Span, $"the study ends at {Said(end)}, before the event", "end the range by then");
        }
        else if (Positive() is { } what && (what == "resistance" ? from <= 0 && to >= 0 : from <= 0))
        {
            Say(range.From.Span,
                $"the range reaches a {what} of zero, at which `{varied.Name}` is no such part",
                $"begin above zero, such as at `{Said(to / 1000)}`");
        }
        else
        {
            return true;
        }

        return false;
    }

    /// <summary>The end of the study as a delay of the event; null where it is not stated, or where the event
    /// follows another.</summary>
    public static double? StudyEnd(Circuit circuit, VariedValue varied) => varied.Event is { } e
        && ((Switch)circuit.Parts[e.Part]).Events[e.Event].Trigger is AtInstant { Instant.After: null }
        ? circuit.Until
        : null;

    /// <summary>What of a part cannot be zero; null where zero is a value like any other.</summary>
    private string? Positive() =>
        varied.Kind == VariedKind.Parameter
        && circuit.Parts.FirstOrDefault(p => p.Name == scanned.Name) is { } part
            ? part switch
            {
                Resistor => "resistance",
                Capacitor => "capacitance",
                Inductor => "inductance",
                _ => null,
            }
            : null;

    private ImmutableArray<double> Even(double from, double to, int count) => IsTooFine(count)
        ? []
        : [.. Enumerable.Range(0, count).Select(i => from + ((to - from) * i / count)), to];

    private ImmutableArray<double> Stepped(double from, double to, StepWidthSyntax steps)
    {
        if (Value(steps.Width) is not { } width)
        {
            return [];
        }

        if (width <= 0)
        {
            Say(steps.Width.Span, $"a step of `{scanned.Source[steps.Width.Span]}` leads nowhere",
                "write a width of more than zero");
            return [];
        }

        var count = (to - from) / width;
        var whole = Math.Floor(count + Rounding);
        if (IsTooFine(whole))
        {
            return [];
        }

        // Both ends are taken: the last step is shorter where the width does not divide the range.
        var values = Enumerable.Range(0, (int)whole + 1).Select(i => from + (width * i)).ToList();
        if (count - whole > Rounding)
        {
            values.Add(to);
        }
        else
        {
            values[^1] = to;
        }

        return [.. values];
    }

    private ImmutableArray<double> Logarithmic(double from, double to, StepsADecadeSyntax decade)
    {
        if (from <= 0)
        {
            Say(range.From.Span, "steps a decade are equal factors, which never leave or pass zero",
                "begin above zero, or write `in 50 steps`");
            return [];
        }

        var count = Math.Max(1, Math.Round(decade.Count * Math.Log10(to / from)));
        return IsTooFine(count)
            ? []
            :
            [
                .. Enumerable.Range(0, (int)count).Select(i => from * Math.Pow(to / from, i / count)), to,
            ];
    }

    private ImmutableArray<double> Preferred(double from, double to, PreferredValuesSyntax preferred)
    {
        if (from <= 0)
        {
            Say(range.From.Span, "preferred values are greater than zero", "begin above zero");
            return [];
        }

        var values = PreferredValues.Between((PreferredSeries)preferred.Series, from, to).ToImmutableArray();
        if (values.Length < 2)
        {
            Say(range.Span, values.IsEmpty
                ? $"no value of E{preferred.Series} lies in the range"
                : $"only {Said(values[0])} of E{preferred.Series} lies in the range",
                "take a wider range or a finer series");
        }

        return values;
    }

    private bool IsTooFine(double steps)
    {
        if (steps < MostPoints)
        {
            return false;
        }

        Say(range.Spacing.Span, $"{steps + 1:0} points are more than the {MostPoints} that a scan takes",
            "take wider steps: what lies between two points is searched too");
        return true;
    }

    private string Said(double value) =>
        new ScanAxis(varied, "", ScanSpacing.Even, [value]).Say(value);

    private static string Word(string unit) => unit switch
    {
        "" => "no unit",
        "°" => "degrees",
        _ => unit,
    };

    private void Say(TextSpan span, string message, string advice) =>
        mistakes.Add(Diagnostic.Error(scanned.Source, span, message, advice));
}
