using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>Searches between neighbouring samples on the same side of zero for places on the other. Where the
/// slopes of two neighbours point to a dip towards zero, it is followed to its bottom by the root of the
/// slope; where the sharpest bend seen thereabouts, doubled, would reach zero between them, the stretch is
/// halved until it would not. Beside samples without a slope the dips that show in the values are followed by
/// golden sections. What bends more sharply than that between two samples, and back, is not seen.</summary>
public sealed class RangeDips
{
    private const int MostLooks = 300;
    private const int MostLooksFarOff = 60;
    private const double FarOff = 1e6; // of the function's size: where zero lies below all there is
    private const int MostLooksInDip = 40;
    private const int MostCompared = 12; // dips among samples without slopes
    private const int LooksToCompare = 24;
    private const double Doubled = 2; // how much sharper than seen a bend may be
    private const double Agreement = 0.1; // of how far a dip goes: as foreseen
    private const double Narrow = 1e-9; // of the range
    private const double Touching = 1e-11; // of the function's size: as good as zero
    private const double Golden = 0.3819660112501051; // (3 − √5)/2

    private readonly Func<double, SlopedSample> function;
    private readonly double range;
    private readonly double size;
    private int looks;

    private RangeDips(ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function, int looks)
    {
        (this.function, this.looks) = (function, looks);
        range = given[^1].X - given[0].X;
        size = given.Where(s => s.HasValue).Select(s => Math.Abs(s.Y)).DefaultIfEmpty().Max();
    }

    /// <summary>How many stretches were left before they hid nothing any more: because there are too many, or
    /// the function has no slope or no value there.</summary>
    public int LeftOver { get; private set; }

    /// <summary>Searches.</summary>
    /// <param name="given">Samples by place.</param>
    /// <param name="function">The function anywhere; every look is a call of it.</param>
    public static RangeDips Search(
        ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function)
    {
        var search = new RangeDips(given, function, MostLooks);
        given = search.Sloped(given);
        search.Follow(given);
        var compared = ComparedDips(given);
        search.LeftOver += Math.Max(0, compared.Length - MostCompared);
        foreach (var i in compared.Take(MostCompared))
        {
            search.Compare(given[i - 1], given[i], given[i + 1]);
        }

        return search;
    }

    /// <summary>Follows every dip to which slopes point, the deepest first, however far from zero, until it
    /// goes as its neighbours foretell: a resonance far narrower than the samples stand apart does
    /// not.</summary>
    /// <param name="given">Samples by place.</param>
    /// <param name="function">The function anywhere; every look is a call of it.</param>
    public static void Resolve(ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function)
    {
        var raised = FarOff * given.Where(s => s.HasValue).Select(s => Math.Abs(s.Y)).DefaultIfEmpty().Max();
        var samples = given.Select(Raised).ToImmutableArray();
        new RangeDips(samples, x => Raised(function(x)), MostLooksFarOff).Follow(samples);

        SlopedSample Raised(SlopedSample sample) => sample with { Y = sample.Y + raised };
    }

    private void Follow(ImmutableArray<SlopedSample> given)
    {
        var bends = given.Zip(given.Skip(1), Bend).ToArray();
        var stretches = Enumerable.Range(0, bends.Length)
            .Where(i => IsAlike(given[i], given[i + 1]) && given[i].HasSlope && given[i + 1].HasSlope)
            .Select(i => Stretch.Of(
                given[i], given[i + 1],
                Doubled * bends[Math.Max(0, i - 1)..Math.Min(bends.Length, i + 2)].Max()))
            .Where(stretch => stretch.IsDip || stretch.Bound < 0)
            .OrderBy(stretch => stretch.Promise);
        foreach (var stretch in stretches)
        {
            Follow(stretch, MostLooksInDip, isForeseen: false);
        }
    }

    /// <summary>Looks again about the dips beside which slopes are missing: a look may have one where a
    /// sample was taken without.</summary>
    private ImmutableArray<SlopedSample> Sloped(ImmutableArray<SlopedSample> given)
    {
        var samples = given.ToBuilder();
        foreach (var i in ComparedDips(given).Take(MostCompared))
        {
            for (var k = i - 1; k <= i + 1; k++)
            {
                if (!samples[k].HasSlope)
                {
                    samples[k] = Look(samples[k].X);
                    if (!samples[k].HasSlope)
                    {
                        break;
                    }
                }
            }
        }

        return samples.ToImmutable();
    }

    /// <summary>The samples nearest to zero thereabouts beside which a slope is missing, the nearest
    /// first.</summary>
    private static int[] ComparedDips(ImmutableArray<SlopedSample> given) =>
    [
        .. Enumerable.Range(1, Math.Max(0, given.Length - 2))
            .Where(i => IsAlike(given[i - 1], given[i]) && IsAlike(given[i], given[i + 1])
                && !(given[i - 1].HasSlope && given[i].HasSlope && given[i + 1].HasSlope)
                && Math.Abs(given[i].Y) <= Math.Abs(given[i - 1].Y)
                && Math.Abs(given[i].Y) < Math.Abs(given[i + 1].Y))
            .OrderBy(i => Math.Abs(given[i].Y)),
    ];

