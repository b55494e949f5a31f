using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Draws;

public sealed partial class DrawWorkspace
{
    // A jump or an impulse below the first is rounding; between the two the exact engine must judge.
    private const double NoJump = 1e-10;
    private const double SureJump = 1e-7;

    private readonly bool[] served; // for every function

    private void ClearTracks()
    {
        for (var t = 0; t < tracks.Length; t++)
        {
            tracks[t].Clear(Factor(kernel.Figures.Tracks[t].Factor));
        }
    }

    private double Factor(TrackFactor factor) => factor.Sign * factor.Kind switch
    {
        FactorKind.HalfOfStore => kernel.Circuit.Original.Parts[factor.Index] switch
        {
            Capacitor c => FormulaValue.Of(c.Capacitance, parameters) / 2,
            Inductor l => FormulaValue.Of(l.Inductance, parameters) / 2,
            _ => throw new System.Diagnostics.UnreachableException("not a store"),
        },
        FactorKind.Mutual => kernel.Values.Mutual(factor.Index, parameters, out _),
        _ => 1,
    };

    private void PutWindows()
    {
        for (var w = 0; w < windowFrom.Length; w++)
        {
            hasWindow[w] = times.Of(
                kernel.Figures.Windows[w], parameters, out windowFrom[w], out windowTo[w]);
        }
    }

    /// <summary>Notes impulses of followed functions at a segment's start.</summary>
    /// <returns>False where rounding and an impulse cannot be told apart.</returns>
    private bool PutImpulses(DrawSegment segment, ClosedForm form)
    {
        var isSure = true;
        for (var f = 0; f < served.Length; f++)
        {
            var function = kernel.Figures.Functions[f];
            if (!served[f] || function.Order > 0)
            {
                continue;
            }

            double sum = 0, size = 0;
            if (segment.BeginsInterval)
            {
                for (var k = 0; k < stored.Length; k++)
                {
                    Add(form.Impulses[(function.Row * stored.Length) + k] * stored[k], ref sum, ref size);
                }
            }

            for (var s = 0; s < shifts.Length; s++)
            {
                var rate = form.Rates[(function.Row * shifts.Length) + s];
                if (rate != 0)
                {
                    Add(rate * kernel.Waves.Onset(segment.Start, s, segment.BeginsInterval, factors, shifts),
                        ref sum, ref size);
                }
            }

            var impulse = Judged(sum, size, ref isSure);
            segment.Impulse[f] = impulse;
        }

        return isSure;

        static void Add(double term, ref double sum, ref double size)
        {
            sum += term;
            size = Math.Max(size, Math.Abs(term));
        }
    }

    private static double Judged(double value, double size, ref bool isSure)
    {
        var magnitude = Math.Abs(value);
        isSure &= magnitude <= NoJump * size || magnitude >= SureJump * size;
        return magnitude <= NoJump * size ? 0 : value;
    }

    /// <summary>When tracks are infinite: at impulses, and rates where something jumps.</summary>
    private bool FindInfinities()
    {
        var isSure = true;
        for (var s = 0; s < segmentCount; s++)
        {
            for (var t = 0; t < tracks.Length; t++)
            {
                var track = kernel.Figures.Tracks[t];
                var time = segments[s].Start;
                if (!IsFollowed(t) || time < windowFrom[track.Window] || time > windowTo[track.Window]
                    || (time == windowTo[track.Window] && time > windowFrom[track.Window]))
                {
                    continue;
                }

                var (up, down) = InfinityOf(track, s, ref isSure);
                tracks[t].Up = up && double.IsNaN(tracks[t].Up) ? time : tracks[t].Up;
                tracks[t].Down = down && double.IsNaN(tracks[t].Down) ? time : tracks[t].Down;
            }
        }

        return isSure;
    }

    private bool IsFollowed(int t)
    {
        var track = kernel.Figures.Tracks[t];
        return hasWindow[track.Window] && served[track.First] && (track.Second < 0 || served[track.Second]);
    }

