using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Where a study ends whose file does not say.</summary>
internal static class StudyEnd
{
    /// <summary>How many periods of an undamped mode are looked at.</summary>
    public const double Periods = 20;

    /// <summary>How many time constants of a decaying mode are looked at: to 0.1 %.</summary>
    public static readonly double TimeConstants = Math.Log(1000);

    /// <summary>When the slowest decaying mode of the last interval has fallen to 0.1 %, or after 20 periods
    /// of the slowest undamped one, counted from the last event or source corner; null where neither
    /// exists.</summary>
    public static (double Time, string? Reason)? Of(Circuit circuit, IntervalModel model, double now)
    {
        var start = Math.Max(now, LastCorner(circuit));
        double longest = 0;
        var reason = string.Empty;
        foreach (var block in model.Blocks)
        {
            for (var i = 0; i < block.Size; i++)
            {
                var (re, im) = (block.T[i, i].Re.Hi, Math.Abs(block.T[i, i].Im.Hi));
                var isUndamped = IsUndamped(re, im);
                if (!isUndamped && re >= 0)
                {
                    continue;
                }

                var time = isUndamped ? Periods * 2 * Math.PI / im : TimeConstants / -re;
                if (time > longest)
                {
                    longest = time;
                    reason = isUndamped
                        ? $"20 periods of the slowest undamped mode, {Format(im / (2 * Math.PI), "Hz")}"
                        : $"the slowest mode, time constant {Format(-1 / re, "s")}, has fallen to 0.1 %";
                }
            }
        }

        return longest > 0 ? (start + longest, reason) : null;
    }

    /// <summary>Whether a mode loses no more than rounding of the parts' values.</summary>
    public static bool IsUndamped(double re, double im) => im > 0 && Math.Abs(re) < 1e-12 * im;

    /// <summary>What is said where nothing decays.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="now">The last event, in seconds.</param>
    public static Diagnostic Unknown(Circuit circuit, double now)
    {
        const double usual = 10e-3; // a suggestion where the file has no instant at all
        var last = Math.Max(now, LastCorner(circuit));
        var place = circuit.Parts.OfType<Switch>().SelectMany(s => s.Events).LastOrDefault()?.Span
            ?? (circuit.Parts.FirstOrDefault(p => p is VoltageSource or CurrentSource) ?? circuit.Parts[0])
                .Span;
        return Diagnostic.Error(
            circuit.Source,
            place,
            "nothing in this circuit decays or rings" + (last > 0 ? $" after {Format(last, "s")}" : "")
                + ", so the end of the study is not known",
            "say how long to look: write "
                + $"`until {EngineeringNumber.Format(last > 0 ? 2 * last : usual, "s", 2)}`")
            with
        { SaysTooLittle = true };
    }

    private static string Format(double value, string unit) => EngineeringNumber.Format(value, unit);

    /// <summary>The last instant at which a source has a corner, in seconds.</summary>
    public static double LastCorner(Circuit circuit)
    {
        double last = 0;
        foreach (var part in circuit.Parts)
        {
            var pieces = part switch
            {
                VoltageSource s => s.Wave.Pieces,
                CurrentSource s => s.Wave.Pieces,
                _ => ImmutableArray<WavePiece>.Empty,
            };
            foreach (var piece in pieces)
            {
                last = Math.Max(last, double.IsFinite(piece.End) ? piece.End : piece.Start);
            }
        }

        return last;
    }
}
