using System.Globalization;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Sizes;

/// <summary>A value that is sought, and the range it is sought in.</summary>
/// <param name="Name">The part's name.</param>
/// <param name="Unit">Its SI unit.</param>
/// <param name="Nominal">What the circuit file says.</param>
/// <param name="Lowest">The least value looked at.</param>
/// <param name="Highest">The greatest.</param>
/// <param name="IsRangeStated">Whether the user said the range.</param>
public sealed record SizedValue(
    string Name, string Unit, double Nominal, double Lowest, double Highest, bool IsRangeStated)
{
    // Common practice, no source: a hundredfold either way for one part, some thirtyfold for each of two.
    private const double ReachOfOne = 100;
    private const double ReachOfTwo = 31.622776601683793;
    private const double Least = 1e-18; // an attofarad and a petaohm are past every part
    private const double Most = 1e15;

    /// <summary>The range of a value, or what is wrong with it.</summary>
    /// <param name="part">The part as asked for.</param>
    /// <param name="value">The value as found in the circuit.</param>
    /// <param name="partCount">How many are sought.</param>
    public static (SizedValue? Value, Diagnostic? Mistake) Of(
        SizedPartSyntax part, VariedValue value, int partCount)
    {
        if (value.Unit is not ("Ω" or "F" or "H"))
        {
            return Refuse(part.Source, part.Span,
                $"`{part.Name}` is neither resistance, capacitance nor inductance",
                "size finds values of those");
        }

        if (value.Nominal is < Least or > Most)
        {
            return Refuse(part.Source, part.Span, value.Nominal <= 0
                ? $"`{part.Name}` is negative, which is nothing to buy"
                : $"`{part.Name}` is no value of a part",
                "size finds values above zero, from 1e-18 to 1e15 of their unit");
        }

        var reach = partCount == 1 ? ReachOfOne : ReachOfTwo;
        if (part is not { Lowest: { } from, Highest: { } to })
        {
            return (new(value.Name, value.Unit, value.Nominal, TwoDigits(value.Nominal / reach),
                TwoDigits(value.Nominal * reach), IsRangeStated: false), null);
        }

        foreach (var limit in new[] { from, to })
        {
            if (Mistake(part.Source, limit, value.Unit) is { } mistake)
            {
                return (null, mistake);
            }
        }

        return from.Value < to.Value
            ? (new(value.Name, value.Unit, value.Nominal, from.Value, to.Value, IsRangeStated: true), null)
            : Refuse(part.Source, TextSpan.Between(from.Span, to.Span),
                "the range does not end above its start",
                $"write `{part.Name} from {part.Source[to.Span]} to {part.Source[from.Span]}`");
    }

    // A range that nobody stated is a round one.
    private static double TwoDigits(double value) =>
        double.Parse(value.ToString("E1", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    private static Diagnostic? Mistake(SourceText source, NumberSyntax limit, string unit)
    {
        var text = source[limit.Span];
        if (limit.Mark is null && !limit.HasUnit)
        {
            return Diagnostic.Error(source, limit.Span, $"`{text}` has no unit",
                $"write `{UnitAdvice.WithUnit(text, unit)}`");
        }

        if (limit.Mark is null && SymbolOf(limit) != unit)
        {
            return Diagnostic.Error(source, limit.Span, $"`{text}` is not in {unit}");
        }

        return limit.Value switch
        {
            <= 0 => Diagnostic.Error(source, limit.Span, $"`{text}` is not above zero"),
            < Least or > Most => Diagnostic.Error(source, limit.Span, $"`{text}` is no value of a part"),
            _ => null,
        };
    }

    private static string? SymbolOf(NumberSyntax number) =>
        CircuitTransient.Text.Unit.SymbolOf(number.Dimension);

    private static (SizedValue?, Diagnostic?) Refuse(
        SourceText source, TextSpan span, string message, string advice) =>
        (null, Diagnostic.Error(source, span, message, advice));
}
