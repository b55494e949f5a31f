using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Values that a part of their kind seldom has: worth asking, never refused.</summary>
internal static class ValueHabits
{
    // Widest ranges of parts one can buy or find as strays; common practice, no source.
    private static readonly Dictionary<SimplePartKind, (double Least, double Most)> habits = new()
    {
        [SimplePartKind.Resistor] = (1e-7, 1e13),
        [SimplePartKind.Capacitor] = (1e-16, 1e4),
        [SimplePartKind.Inductor] = (1e-12, 1e4),
    };

    public static void Check(CheckState state, PartDeclaration part, SimplePartStatement syntax,
        Evaluated value)
    {
        var (least, most) = habits[syntax.Kind];
        var expression = syntax.Value.Value;
        if (value.Value >= least && value.Value <= most)
        {
            return;
        }

        state.Findings.Warn(expression.Span,
            $"{Amount.Of(value.Value, Measure.Of(value.Dimension).Unit)} is far from the habit of "
                + $"{Article(part.Kind)} "
            + $"{part.Kind}; is it meant?", Swapped(state.Text(expression.Span)));
    }

    /// <summary>Asks about a resistance of milliohms straight across a voltage source.</summary>
    public static void CheckAcrossSource(CheckState state, Resistor part)
    {
        var resistance = part.Resistance.Nominal;
        if (resistance is <= 0 or >= 0.1
            || state.DeclarationOf(part).Statement is not SimplePartStatement syntax)
        {
            return;
        }

        var source = state.Parts.OfType<VoltageSource>().FirstOrDefault(s =>
            (s.From == part.From && s.To == part.To) || (s.From == part.To && s.To == part.From));
        if (source is not null)
        {
            state.Findings.Warn(syntax.Value.Value.Span,
                $"{Amount.Of(resistance, "Ω")} stands across the source `{source.Name}`; is that meant?",
                Swapped(state.Text(syntax.Value.Value.Span)));
        }
    }

    /// <summary>The hint where a slip between milli and mega may be the reason.</summary>
    public static string? Swapped(string text)
    {
        var at = text.AsSpan().IndexOfAnyExceptInRange('\0', '9');
        if (at < 0 || !char.IsDigit(text[0]))
        {
            return null;
        }

        var unit = text[at..];
        return unit.Length > 1 && unit[0] == 'm' ? $"mega is `M`: `{text[..at]}M{unit[1..]}`"
            : unit.Length > 1 && unit[0] == 'M' ? $"milli is `m`: `{text[..at]}m{unit[1..]}`"
            : null;
    }

    private static string Article(string kind) => kind[0] == 'i' ? "an" : "a";
}
