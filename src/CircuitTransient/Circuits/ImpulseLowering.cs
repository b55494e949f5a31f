using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns an impulse of given front and half-value times into its two exponentials.</summary>
internal sealed class ImpulseLowering(CheckState state, Scope scope)
{
    /// <summary>Tail and front; null where an error was reported.</summary>
    /// <param name="impulse">The impulse as written.</param>
    /// <param name="crest">Its signed crest, in volts or amperes.</param>
    /// <param name="dimension">What the crest is in; null where that is not known.</param>
    public ImmutableArray<WavePiece>? Lower(ImpulseSyntax impulse, double crest, Dimension? dimension)
    {
        var from = Instants.Fixed(state, impulse.From, scope);
        var front = Expected.PositiveTime(state, impulse.Front, scope, "a front time");
        var half = Expected.PositiveTime(state, impulse.HalfValue, scope, "a time to half-value");
        if (from is not { } start || front is not { } t1 || half is not { } t2 || dimension is null)
        {
            return null;
        }

        if (t2 / t1 > DoubleExponential.LongestRatio)
        {
            state.Findings.Error(impulse.Front.Span, "a front this much shorter than the tail is a step",
                $"write `decay of {state.Text(impulse.Peak.Span)} in {Amount.Of(t2 / Math.Log(2), "s")}`");
            return null;
        }

        var isVoltage = dimension == Dimension.Voltage;
        if (DoubleExponential.Solve(t1, t2, isVoltage) is not { } wave)
        {
            Refuse(impulse, t2 / t1, isVoltage);
            return null;
        }

        var name = $"impulse from {Amount.Of(start, "s")}";
        return
        [
            Exponential(start, crest * wave.Factor, wave.Tail, name + ", tail"),
            Exponential(start, -crest * wave.Factor, wave.Front, name + ", front") with { Continues = true },
        ];
    }

    private static WavePiece Exponential(double start, double level, double timeConstant, string label) =>
        new(start, double.PositiveInfinity, level, 0, 1 / timeConstant, 0, 0, label);

    private void Refuse(ImpulseSyntax impulse, double ratio, bool isVoltage)
    {
        var least = Math.Round(DoubleExponential.LeastRatio(isVoltage), 4);
        var definition = isVoltage ? "both times by IEC 60060-1" : "the front as 1.25 times 10–90 %";
        state.Findings.Error(TextSpan.Between(impulse.Front.Span, impulse.HalfValue.Span),
            $"no double exponential has a half-value time {Amount.Of(Math.Round(ratio, 4), "")} times its "
                + $"front",
            $"the least is {Amount.Of(least, "")}, {definition}; use `straight lines` instead");
    }
}