    /// <summary>Looks into a stretch, and into its parts while they may hide something.</summary>
    /// <returns>Whether that is all: a place on the other side of zero was met, or it was left.</returns>
    private bool Follow(Stretch stretch, int left, bool isForeseen)
    {
        var isOpen = stretch.Bound < 0 || (stretch.IsDip && !isForeseen);
        if (!isOpen || stretch.Length <= Narrow * range || stretch.Least <= Touching * size)
        {
            return false;
        }

        var x = stretch.Place(left);
        var sample = left > 0 && looks > 0 ? Look(x) : new SlopedSample(x, double.NaN, double.NaN);
        if (!sample.HasValue || !sample.HasSlope)
        {
            LeftOver++;
            return true;
        }

        if (!IsAlike(sample, stretch.Left))
        {
            return true; // between it and the neighbours is the root
        }

        var foreseen = SlopedSample.Cubic(stretch.Left, stretch.Right, x);
        var goes = Math.Max(Math.Abs(stretch.Left.Y - foreseen), Math.Abs(stretch.Right.Y - foreseen));
        var isAsForeseen = isForeseen || Math.Abs(sample.Y - foreseen) <= Agreement * goes;
        var bend = Doubled * Math.Max(Bend(stretch.Left, sample), Bend(sample, stretch.Right));
        var (below, above) = (
            Stretch.Of(stretch.Left, sample, bend), Stretch.Of(sample, stretch.Right, bend));
        var (first, second) = below.Promise <= above.Promise ? (below, above) : (above, below);
        return Follow(first, left - 1, isAsForeseen) || Follow(second, left - 1, isAsForeseen);
    }

    private void Compare(SlopedSample low, SlopedSample middle, SlopedSample high)
    {
        for (var k = 0; k < LooksToCompare && high.X - low.X > Narrow * range && looks > 0; k++)
        {
            var isRight = high.X - middle.X > middle.X - low.X;
            var sample = Look(middle.X + (Golden * (isRight ? high.X - middle.X : low.X - middle.X)));
            if (!IsAlike(sample, middle))
            {
                return;
            }

            if (Math.Abs(sample.Y) <= Math.Abs(middle.Y))
            {
                (low, high) = isRight ? (middle, high) : (low, middle);
                middle = sample;
            }
            else
            {
                (low, high) = isRight ? (low, sample) : (sample, high);
            }
        }
    }

    private SlopedSample Look(double x)
    {
        looks--;
        return function(x);
    }

    private static bool IsAlike(SlopedSample one, SlopedSample other) =>
        one.HasValue && other.HasValue && one.Y >= 0 == other.Y >= 0;

    /// <summary>The greatest second derivative of the cubic through two samples; zero where there is
    /// none.</summary>
    private static double Bend(SlopedSample left, SlopedSample right)
    {
        var h = right.X - left.X;
        var mean = (right.Y - left.Y) / h;
        var bend = Math.Max(
            Math.Abs((6 * mean) - (4 * left.Slope) - (2 * right.Slope)),
            Math.Abs((2 * left.Slope) + (4 * right.Slope) - (6 * mean))) / h;
        return double.IsFinite(bend) ? bend : 0;
    }

    /// <summary>Two neighbours as if zero lay below both.</summary>
    /// <param name="Bound">The least value between them, if the function bends no more than it may.</param>
    /// <param name="At">Where that would be.</param>
    private readonly record struct Stretch(SlopedSample Left, SlopedSample Right, double Bound, double At)
    {
        public double Length => Right.X - Left.X;

        public double Least => Math.Min(Math.Abs(Left.Y), Math.Abs(Right.Y));

        /// <summary>Whether the slopes point to a dip between them.</summary>
        public bool IsDip => Sign * Left.Slope < 0 && Sign * Right.Slope > 0;

        /// <summary>How low it may go; the lowest is looked at first.</summary>
        public double Promise => IsDip
            ? Math.Min(Bound, Sign * (Left.Y + (Left.Slope * (Meet - Left.X))))
            : Bound;

        private int Sign => Left.Y >= 0 ? 1 : -1;

        /// <summary>Where the tangents meet.</summary>
        private double Meet =>
            Left.X + ((Right.Y - Left.Y - (Right.Slope * Length)) / (Left.Slope - Right.Slope));

        public static Stretch Of(in SlopedSample left, in SlopedSample right, double bend)
        {
            var sign = left.Y >= 0 ? 1 : -1;
            var (a, b) = (sign * left.Y, sign * right.Y);
            var (s, t) = (sign * left.Slope, sign * right.Slope);
            var h = right.X - left.X;

            // a + s u − bend u²/2 and b − t v − bend v²/2 with v = h − u: the higher of both is a bound, and
            // least where they are equal or at an end.
            var u = (b - a - (t * h) - (bend * h * h / 2)) / (s - t - (bend * h));
            u = double.IsFinite(u) ? Math.Clamp(u, 0, h) : h / 2;
            var v = h - u;
            var bound = Math.Max(a + (s * u) - (bend * u * u / 2), b - (t * v) - (bend * v * v / 2));
            return new Stretch(left, right, Math.Min(bound, Math.Min(a, b)), left.X + u);
        }

        /// <summary>Where to look next: at the root of the cubic's slope, where the tangents meet, in the
        /// middle, in turn.</summary>
        public double Place(int left)
        {
            var middle = Left.X + (Length / 2);
            var place = !IsDip ? At : (left % 3) switch
            {
                1 => SlopedSample.CubicMaximum(Turned(Left), Turned(Right)),
                0 => Meet,
                _ => middle,
            };
            return place > Left.X && place < Right.X ? place : middle;
        }

        private SlopedSample Turned(SlopedSample sample) => Sign > 0 ? sample.Negate() : sample;
    }
}
