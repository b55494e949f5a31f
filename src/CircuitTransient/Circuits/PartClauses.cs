using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The clauses any part may have: what it is rated for, and how far its value may be
/// believed.</summary>
internal sealed record PartClauses(ImmutableArray<Rating> Ratings, LinearLimit? LinearUpTo)
{
    /// <summary>Reads them and refuses clauses that are doubled or belong to another kind of part.</summary>
    public static PartClauses? Read(CheckState state, PartDeclaration part)
    {
        var ratings = ImmutableArray.CreateBuilder<Rating>();
        LinearLimit? linear = null;
        var isGood = true;
        var seen = new HashSet<Type>();
        foreach (var clause in part.Clauses)
        {
            var words = Words(clause);
            if (Home(clause) is { } kind && kind != part.Kind)
            {
                state.Findings.Error(clause.Span, $"`{words}` belongs to {Article(kind)} {kind}, and "
                    + $"`{part.Name}` is {Article(part.Kind)} {part.Kind}", "leave it out");
                isGood = false;
                continue;
            }

            if (clause is not (RatedSyntax or SwitchEventSyntax) && !seen.Add(clause.GetType()))
            {
                state.Findings.Error(clause.Span, $"`{part.Name}` has `{words}` twice",
                    "leave one of them out");
                isGood = false;
                continue;
            }

            if (clause is RatedSyntax rated)
            {
                var rating = Rated(state, part, rated);
                isGood &= rating is not null;
                if (rating is not null)
                {
                    ratings.Add(rating);
                }
            }
            else if (clause is LinearUpToSyntax upTo)
            {
                linear = Linear(state, part, upTo);
                isGood &= linear is not null;
            }
        }

        return isGood ? new PartClauses(ratings.ToImmutable(), linear) : null;
    }

    private static Rating? Rated(CheckState state, PartDeclaration part, RatedSyntax syntax)
    {
        if (state.Evaluator.Evaluate(syntax.Value, part.Scope) is not { } value)
        {
            return null;
        }

        var d = value.Dimension;
        RatingKind? kind = d == Dimension.Voltage ? RatingKind.PeakVoltage
            : d == Dimension.Current ? RatingKind.PeakCurrent
            : d == Dimension.Power ? RatingKind.MeanPower
            : d == Dimension.Energy ? RatingKind.Energy
            : d == Dimension.JouleIntegral ? RatingKind.JouleIntegral
            : d == Dimension.Voltage / Dimension.Time ? RatingKind.VoltageRate
            : d == Dimension.Current / Dimension.Time ? RatingKind.CurrentRate
            : null;
        if (kind is { } rated)
        {
            return IsPositive(state, syntax.Value, value, "a rating")
                ? new Rating(rated, Expected.Fixed(state, syntax.Value, value), syntax.Span) : null;
        }

        var text = state.Text(syntax.Value.Span);
        state.Findings.Error(syntax.Value.Span, syntax.Value is NumberSyntax { HasUnit: false }
            ? $"`{text}` has no unit, so it does not say what `{part.Name}` is rated for"
            : $"`{text}` is {Measure.Of(d).Phrase}, which is not a rating",
            "a rating is in V, A, W, J, A²s, V/µs or A/µs");
        return null;
    }

    private static LinearLimit? Linear(CheckState state, PartDeclaration part, LinearUpToSyntax syntax)
    {
        if (state.Evaluator.Evaluate(syntax.Value, part.Scope) is not { } value)
        {
            return null;
        }

        var isVoltage = value.Dimension == Dimension.Voltage;
        if (isVoltage || value.Dimension == Dimension.Current)
        {
            return IsPositive(state, syntax.Value, value, "a limit of linearity")
                ? new LinearLimit(Expected.Fixed(state, syntax.Value, value), isVoltage, syntax.Span) : null;
        }

        state.Findings.Error(syntax.Value.Span,
            $"`{state.Text(syntax.Value.Span)}` is {Measure.Of(value.Dimension).Phrase}; "
            + "a part is linear up to a voltage or a current", "write it in V or A");
        return null;
    }

    private static bool IsPositive(CheckState state, ExpressionSyntax expression, Evaluated value,
        string what)
    {
        if (value.Value > 0)
        {
            return true;
        }

        state.Findings.Error(expression.Span,
            $"{what} is more than zero, not `{state.Text(expression.Span)}`",
            "give its magnitude; both signs are meant");
        return false;
    }

    private static string? Home(ClauseSyntax clause) => clause switch
    {
        ChargedToSyntax => "capacitor",
        CarryingSyntax => "inductor",
        ClosedResistanceSyntax or OpenResistanceSyntax or SwitchEventSyntax => "switch",
        _ => null,
    };

    private static string Words(ClauseSyntax clause) => clause switch
    {
        ChargedToSyntax => "charged to",
        CarryingSyntax => "carrying",
        RatedSyntax => "rated",
        LinearUpToSyntax => "linear up to",
        ClosedResistanceSyntax => "closed resistance",
        OpenResistanceSyntax => "open resistance",
        SwitchEventSyntax { Closes: true } => "closes",
        _ => "opens",
    };

    private static string Article(string kind) => kind[0] is 'i' ? "an" : "a";
}
