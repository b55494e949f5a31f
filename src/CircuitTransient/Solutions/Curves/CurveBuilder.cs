using System.Collections.Immutable;
using System.Diagnostics;
using CircuitTransient.Circuits;

namespace CircuitTransient.Solutions.Curves;

/// <summary>Makes curves of measured quantities from a solution.</summary>
public sealed class CurveBuilder
{
    private const long MostNumbersKept = 8_000_000; // 64 MB

    private readonly TransientSolution solution;
    private readonly ImmutableArray<SegmentTable> tables;
    private readonly ImpulseWork impulses;
    private readonly (double From, double To)? window;
    private readonly Dictionary<(Measurand, Share, int), Curve?> curves = [];
    private readonly Dictionary<(int, Measurand, Share, int), LinearPiece?> linears = [];

    /// <summary>Tabulates a solution's segments.</summary>
    public CurveBuilder(TransientSolution solution)
    {
        this.solution = solution;
        impulses = new ImpulseWork(solution);
        var room = new StretchRoom(MostNumbersKept);
        tables = [.. solution.Segments.Select(s => new SegmentTable(s, room))];
    }

    /// <summary>Shares the tables of another: each thread has a builder of its own.</summary>
    public CurveBuilder(CurveBuilder other)
    {
        solution = other.solution;
        impulses = other.impulses;
        tables = other.tables;
    }

    /// <summary>Tabulates the segments of a solution, sharing what another has of them.</summary>
    public CurveBuilder(TransientSolution solution, CurveBuilder other)
    {
        this.solution = solution;
        impulses = new ImpulseWork(solution);
        var room = new StretchRoom(MostNumbersKept);
        tables = [.. solution.Segments.Select((s, i) =>
            i < other.tables.Length && ReferenceEquals(other.tables[i].Segment, s)
                ? other.tables[i]
                : new SegmentTable(s, room))];
    }

    private CurveBuilder(CurveBuilder other, (double From, double To) window)
        : this(other) => this.window = window;

    /// <summary>Makes curves that hold within a window only: what the equations leave open elsewhere counts
    /// as nothing there.</summary>
    public CurveBuilder Within((double From, double To) only) => new(this, only);

    /// <summary>The solution.</summary>
    public TransientSolution Solution => solution;

    /// <summary>The tables of the segments.</summary>
    public ImmutableArray<SegmentTable> Tables => tables;

    /// <summary>A quantity's curve; null where the equations leave it open.</summary>
    /// <param name="measurand">The quantity.</param>
    /// <param name="share">Whose part.</param>
    /// <param name="cause">Index of the cause, for <see cref="Share.Own"/> and <see
    /// cref="Share.Without"/>.</param>
    /// <param name="from">Since when an integral gathers, in seconds.</param>
    public Curve? Of(Measurand measurand, Share share = Share.Total, int cause = -1, double from = 0)
    {
        var key = (measurand, share, cause);
        if (from == 0 && curves.TryGetValue(key, out var known))
        {
            return known;
        }

        var curve = Build(measurand, share, cause, from);
        if (from == 0)
        {
            curves.Add(key, curve);
        }

        return curve;
    }

    /// <summary>A linear quantity without several causes; null where the equations leave it open.</summary>
    /// <param name="linear">The quantity.</param>
    /// <param name="causes">Indices of the causes.</param>
    public Curve? WithoutAll(Measurand linear, ImmutableArray<int> causes)
    {
        var pieces = ImmutableArray.CreateBuilder<CurvePiece>(tables.Length);
        for (var s = 0; s < tables.Length; s++)
        {
            var segment = tables[s].Segment;
            var left = causes.Aggregate(
                segment.Coefficients(linear),
                (rest, cause) => Difference(rest, segment.Coefficients(linear, cause)));
            if (Piece(s, left) is not { } piece)
            {
                return null;
            }

            pieces.Add(piece);
        }

        return new Curve(pieces.ToImmutable());
    }

    /// <summary>What two causes have together in a quadratic quantity; of one cause with itself, its own
    /// part.</summary>
    /// <param name="measurand">The quantity.</param>
    /// <param name="one">Index of a cause.</param>
    /// <param name="other">Index of a cause.</param>
    /// <param name="from">Since when an integral gathers, in seconds.</param>
    public Curve? OfPair(Measurand measurand, int one, int other, double from = 0)
    {
        var (factor, first, second, _) = QuantityFactors.OfAny(solution.Circuit, measurand)!;
        return Quadratic(measurand, Pair, Work, from);

        double Work(int part, int s) => one == other
            ? impulses.Of(part, s, one, one)
            : impulses.Of(part, s, one, other) + impulses.Of(part, s, other, one);

        QuadraticPiece? Pair(int s)
        {
            var (a, b) = (Linear(s, first, Share.Own, one), Linear(s, second, Share.Own, other));
            var (c, d) = (Linear(s, first, Share.Own, other), Linear(s, second, Share.Own, one));
            if (a is null || b is null || c is null || d is null)
            {
                return null;
            }

            var straight = new ProductTerm(factor, a, b);
            return new(tables[s], one == other ? [straight] : [straight, new ProductTerm(factor, c, d)]);
        }
    }

