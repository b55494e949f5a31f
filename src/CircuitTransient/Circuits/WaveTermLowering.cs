using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns one term of a wave into pieces; null means that an error has been reported.</summary>
/// <param name="state">What is known of the circuit.</param>
/// <param name="scope">Where the source stands.</param>
/// <param name="expected">The dimension the terms before it have, or null.</param>
/// <param name="isSubtracted">Whether the term is taken off.</param>
/// <param name="isOnlyTerm">Whether it is the whole wave: then a level of zero is left to the wave's
/// scale.</param>
internal sealed class WaveTermLowering(CheckState state, Scope scope, Dimension? expected, bool isSubtracted,
    bool isOnlyTerm)
{
    private const int MostEdges = 100_000;

    /// <summary>Voltage or current, once a level has been read.</summary>
    public Dimension? Dimension { get; private set; }

    /// <summary>The level that the whole term is a multiple of, where it has one.</summary>
    public Evaluated? Level { get; private set; }

    /// <summary>The level of a term as written; null for straight lines.</summary>
    public static ExpressionSyntax? LevelOf(WavePieceSyntax piece) => piece switch
    {
        ConstantSyntax p => p.Level,
        StepSyntax p => p.Level,
        PulseSyntax p => p.Level,
        PulseTrainSyntax p => p.Level,
        RampSyntax p => p.Level,
        SineSyntax p => p.Amplitude,
        DecaySyntax p => p.Level,
        ImpulseSyntax p => p.Peak,
        _ => null,
    };

    public ImmutableArray<WavePiece>? Lower(WavePieceSyntax piece)
    {
        if (piece is StraightLinesSyntax lines)
        {
            return Lines(lines);
        }

        if (piece is StraightLinesFileSyntax file)
        {
            return File(file);
        }

        var level = ReadLevel(LevelOf(piece)!);
        var pieces = piece switch
        {
            ConstantSyntax => [Constant(level ?? 0)],
            StepSyntax step => Step(step, level ?? 0),
            PulseSyntax pulse => Pulse(pulse, level ?? 0),
            PulseTrainSyntax train => Train(train, level ?? 0),
            RampSyntax ramp => Ramp(ramp, level ?? 0),
            SineSyntax sine => new SineLowering(state, scope).Lower(sine, level ?? 0),
            DecaySyntax decay => Decay(decay, level ?? 0),
            ImpulseSyntax impulse => new ImpulseLowering(state, scope).Lower(impulse, level ?? 0, Dimension),
            _ => throw new System.Diagnostics.UnreachableException($"no wave for {piece}"),
        };
        return level is null ? null : pieces;
    }

    /// <summary>Signed level, in volts or amperes.</summary>
    private double? ReadLevel(ExpressionSyntax expression, bool isPoint = false)
    {
        if (state.Evaluator.Evaluate(expression, scope) is not { } value
            || !Fits(expression, value.Dimension))
        {
            return null;
        }

        var sign = isSubtracted ? -1 : 1;
        Level = value;
        return sign * (isOnlyTerm && !isPoint && value.Value == 0 ? 1 : value.Value);
    }

    private bool Fits(ExpressionSyntax expression, Dimension found)
    {
        if ((expected ?? Dimension) is { } other)
        {
            Dimension = other;
            return Expected.Matches(state.Findings, expression, found, other);
        }

        if (found == Text.Dimension.Voltage || found == Text.Dimension.Current)
        {
            Dimension = found;
            return true;
        }

        var text = state.Text(expression.Span);
        var isBare = expression is NumberSyntax { HasUnit: false };
        state.Findings.Error(expression.Span, isBare
            ? $"`{text}` has no unit; a source is in volts or amperes"
            : $"`{text}` is {Measure.Of(found).Phrase}; a source is in volts or amperes",
            isBare ? $"write `{UnitAdvice.WithUnit(text, "V")}` or `{UnitAdvice.WithUnit(text, "A")}`"
                : "what is written here must come out in volts or amperes");
        return false;
    }

    private static WavePiece Constant(double level) =>
        new(0, double.PositiveInfinity, level, 0, 0, 0, 0, "constant", IsPerpetual: true);

    private ImmutableArray<WavePiece>? Step(StepSyntax step, double level) =>
        Instants.Fixed(state, step.At, scope) is { } at ? [Held(at, level, $"step at {Time(at)}")] : null;

    private ImmutableArray<WavePiece>? Pulse(PulseSyntax pulse, double level)
    {
        if (Span(pulse.From, pulse.To, pulse.Span, "this pulse") is not { } span)
        {
            return null;
        }

        var name = $"pulse from {Time(span.From)}";
        return
        [
            Held(span.From, level, $"rise at {Time(span.From)}") with { Pulse = name },
            Held(span.To, -level, $"fall at {Time(span.To)}") with { Pulse = name },
        ];
    }

    private ImmutableArray<WavePiece>? Train(PulseTrainSyntax train, double level)
    {
        var width = Expected.Fixed(state, train.Width, scope, Text.Dimension.Time);
        var every = Expected.Fixed(state, train.Every, scope, Text.Dimension.Time);
        var from = Instants.Fixed(state, train.From, scope);
        var count = Expected.Fixed(state, train.Count, scope, Text.Dimension.None);
        if (width is not { } w || every is not { } p || from is not { } start || count is not { } n)
        {
            return null;
        }

        if (w <= 0 || w >= p)
        {
            state.Findings.Error(train.Width.Span,
                $"pulses {Amount.Of(w, "s")} wide do not fit a period of {Amount.Of(p, "s")}",
                "the width is more than zero and less than the period");
            return null;
        }

        if (n < 1 || n != Math.Round(n) || 2 * n > MostEdges)
        {
            state.Findings.Error(train.Count.Span, 2 * n > MostEdges
                ? $"this pulse train has {Amount.Of(2 * n, "")} edges; the most is 100 000"
                : $"`{state.Text(train.Count.Span)}` is not a number of pulses",
                2 * n > MostEdges ? "end the train with the study" : "write a whole number of one or more");
            return null;
        }

        var pieces = ImmutableArray.CreateBuilder<WavePiece>();
        for (var i = 0; i < (int)n; i++)
        {
            var rise = start + (i * p);
            var (pulse, fall) = ($"pulse {i + 1}", rise + w);
            var whole = $"{pulse} from {Time(rise)}";
            pieces.Add(Held(rise, level, $"rise of {pulse} at {Time(rise)}") with { Pulse = whole });
            pieces.Add(Held(fall, -level, $"fall of {pulse} at {Time(fall)}") with { Pulse = whole });
        }

        return pieces.ToImmutable();
    }

    private ImmutableArray<WavePiece>? Ramp(RampSyntax ramp, double level) =>
        Span(ramp.From, ramp.To, ramp.Span, "this ramp") is { } span
            ?
            [
                new WavePiece(span.From, span.To, 0, level / (span.To - span.From), 0, 0, 0,
                    $"ramp from {Time(span.From)} to {Time(span.To)}"),
                Held(span.To, level, $"hold from {Time(span.To)}") with { Continues = true },
            ]
            : null;

    private ImmutableArray<WavePiece>? Decay(DecaySyntax decay, double level)
    {
        var from = Instants.Fixed(state, decay.From, scope);
        var tau = Expected.PositiveTime(state, decay.TimeConstant, scope, "a time constant");
        return from is { } start && tau is { } t
            ? [new WavePiece(start, double.PositiveInfinity, level, 0, 1 / t, 0, 0,
                $"decay from {Time(start)}")]
            : null;
    }

    private ImmutableArray<WavePiece>? Lines(StraightLinesSyntax lines)
    {
        var points = new List<(double Time, double Level)>();
        foreach (var point in lines.Points)
        {
            var time = Expected.Fixed(state, point.Time, scope, Text.Dimension.Time);
            var level = ReadLevel(point.Level, isPoint: true);
            if (level is not null && Level is { } value)
            {
                Expected.Fixed(state, point.Level, value);
            }

            Level = null;
            if (time is not { } t || level is not { } v)
            {
                return null;
            }

            if (StraightLines.Mistake(points, t) is { } mistake)
            {
                state.Findings.Error(point.Span, mistake.Message, mistake.Advice);
                return null;
            }

            points.Add((t, v));
        }

        return StraightLines.Pieces(points);
    }

    private ImmutableArray<WavePiece>? File(StraightLinesFileSyntax file)
    {
        if (WaveFile.Read(state, file, expected) is not { } read)
        {
            return null;
        }

        Dimension = read.Dimension;
        return StraightLines.Pieces(
            [.. read.Points.Select(p => (p.Time, isSubtracted ? -p.Level : p.Level))]);
    }

    private (double From, double To)? Span(TimeSyntax? from, TimeSyntax to, TextSpan span, string what)
    {
        var first = Instants.Fixed(state, from, scope);
        var last = Instants.Fixed(state, to, scope);
        if (first is not { } a || last is not { } b)
        {
            return null;
        }

        if (b > a)
        {
            return (a, b);
        }

        state.Findings.Error(span, $"{what} ends at {Time(b)}, which is not after its start at {Time(a)}",
            "give the earlier time first");
        return null;
    }

    private static WavePiece Held(double from, double level, string label) =>
        new(from, double.PositiveInfinity, level, 0, 0, 0, 0, label);

    private static string Time(double seconds) => Amount.Of(seconds, "s");
}
