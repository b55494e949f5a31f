using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns a value with its tolerance into a parameter and the formula that reads it.</summary>
internal static class Tolerances
{
    /// <summary>The value as a formula: a parameter of its own if it is a plain number or has a tolerance,
    /// else what follows from the named values in it.</summary>
    public static Evaluated? Apply(
        Evaluated value, ToleratedSyntax syntax, Scope scope, ExpressionEvaluator evaluator,
        Findings findings, ParameterList parameters, string owner, TextSpan span, string? aspect = null,
        bool isNamedValue = false)
    {
        Tolerance? tolerance = null;
        if (syntax.Tolerance is { } written)
        {
            tolerance = Range(value, syntax.Value, written, scope, evaluator, findings);
            if (tolerance is null)
            {
                return null;
            }
        }
        else if (value.Formula is not null)
        {
            return value;
        }

        var own = parameters.Add(owner, aspect, isNamedValue, value, tolerance, span, syntax);
        return value.Formula is null
            ? value with { Formula = own, Size = 1 }
            : value with { Formula = OnTopOf(value, own), Size = value.Size + 4 };
    }

    // A tolerance upon named values: the own draw scales what follows from them, or shifts it where that is
    // zero.
    private static BinaryFormula OnTopOf(Evaluated value, Formula own) => value.Value == 0
        ? new BinaryFormula('+', value.AsFormula, own)
        : new BinaryFormula('*', value.AsFormula,
            new BinaryFormula('/', own, new NumberFormula(value.Value)));

    private static Tolerance? Range(
        Evaluated value, ExpressionSyntax valueSyntax, ToleranceSyntax written, Scope scope,
        ExpressionEvaluator evaluator, Findings findings)
    {
        if (evaluator.Evaluate(written.Lower, scope) is not { } lower
            || evaluator.Evaluate(written.Upper, scope) is not { } upper)
        {
            return null;
        }

        var expected = written.IsAbsolute ? value.Dimension : Dimension.None;
        foreach (var (limit, syntax) in new[] { (lower, written.Lower), (upper, written.Upper) })
        {
            if (limit.Dimension != expected)
            {
                var measure = Measure.Of(expected);
                findings.Error(syntax.Span, written.IsAbsolute
                    ? $"`{findings.Source[syntax.Span]}` is {Measure.Of(limit.Dimension).Phrase}; the "
                        + $"limits of "
                        + $"{measure.Phrase} are in {measure.UnitWord}"
                    : $"a tolerance is in per cent, not {Measure.Of(limit.Dimension).Phrase}",
                    written.IsAbsolute ? "write both limits in the unit of the value"
                        : "for absolute limits write `between A and B`");
                return null;
            }
        }

        return Ordered(value, valueSyntax, written, lower.Value, upper.Value, findings);
    }

    private static Tolerance? Ordered(
        Evaluated value, ExpressionSyntax valueSyntax, ToleranceSyntax written, double lower, double upper,
        Findings findings)
    {
        if (lower > upper)
        {
            findings.Error(written.Span, "the lower limit of this tolerance lies above its upper limit",
                "name the lower one first");
            return null;
        }

        if (!written.IsAbsolute)
        {
            var (a, b) = (value.Value * (1 + lower), value.Value * (1 + upper));
            return new Tolerance(Math.Min(a, b), Math.Max(a, b), written.IsNormal);
        }

        if (value.Value < lower || value.Value > upper)
        {
            findings.Error(valueSyntax.Span,
                $"`{findings.Source[valueSyntax.Span]}` lies outside its own limits "
                    + $"`{findings.Source[written.Span]}`",
                "the nominal value stands between the limits or on one of them");
            return null;
        }

        return new Tolerance(lower, upper, written.IsNormal);
    }
}
