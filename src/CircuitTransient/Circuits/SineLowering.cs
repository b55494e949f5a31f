using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns a sine or cosine into a piece; its phase is that at t = 0 wherever it starts.</summary>
internal sealed class SineLowering(CheckState state, Scope scope)
{
    public ImmutableArray<WavePiece>? Lower(SineSyntax sine, double amplitude)
    {
        var frequency = Expected.Fixed(state, sine.Frequency, scope, Dimension.Frequency);
        var phase = Phase(sine.Phase);
        var from = Instants.Fixed(state, sine.From, scope);
        var until = sine.Until is null ? double.PositiveInfinity : Instants.Fixed(state, sine.Until, scope);
        var decay = Decay(sine.TimeConstant);
        if (frequency is not { } f || phase is not { } p || from is not { } start || until is not { } end
            || decay is not { } rate)
        {
            return null;
        }

        if (f < 0)
        {
            state.Findings.Error(sine.Frequency.Span, "a frequency is zero or more",
                "turn the sign of the sine instead");
            return null;
        }

        if (end <= start)
        {
            state.Findings.Error(sine.Until!.Span,
                $"this wave ends at {Amount.Of(end, "s")}, which is not after its start at "
                    + $"{Amount.Of(start, "s")}",
                "let it end later");
            return null;
        }

        var isPerpetual = sine is { From: null, Until: null, TimeConstant: null };
        return
        [
            new WavePiece(start, end, sine.IsRms ? amplitude * Math.Sqrt(2) : amplitude, 0, rate,
                2 * Math.PI * f, PhaseAt(start, f, sine.IsCosine ? p : p - (Math.PI / 2)),
                Label(sine, start, end), isPerpetual)
            { StatedPhase = p },
        ];
    }

    // Whole turns up to the start are taken off before they are multiplied by 2π, which keeps their last
    // digits.
    private static double PhaseAt(double start, double frequency, double phase) =>
        Math.IEEERemainder((Math.IEEERemainder(frequency * start, 1) * 2 * Math.PI) + phase, 2 * Math.PI);

    private string Label(SineSyntax sine, double start, double end)
    {
        var name = $"{(sine.IsCosine ? "cosine" : "sine")} at {state.Text(sine.Frequency.Span)}";
        return name + (sine.From is null ? "" : $" from {Amount.Of(start, "s")}")
            + (sine.Until is null ? "" : $" until {Amount.Of(end, "s")}");
    }

    private double? Phase(ExpressionSyntax? phase)
    {
        if (phase is null)
        {
            return 0;
        }

        var bare = phase is NegationSyntax negation ? negation.Operand : phase;
        if (bare is NumberSyntax { HasUnit: false, Value: not 0 })
        {
            var text = state.Text(phase.Span);
            state.Findings.Error(phase.Span, $"`{text}` has no unit; a phase is in degrees or radians",
                $"write `{text}°` or `{text} rad`");
            return null;
        }

        return Expected.Fixed(state, phase, scope, Dimension.None);
    }

    private double? Decay(ExpressionSyntax? timeConstant) => timeConstant is null
        ? 0
        : 1 / Expected.PositiveTime(state, timeConstant, scope, "a time constant");
}
