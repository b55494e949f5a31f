using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Writes a circuit's text with other values in it, all else left as it stands.</summary>
public static class CircuitRewriting
{
    private const int MostDigits = 17; // read back to the same bits

    /// <summary>Puts values into the text.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="values">New values in SI, by index in <see cref="Circuit.Parameters"/>.</param>
    /// <param name="keepsTolerances">Whether tolerances stay where the new value lies within reach of them:
    /// always in per cent, between limits only if it lies between them.</param>
    /// <param name="writesOut">Whether a repetition is written out where its rounds differ.</param>
    /// <returns>The text, or which value has no place of its own in it.</returns>
    public static Outcome<string> Put(
        Circuit circuit, IReadOnlyDictionary<int, double> values, bool keepsTolerances,
        bool writesOut = false)
    {
        var edits = new SortedDictionary<int, (TextSpan Span, string Text)>();
        var writtenOut = new List<TextSpan>();
        foreach (var index in values.Keys)
        {
            var parameter = circuit.Parameters[index];
            if (Sharing(circuit, values, index) is not { } other
                || writtenOut.Exists(span => Holds(span, parameter.ValueSpan)))
            {
                continue;
            }

            if (!writesOut || WrittenOutRepeat.Around(circuit, parameter.ValueSpan) is not { } repeat
                || WrittenOutRepeat.Text(circuit, repeat, EditsOf) is not { } rounds)
            {
                return new(null, [Diagnostic.Error(
                    circuit.Source, parameter.ValueSpan,
                    $"`{parameter.Name}` and `{other}` stand in one text, and their values differ",
                    Advice(parameter))]);
            }

            writtenOut.Add(repeat.Span);
            edits[repeat.Span.Start] = (repeat.Span, rounds);
        }

        foreach (var edit in values.Keys.SelectMany(EditsOf)
            .Where(edit => !writtenOut.Exists(span => Holds(span, edit.Span))))
        {
            edits[edit.Span.Start] = edit;
        }

        return new(Edited(circuit.Source.Content, edits.Values), []);

        IEnumerable<(TextSpan Span, string Text)> EditsOf(int index)
        {
            if (!values.TryGetValue(index, out var value))
            {
                yield break;
            }

            var parameter = circuit.Parameters[index];
            yield return (parameter.ValueSpan, Written(value, parameter.Unit));
            if (parameter.ToleranceSpan is { } tolerance
                && !(keepsTolerances && Holds(circuit, index, value)))
            {
                yield return (tolerance, "");
            }
        }
    }

    private static string Advice(Parameter parameter) =>
        parameter.Owner.Contains('/', StringComparison.Ordinal)
        ? "give the value a name in the assembly, and every placing a value of its own for it: "
            + "`place … with Rdamp = 3 Ω`"
        : $"write the parts out one by one in place of the repetition, with names such as "
            + $"`\"{parameter.Owner}\"`, in quotes";

    private static bool Holds(TextSpan outer, TextSpan inner) =>
        outer.Start <= inner.Start && inner.End <= outer.End;

    /// <summary>A value with its unit, as few digits as read back to the same bits.</summary>
    public static string Written(double value, string unit)
    {
        var digits = 1;
        while (digits < MostDigits && double.Parse(
            value.ToString($"E{digits - 1}", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)
            != value)
        {
            digits++;
        }

        return EngineeringNumber.Format(value, unit, digits);
    }

    /// <summary>Another value written in the same place that becomes different; null where there is
    /// none.</summary>
    private static string? Sharing(Circuit circuit, IReadOnlyDictionary<int, double> values, int index)
    {
        var span = circuit.Parameters[index].ValueSpan;
        for (var i = 0; i < circuit.Parameters.Length; i++)
        {
            var own = circuit.Parameters[i];
            if (i != index && own.ValueSpan == span
                && values.GetValueOrDefault(i, own.Nominal) != values[index])
            {
                return own.Name;
            }
        }

        return null;
    }

    private static bool Holds(Circuit circuit, int index, double value)
    {
        var parameter = circuit.Parameters[index];
        var isAbsolute = circuit.Source[parameter.ToleranceSpan!.Value]
            .StartsWith("between", StringComparison.Ordinal);
        return !isAbsolute
            || (value >= parameter.Tolerance!.Lowest && value <= parameter.Tolerance.Highest);
    }

    private static string Edited(string text, IEnumerable<(TextSpan Span, string Text)> edits)
    {
        var written = new StringBuilder(text.Length + 64);
        var place = 0;
        foreach (var (span, replacement) in edits)
        {
            var start = replacement.Length == 0 && span.Start > place && text[span.Start - 1] == ' '
                ? span.Start - 1
                : span.Start;
            written.Append(text, place, start - place).Append(replacement);
            place = span.End;
        }

        return written.Append(text, place, text.Length - place).ToString();
    }
}
