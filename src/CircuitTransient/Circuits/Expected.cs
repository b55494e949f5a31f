using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Works out an expression where a certain dimension is expected; null means an error has been
/// reported.</summary>
internal static class Expected
{
    public static Evaluated? Value(CheckState state, ExpressionSyntax expression, Scope scope,
        Dimension dimension)
    {
        var value = state.Evaluator.Evaluate(expression, scope);
        return value is { } v && Matches(state.Findings, expression, v.Dimension, dimension) ? value : null;
    }

    /// <summary>A value that cannot vary: of a tolerance in it only the nominal value is used, which is
    /// said.</summary>
    public static double? Fixed(CheckState state, ExpressionSyntax expression, Scope scope,
        Dimension dimension) =>
        Value(state, expression, scope, dimension) is { } v ? Fixed(state, expression, v) : null;

    /// <summary>The nominal value of one that cannot vary here.</summary>
    public static double Fixed(CheckState state, ExpressionSyntax expression, Evaluated value)
    {
        WarnHeld(state, expression.Span, value.Formula);
        return value.Value;
    }

    /// <summary>Says that a tolerance is not drawn at a place that cannot vary.</summary>
    public static void WarnHeld(CheckState state, TextSpan span, Formula? formula)
    {
        if (state.Parameters.FirstToleranced(formula) is { } held)
        {
            state.Findings.Warn(span, $"`{held.Name}` is held at its nominal value here",
                "its tolerance is drawn in part values, wave levels, switching instants and windows only");
        }
    }

    /// <summary>A fraction written in per cent.</summary>
    public static double? Fraction(CheckState state, ExpressionSyntax expression, Scope scope, string what)
    {
        if (expression is NumberSyntax { HasUnit: false, Mark: null } bare)
        {
            var text = state.Text(bare.Span);
            state.Findings.Error(bare.Span, $"`{text}` has no unit; {what} is in per cent",
                char.IsDigit(text[^1]) ? $"write `{text} %`" : "write it without a prefix, such as `2 %`");
            return null;
        }

        return Fixed(state, expression, scope, Dimension.None);
    }

    /// <summary>A time of more than zero that cannot vary.</summary>
    public static double? PositiveTime(
        CheckState state, ExpressionSyntax expression, Scope scope, string what)
    {
        if (Fixed(state, expression, scope, Dimension.Time) is not { } value)
        {
            return null;
        }

        if (value > 0)
        {
            return value;
        }

        state.Findings.Error(expression.Span,
            $"{what} is more than zero, not `{state.Text(expression.Span)}`",
            "write a longer time");
        return null;
    }

    public static bool Matches(Findings findings, ExpressionSyntax expression, Dimension found,
        Dimension expected)
    {
        if (found == expected)
        {
            return true;
        }

        var text = findings.Source[expression.Span];
        var measure = Measure.Of(expected);
        var plain = expression is NegationSyntax negation ? negation.Operand : expression;
        if (plain is NumberSyntax { HasUnit: false })
        {
            findings.Error(expression.Span,
                $"`{text}` has no unit; {measure.Phrase} is in {measure.UnitWord}",
                $"write `{UnitAdvice.WithUnit(text, measure.Unit)}`");
        }
        else
        {
            findings.Error(expression.Span, expected == Dimension.None
                ? $"`{text}` is {Measure.Of(found).Phrase}; a pure number is expected here"
                : $"`{text}` is {Measure.Of(found).Phrase}; {measure.Phrase} in {measure.UnitWord} is "
                    + "expected here", Advice(plain, text, expected, measure));
        }

        return false;
    }

    private static string Advice(
        ExpressionSyntax plain, string text, Dimension expected, Measure measure)
    {
        var number = new string([.. text.TakeWhile(c => char.IsDigit(c) || c is '.' or '-' or '\u2212')]);
        var unit = text[number.Length..].Trim();
        if (expected == Dimension.Time && number.Length > 0 && unit is "S" or [_, 'S'])
        {
            return $"`S` is siemens, a second is `s`: write `{number} {unit.Replace('S', 's')}`";
        }

        // Behind a prefix, a power of ten or a minute the bare number would be another value.
        var isPlainUnit = Unit.TryRead(unit, out var read) && read is { Exponent: 0, Factor: 1 };
        return plain is NumberSyntax && number.Length > 0 && isPlainUnit
            ? $"if the number is right, write `{$"{number} {measure.Unit}".TrimEnd()}`"
            : $"what is written here must come out in {measure.UnitWord}";
    }
}
