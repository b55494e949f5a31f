using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The values of parts: their unit, marking code, tolerance, sign and habit.</summary>
internal static class PartValues
{
    /// <summary>A value with its tolerance as a parameter of the part; null means an error has been
    /// reported.</summary>
    /// <param name="aspect">What of the part, in words that are part of the parameter's name; null for its
    /// own value.</param>
    public static Evaluated? Toleranced(
        CheckState state, PartDeclaration part, ToleratedSyntax syntax, Dimension dimension,
        string? aspect) =>
        Read(state, part, syntax.Value, dimension) is { } value
            ? Tolerances.Apply(value, syntax, part.Scope, state.Evaluator, state.Findings, state.Parameters,
                part.Name, part.NameSyntax.Span, aspect)
            : null;

    /// <summary>Whether a value and its whole tolerance are more than zero; if not, an error.</summary>
    public static bool IsPositive(
        CheckState state, PartDeclaration part, ToleratedSyntax syntax, Evaluated value, string aspect)
    {
        if (value.Value <= 0)
        {
            state.Findings.Error(syntax.Value.Span,
                $"the {aspect} of `{part.Name}` is {Say(value)}; it must be more than zero",
                value.Value < 0 ? "leave the minus out"
                    : syntax.Value is NumberSyntax ? $"leave it out if `{part.Name}` has none" : null);
            return false;
        }

        return !ToleranceReachesZero(state, part, syntax, value, aspect);
    }

    /// <summary>The value of a resistor, capacitor or inductor.</summary>
    public static Quantity? Own(CheckState state, PartDeclaration part, SimplePartStatement syntax)
    {
        var (dimension, aspect) = syntax.Kind switch
        {
            SimplePartKind.Resistor => (Dimension.Resistance, "resistance"),
            SimplePartKind.Capacitor => (Dimension.Capacitance, "capacitance"),
            _ => (Dimension.Inductance, "inductance"),
        };
        if (Toleranced(state, part, syntax.Value, dimension, null) is not { } value)
        {
            return null;
        }

        if (syntax.Kind == SimplePartKind.Resistor && value.Value == 0)
        {
            state.Findings.Error(syntax.Value.Value.Span, $"the resistance of `{part.Name}` is zero",
                $"use a closed switch: `switch {part.Name} from {state.Nodes[part.From]} to "
                    + $"{state.Nodes[part.To]} : closed`");
            return null;
        }

        if (syntax.Kind == SimplePartKind.Resistor && value.Value < 0)
        {
            state.Findings.Warn(syntax.Value.Value.Span,
                $"`{part.Name}` has a negative resistance: it feeds power into the circuit",
                "taken as an incremental resistance; leave the minus out if none is meant");
            return ToleranceReachesZero(state, part, syntax.Value, value, aspect) ? null : value.AsQuantity;
        }

        if (!IsPositive(state, part, syntax.Value, value, aspect))
        {
            return null;
        }

        ValueHabits.Check(state, part, syntax, value);
        return value.AsQuantity;
    }

    private static Evaluated? Read(
        CheckState state, PartDeclaration part, ExpressionSyntax expression, Dimension dimension)
    {
        if (MarkOf(state, part, expression, dimension) is not { } mark)
        {
            return Expected.Value(state, expression, part.Scope, dimension);
        }

        var measure = Measure.Of(dimension);
        if (!MarkingCode.TryRead(mark, dimension, out var marked))
        {
            state.Findings.Error(expression.Span,
                $"the marking code `{mark}` is not that of {measure.Phrase}",
                $"write the value with its unit, in {measure.UnitWord}");
            return null;
        }

        if (state.Values.IsKnown(part.Scope.Prefix + mark) || state.Values.IsKnown(mark))
        {
            state.Findings.Warn(expression.Span,
                $"`{mark}` is read as the marking code of {Amount.Of(marked, measure.Unit)}, not as the "
                    + $"named value",
                "give the named value another name");
            state.Values.TakenForCodes.Add(mark);
        }

        return new Evaluated(marked, dimension);
    }

    private static string Say(Evaluated value) => Amount.Of(value.Value, Measure.Of(value.Dimension).Unit);

    // `R047` is written like a name; where a part says the unit it is the marking code. So is `n47`, unless a
    // value has that name.
    private static string? MarkOf(
        CheckState state, PartDeclaration part, ExpressionSyntax expression, Dimension dimension)
    {
        switch (expression)
        {
            case NumberSyntax { HasUnit: false, Mark: { } mark }:
                return mark;
            case NameExpressionSyntax { Name: { IsQuoted: false, Index: null, Owner: null, Text: var text } }:
                var isFree = !part.Scope.Counters.ContainsKey(text) && !state.Values.IsNearlyKnown(text)
                    && !state.Values.IsNearlyKnown(part.Scope.Prefix + text);
                return MarkingCode.TryRead(text, out _)
                    || (isFree && MarkingCode.TryRead(text, dimension, out _)) ? text : null;
            default:
                return null;
        }
    }

    private static bool ToleranceReachesZero(
        CheckState state, PartDeclaration part, ToleratedSyntax syntax, Evaluated value, string aspect)
    {
        if (Range(state, syntax, value) is not { } range || range.Lowest > 0 || range.Highest < 0)
        {
            return false;
        }

        var limit = value.Value > 0 ? range.Lowest : range.Highest;
        var unit = Measure.Of(value.Dimension).Unit;
        state.Findings.Error(syntax.Tolerance?.Span ?? syntax.Value.Span,
            $"the tolerance of `{part.Name}` reaches {(limit == 0 ? "zero" : "past zero")}: "
            + $"{Amount.Of(range.Lowest, unit)} to {Amount.Of(range.Highest, unit)}",
            $"{(aspect[0] is 'i' or 'o' ? "an" : "a")} {aspect} of zero is no {part.Kind}; narrow it");
        return true;
    }

    // The part's own tolerance is the parameter added last; else it may be one named value and nothing more.
    private static Tolerance? Range(CheckState state, ToleratedSyntax syntax, Evaluated value) =>
        syntax.Tolerance is not null ? state.Parameters[state.Parameters.Count - 1].Tolerance
        : value.Formula is ParameterFormula named ? state.Parameters[named.Index].Tolerance
        : null;
}
