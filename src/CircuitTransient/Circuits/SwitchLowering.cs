using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns switches and their events into parts.</summary>
internal static class SwitchLowering
{
    public static Switch? Lower(CheckState state, PartDeclaration part)
    {
        var syntax = (SwitchStatement)part.Statement;
        var isGood = true;
        Quantity? closed = null, open = null;
        var events = ImmutableArray.CreateBuilder<SwitchEvent>();
        var isClosed = syntax.IsClosed;
        foreach (var clause in syntax.Clauses)
        {
            switch (clause)
            {
                case ClosedResistanceSyntax c:
                    closed = Resistance(state, part, c.Resistance, "closed resistance");
                    isGood &= closed is not null;
                    break;
                case OpenResistanceSyntax o:
                    open = Resistance(state, part, o.Resistance, "open resistance");
                    isGood &= open is not null;
                    break;
                case SwitchEventSyntax e:
                    isGood &= Alternates(state, part, e, isClosed, events.Count);
                    isClosed = e.Closes;
                    var trigger = Trigger(state, part, e);
                    isGood &= trigger is not null;
                    events.Add(new SwitchEvent(e.Closes, trigger ?? new AtInstant(new Instant(0, null)),
                        Cut(state, part, e, ref isGood), e.Span));
                    break;
            }
        }

        if (events.Count == 0)
        {
            state.Findings.Warn(part.NameSyntax.Span,
                $"`{part.Name}` never acts: it stays {Position(syntax.IsClosed)}",
                $"add `{(syntax.IsClosed ? "opens" : "closes")} at 1 ms`, or leave the switch out");
        }

        return isGood
            ? new Switch(syntax.IsClosed, closed, open, events.ToImmutable())
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = part.Statement.Span,
            }
            : null;
    }

    private static Quantity? Resistance(CheckState state, PartDeclaration part, ToleratedSyntax value,
        string aspect) =>
        PartValues.Toleranced(state, part, value, Dimension.Resistance, aspect) is { } r
        && PartValues.IsPositive(state, part, value, r, aspect) ? r.AsQuantity : null;

    private static bool Alternates(
        CheckState state, PartDeclaration part, SwitchEventSyntax syntax, bool isClosed, int before)
    {
        if (syntax.Closes != isClosed)
        {
            return true;
        }

        var acts = syntax.Closes ? "closes" : "opens";
        var other = syntax.Closes ? "opens" : "closes";
        state.Findings.Error(syntax.Span, before == 0
            ? $"`{part.Name}` {acts}, but it is {Position(isClosed)} from the start"
            : $"`{part.Name}` {acts} twice in a row",
            before == 0
                ? $"let it start `{Position(!isClosed)}`, or write `{other}` here"
                : $"put an event that {other} it between the two");
        return false;
    }

    private static string Position(bool isClosed) => isClosed ? "closed" : "open";

    private static double? Cut(CheckState state, PartDeclaration part, SwitchEventSyntax syntax,
        ref bool isGood)
    {
        if (syntax.Cut is not { } cut)
        {
            return null;
        }

        if (syntax.Closes)
        {
            state.Findings.Error(cut.Span,
                $"`{part.Name}` closes here; only an opening waits for its own current",
                "leave these words out");
            isGood = false;
            return null;
        }

        if (cut.Limit is not { } limit)
        {
            return 0;
        }

        var value = Expected.Fixed(state, limit, part.Scope, Dimension.Current);
        if (value < 0)
        {
            state.Findings.Error(limit.Span, "a current to part at is a magnitude, zero or more",
                "write it without its sign");
        }

        isGood &= value >= 0;
        return value;
    }

    private static Trigger? Trigger(CheckState state, PartDeclaration part, SwitchEventSyntax syntax)
    {
        if (syntax.Trigger is AtInstantSyntax at)
        {
            return Instants.Lower(state, at.Time, part.Scope) is not { } instant ? null
                : state.Overrides.EventTimes.TryGetValue((part.Name, syntax.Closes), out var other)
                ? new AtInstant(instant with { Delay = other })
                : new AtInstant(instant);
        }

        var when = (WhenCrossesSyntax)syntax.Trigger;
        var after = when.After is null ? null : Instants.Lower(state, when.After, part.Scope);
        if (Measurands.Lower(state, when.Quantity, part.Scope) is not { } quantity)
        {
            return null;
        }

        if (quantity.Quantity is Figure)
        {
            state.Findings.Error(when.Quantity.Span,
                $"`{quantity.Name}` is one number of the whole study, which a switch cannot follow",
                "let it follow a voltage, current, power or energy");
            return null;
        }

        var level = Expected.Fixed(state, when.Level, part.Scope, quantity.Dimension);
        if (when.InMagnitude && level < 0)
        {
            state.Findings.Error(when.Level.Span, "a magnitude is never below zero",
                "give a level of zero or more");
            return null;
        }

        return level is { } l && (when.After is null || after is not null)
            ? new WhenCrosses(quantity.Quantity, when.Rises, l, when.InMagnitude, after)
            : null;
    }
}