    private (bool Up, bool Down) InfinityOf(DrawTrack track, int s, ref bool isSure)
    {
        var function = kernel.Figures.Functions[track.First];
        if (function.Order == 0)
        {
            var impulse = segments[s].Impulse[track.First];
            if (track.Second >= 0)
            {
                isSure &= impulse == 0 && segments[s].Impulse[track.Second] == 0;
                return (false, false);
            }

            impulse *= track.Factor.Sign;
            return (impulse > 0, impulse < 0);
        }

        var of = kernel.Figures.Functions.IndexOf(function with { Order = function.Order - 1 });
        if (function.Order > 1 || segments[s].Impulse[of] != 0)
        {
            isSure &= function.Order == 1;
            return (true, true);
        }

        var jump = JumpAt(of, s, ref isSure);
        return (jump > 0, jump < 0);
    }

    /// <summary>By how much a function jumps at a segment's start; zero at the study's start.</summary>
    private double JumpAt(int function, int s, ref bool isSure)
    {
        if (s == 0)
        {
            return 0;
        }

        segments[s].Evaluate(0, startSlots);
        segments[s - 1].Evaluate(segments[s - 1].End - segments[s - 1].Start, endSlots);
        var jump = segments[s].Value(function, startSlots) - segments[s - 1].Value(function, endSlots);
        var size = Math.Max(ErrorOf(segments[s], function).Size, ErrorOf(segments[s - 1], function).Size);
        return Judged(jump, size, ref isSure);
    }

    private bool Search()
    {
        for (var s = 0; s < segmentCount; s++)
        {
            var segment = segments[s];
            var count = PutCuts(segment);
            for (var k = 0; k + 1 < count; k++)
            {
                for (var t = 0; t < tracks.Length; t++)
                {
                    var w = kernel.Figures.Tracks[t].Window;
                    isOpen[t] = IsFollowed(t) && windowFrom[w] <= cuts[k] && windowTo[w] >= cuts[k + 1];
                }

                if (!walk.Run(segment, cuts[k], cuts[k + 1], isOpen, tracks))
                {
                    return false;
                }
            }

            for (var t = 0; t < tracks.Length; t++)
            {
                TakeTrack(segment, t);
            }
        }

        return true;
    }

    /// <summary>Errors of a track, and its value where its window is a single instant.</summary>
    private void TakeTrack(DrawSegment segment, int t)
    {
        var track = kernel.Figures.Tracks[t];
        var (from, to) = (windowFrom[track.Window], windowTo[track.Window]);
        if (!IsFollowed(t))
        {
            return;
        }

        var (size, error) = ErrorOf(segment, track.First);
        error += inherited * size;
        if (track.Second >= 0)
        {
            var (other, otherError) = ErrorOf(segment, track.Second);
            error = (error * other) + (size * (otherError + (inherited * other)));
            size *= other;
        }

        ref var state = ref tracks[t];
        state.Size = Math.Max(state.Size, Math.Abs(state.Factor) * size);
        if (from > segment.End || to < segment.Start)
        {
            return;
        }

        state.Error = Math.Max(state.Error, Math.Abs(state.Factor) * error);
        if (from == to)
        {
            walk.Touch(segment, from, t, ref state);
        }
    }

    /// <summary>The segment's ends and the windows' ends inside it, in order.</summary>
    private int PutCuts(DrawSegment segment)
    {
        var count = 0;
        cuts[count++] = segment.Start;
        cuts[count++] = segment.End;
        for (var w = 0; w < windowFrom.Length; w++)
        {
            if (!hasWindow[w])
            {
                continue;
            }

            count = Put(windowFrom[w], count);
            count = Put(windowTo[w], count);
        }

        Array.Sort(cuts, 0, count);
        return count;

        int Put(double time, int count)
        {
            if (time > segment.Start && time < segment.End && Array.IndexOf(cuts, time, 0, count) < 0)
            {
                cuts[count++] = time;
            }

            return count;
        }
    }
}
