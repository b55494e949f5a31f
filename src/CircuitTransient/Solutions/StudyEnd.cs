using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Where a study ends whose file does not say.</summary>
internal static class StudyEnd
{
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
                // a loss below rounding of the parts' values
                var isUndamped = im > 0 && Math.Abs(re) < 1e-12 * im;
                if (!isUndamped && re >= 0)
                {
                    continue;
                }

                var time = isUndamped ? 20 * 2 * Math.PI / im : Math.Log(1000) / -re;
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

    /// <summary>What is said where nothing decays.</summary>
    public static Diagnostic Unknown(Circuit circuit) => Diagnostic.Error(
        circuit.Source,
        default,
        "nothing in this circuit decays or rings after the last event, so the end of the study is not known",
        "say how long to look: until 10 ms");

    private static string Format(double value, string unit) => EngineeringNumber.Format(value, unit);

    private static double LastCorner(Circuit circuit)
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
