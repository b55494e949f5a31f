using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Figures;

/// <summary>A waveform within a window, as figures are read off it.</summary>
internal sealed class WindowedCurve
{
    private const int MostStretches = 1_000_000;

    private readonly Curve curve;
    private readonly TransientSolution solution;
    private FoundExtreme? greatest;
    private FoundExtreme? least;

    /// <summary>Looks at a curve through a window in seconds.</summary>
    public WindowedCurve(Curve curve, TransientSolution solution, double from, double until)
    {
        this.curve = curve;
        this.solution = solution;
        From = from;
        Until = until;
    }

    /// <summary>The window's start in seconds.</summary>
    public double From { get; }

    /// <summary>The window's end in seconds.</summary>
    public double Until { get; }

    /// <summary>The value just after the window's start.</summary>
    public double Start => curve.ValueAt(solution, From);

    /// <summary>The value at the window's end.</summary>
    public double End => curve.ValueAt(solution, Until, before: Until > From);

    /// <summary>The greatest value.</summary>
    public FoundExtreme Greatest => greatest ??= ExtremeSearch.Greatest(curve, From, Until, MostStretches);

    /// <summary>The least value.</summary>
    public FoundExtreme Least => least ??= ExtremeSearch.Least(curve, From, Until, MostStretches);

    /// <summary>The extreme of greatest magnitude.</summary>
    public FoundExtreme Peak => Math.Abs(Least.Value) > Math.Abs(Greatest.Value) ? Least : Greatest;

    /// <summary>The piece the peak stands on.</summary>
    public CurvePiece PeakPiece => curve.Pieces[Peak.Piece];

    /// <summary>The limit for t → ∞ if what is in force at the window's end went on; null where there is
    /// none.</summary>
    public double? Final
    {
        get
        {
            var last = solution.SegmentAt(Until, before: Until > From);
            return FinalValue.Of(new Curve(curve.Pieces[..(last + 1)]));
        }
    }

    /// <summary>The final value, where it is a change from the start worth speaking of; else null.</summary>
    public double? FinalAfterChange
    {
        get
        {
            const double leastChange = 1e-3; // of the peak: below it a response is one that returns
            return Final is { } final && Math.Abs(final - Start) > leastChange * Math.Abs(Peak.Value)
                ? final : null;
        }
    }

    /// <summary>The first instant at or after another one at which sign × value is at least sign ×
    /// level.</summary>
    public double? FirstReach(double sign, double level, double from)
    {
        foreach (var piece in curve.Pieces)
        {
            if (Inside(piece, from, Until) is { } inside
                && LevelSearch.First(piece, sign, sign * level, inside.From, inside.Until) is { } tau)
            {
                return piece.Segment.Start + tau;
            }
        }

        return null;
    }

    /// <summary>The last instant in the window at which sign × value is at least sign × level.</summary>
    public double? LastReach(double sign, double level)
    {
        foreach (var piece in curve.Pieces.Reverse())
        {
            if (Inside(piece, From, Until) is { } inside
                && LevelSearch.Last(piece, sign, sign * level, inside.From, inside.Until) is { } tau)
            {
                return piece.Segment.Start + tau;
            }
        }

        return null;
    }

    /// <summary>The part of a piece in a stretch of time, from the piece's start; null where there is none:
    /// at the stretch's ends only the inner value counts.</summary>
    private static (double From, double Until)? Inside(CurvePiece piece, double from, double until)
    {
        var a = Math.Max(0, from - piece.Segment.Start);
        var b = Math.Min(piece.Segment.Length, until - piece.Segment.Start);
        return a < b || (a == b && from == until) ? (a, b) : null;
    }
}