    private Curve? Build(Measurand measurand, Share share, int cause, double from)
    {
        if (QuantityFactors.IsQuadratic(measurand))
        {
            return Quadratic(
                measurand, s => Products(s, measurand, share, cause),
                (part, s) => impulses.Of(part, s, share, cause), from);
        }

        var pieces = ImmutableArray.CreateBuilder<CurvePiece>(tables.Length);
        for (var s = 0; s < tables.Length; s++)
        {
            if (Linear(s, measurand, share, cause) is not { } linear)
            {
                return null;
            }

            pieces.Add(linear);
        }

        return new Curve(pieces.ToImmutable());
    }

    /// <param name="measurand">The quantity.</param>
    /// <param name="products">Its products on a segment.</param>
    /// <param name="work">What a part takes in within the impulses at a segment's start, for an
    /// energy.</param>
    /// <param name="from">Since when an integral gathers, in seconds.</param>
    private Curve? Quadratic(
        Measurand measurand, Func<int, QuadraticPiece?> products, Func<int, int, double> work, double from)
    {
        var pieces = ImmutableArray.CreateBuilder<CurvePiece>(tables.Length);
        double gathered = 0;
        for (var s = 0; s < tables.Length; s++)
        {
            if (products(s) is not { } quadratic)
            {
                return null;
            }

            if (!IsAccumulated(measurand))
            {
                pieces.Add(quadratic);
                continue;
            }

            var set = Math.Clamp(from - tables[s].Segment.Start, 0, tables[s].Segment.Length);
            if (measurand is EnergyIn energy && tables[s].Segment.Start >= from)
            {
                gathered += (energy.Delivered ? -1 : 1) * work(energy.Part, s);
            }

            var accumulated = new AccumulatedPiece(quadratic, gathered, set);
            gathered = accumulated.AtEnd;
            pieces.Add(accumulated);
        }

        return new Curve(pieces.ToImmutable());
    }

    /// <summary>Whether a quantity is an integral over time: the energy of what does not store, a Joule
    /// integral.</summary>
    public bool IsAccumulated(Measurand measurand) =>
        QuantityFactors.OfAny(solution.Circuit, measurand) is { IsIntegrated: true };

    /// <summary>Since when a quantity gathers that is asked for in a window: a Joule integral since the
    /// window's start, an energy since t = 0.</summary>
    public static double GatheredFrom(Measurand measurand, double windowStart) =>
        measurand is JouleIntegral ? windowStart : 0;

    private LinearPiece? Linear(int s, Measurand measurand, Share share, int cause)
    {
        var key = (s, measurand, share, cause);
        if (!linears.TryGetValue(key, out var piece))
        {
            piece = share switch
            {
                Share.Total => Piece(s, tables[s].Segment.Coefficients(measurand)),
                Share.Own => Piece(s, tables[s].Segment.Coefficients(measurand, cause)),
                Share.Without => Piece(s, Difference(
                    tables[s].Segment.Coefficients(measurand),
                    tables[s].Segment.Coefficients(measurand, cause))),
                _ => throw new UnreachableException("a linear quantity has no joint part"),
            };
            linears.Add(key, piece);
        }

        return piece;
    }

    private LinearPiece? Piece(int s, double[]? coefficients)
    {
        var segment = tables[s].Segment;
        return coefficients is not null ? new LinearPiece(tables[s], coefficients)
            : segment.End <= window?.From || segment.Start >= window?.To
                ? new LinearPiece(tables[s], new double[segment.Basis.Width])
                : null;
    }

    private static double[]? Difference(double[]? a, double[]? b) =>
        a is null || b is null ? null : [.. a.Zip(b, (x, y) => x - y)];

    private QuadraticPiece? Products(int s, Measurand measurand, Share share, int cause)
    {
        var (factor, first, second, _) = QuantityFactors.OfAny(solution.Circuit, measurand)!;
        var terms = ImmutableArray.CreateBuilder<ProductTerm>();
        if (share != Share.Joint)
        {
            return Add(share, cause, factor) ? new QuadraticPiece(tables[s], terms.ToImmutable()) : null;
        }

        var isComplete = Add(Share.Total, -1, factor);
        for (var c = 0; c < solution.Causes.Length && isComplete; c++)
        {
            isComplete = Add(Share.Own, c, -factor);
        }

        // One cause alone has nothing joint; its products would cancel but for rounding.
        var isAlone = Enumerable.Range(0, solution.Causes.Length).Count(IsPresent) < 2;
        return isComplete ? new QuadraticPiece(tables[s], isAlone ? [] : terms.ToImmutable()) : null;

        bool IsPresent(int whose) =>
            Linear(s, first, Share.Own, whose) is { IsZero: false }
            || Linear(s, second, Share.Own, whose) is { IsZero: false };

        bool Add(Share of, int whose, double weight)
        {
            var a = Linear(s, first, of, whose);
            var b = first == second ? a : Linear(s, second, of, whose);
            if (a is null || b is null)
            {
                return false;
            }

            if (!a.IsZero && !b.IsZero)
            {
                terms.Add(new ProductTerm(weight, a, b));
            }

            return true;
        }
    }
}
