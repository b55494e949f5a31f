using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Looks up the figures that are read off a waveform.</summary>
internal static class Figures
{
    public static NamedMeasurand? Lower(CheckState state, FigureSyntax syntax, Scope scope)
    {
        if (Measurands.Lower(state, syntax.Of, scope) is not { } of)
        {
            return null;
        }

        if (of.Quantity is Figure)
        {
            state.Findings.Error(syntax.Of.Span,
                $"`{state.Text(syntax.Of.Span)}` is one number, not a waveform",
                "read the figure off a voltage, current, power or energy");
            return null;
        }

        double? argument = null;
        if (syntax.Argument is { } written)
        {
            argument = syntax.Kind == FigureKind.SettlingTime
                ? Expected.Fraction(state, written, scope, "a band")
                : Expected.Fixed(state, written, scope, of.Dimension);
            if (argument is not { } value || !IsPositive(state, written, value))
            {
                return null;
            }
        }

        return Named(syntax.Kind, of, argument);
    }

    private static NamedMeasurand Named(FigureKind kind, NamedMeasurand of, double? argument)
    {
        NamedMeasurand Time(FigureOf figure, string words) =>
            Measurands.Named(new Figure(figure, of.Quantity, argument), words, Dimension.Time);
        return kind switch
        {
            FigureKind.RiseTime => Time(FigureOf.RiseTime, $"rise time of {of.Name}"),
            FigureKind.FrontTime => Time(FigureOf.FrontTime, $"front time of {of.Name}"),
            FigureKind.TimeToHalfValue => Time(FigureOf.TimeToHalfValue, $"time to half-value of {of.Name}"),
            FigureKind.TimeOfPeak => Time(FigureOf.TimeOfPeak, $"time of peak of {of.Name}"),
            FigureKind.SettlingTime => Time(FigureOf.SettlingTime,
                $"settling time of {of.Name} within {Amount.Of(argument ?? 0, "%")}"),
            FigureKind.TimeStaysBelow => Time(FigureOf.TimeStaysBelow,
                $"time after which {of.Name} stays below {Amount.Of(argument ?? 0, of.Unit)}"),
            FigureKind.Overshoot => new NamedMeasurand(
                new Figure(FigureOf.Overshoot, of.Quantity, null), $"overshoot of {of.Name}", Dimension.None,
                    "%"),
            FigureKind.RingFrequency => Measurands.Named(
                new Figure(FigureOf.RingFrequency, of.Quantity, null), $"ring frequency of {of.Name}",
                Dimension.Frequency),
            _ => throw new System.Diagnostics.UnreachableException($"no figure for {kind}"),
        };
    }

    private static bool IsPositive(CheckState state, ExpressionSyntax expression, double value)
    {
        if (value > 0)
        {
            return true;
        }

        state.Findings.Error(expression.Span, $"`{state.Text(expression.Span)}` is not more than zero",
            "a band or level is more than zero");
        return false;
    }
}
