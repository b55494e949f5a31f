using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>What one set of switch positions does to stored quantities and source states (a row y = (q, w))
/// over any duration: y(t) = y Π e^(At), with Π and A taken from one shifted solve, no pole and no
/// eigenvector sought. Π is the jump to what the circuit can hold: charge kept at nodes, flux in
/// loops.</summary>
/// <remarks>The exponential is a Taylor polynomial of degree 25 on a step h where h·ρ ≤ 1, squared again and
/// again (C. Moler, C. Van Loan, "Nineteen dubious ways to compute the exponential of a matrix, twenty-five
/// years later", SIAM Review 45 (2003), method 3, from memory; ρ after A. Al-Mohy, N. Higham, SIAM J. Matrix
/// Anal. Appl. 31 (2009), from memory). In double-doubles the squarings lose 2⁻¹⁰⁴ρt, so a time constant
/// 10¹² times longer than the shortest keeps its last digit.</remarks>
internal sealed class Propagator
{
    private const int Degree = 25;
    private const double TruncationPerStep = 2.5e-27; // 1/26!
    private const double WidestShift = 4096; // times ρ, above which a second, nearer shift pays for itself
    private const double NearShift = 16; // times ρ

    private readonly ShiftedSolve solve;
    private readonly SplitMatrix? projection; // null where nothing jumps: the unit matrix
    private readonly SplitMatrix rate;
    private readonly List<SplitMatrix> ladder = []; // e^(A h 2ᵏ)
    private readonly double step;

    private Propagator(
        ShiftedSolve solve, SplitMatrix? projection, SplitMatrix rate, SplitMatrix[] powers, double radius)
    {
        (this.solve, this.projection, this.rate, Radius) = (solve, projection, rate, radius);
        step = Math.ScaleB(1, -Math.ILogB(radius) - 1);
        ladder.Add(Exponential(powers, step));
    }

    /// <summary>An upper estimate of the fastest rate in 1/s, oscillations and sources included.</summary>
    public double Radius { get; }

    /// <summary>Multiply-adds of double-doubles that making one costs, at least.</summary>
    public static double CostOf(DescriptorEquations equations, InputModel inputs)
    {
        double states = equations.Storage.Count + inputs.StateCount;
        double unknowns = equations.Unknowns.UnknownCount + inputs.StateCount;
        return (2 * unknowns * unknowns * ((unknowns / 3) + states)) + (60 * states * states * states);
    }

    /// <summary>The propagator of some equations; null where they have no unique solution.</summary>
    /// <param name="rateBound">A rate beyond every pole, 1/s.</param>
    /// <param name="slowest">A rate below which nothing moves within the study, 1/s.</param>
    public static Propagator? Of(
        DescriptorEquations equations, InputModel inputs, double rateBound, double slowest)
    {
        const int MostShifts = 4;
        var shift = Math.ScaleB(1, Math.ILogB(Math.Max(rateBound, slowest) * NearShift));
        for (var attempt = 1; ; attempt++)
        {
            if (ShiftedSolve.At(equations, inputs, shift) is not { } solve || Split(solve) is not { } split)
            {
                return null;
            }

            var (projection, rate) = split;
            var powers = PowersOf(rate);
            var radius = Math.Max(RadiusOf(powers), slowest);
            if (radius * WidestShift >= shift || attempt == MostShifts)
            {
                return new Propagator(solve, projection, rate, powers, radius);
            }

            shift = Math.ScaleB(1, Math.ILogB(radius * NearShift) + 1);
        }
    }

    /// <summary>A row of states from stored quantities (C, Wb) and source states.</summary>
    public SplitMatrix Row(ReadOnlySpan<DoubleDouble> stored, ReadOnlySpan<DoubleDouble> sources)
    {
        var row = new SplitMatrix(1, solve.Scale.Length);
        for (var i = 0; i < row.Columns; i++)
        {
            var value = i < stored.Length ? stored[i] : sources[i - stored.Length];
            row[0, i] = DoubleDouble.ScaleByPowerOfTwo(value, -solve.Scale[i]);
        }

        return row;
    }

    /// <summary>The stored quantities (C, Wb) of a row of states.</summary>
    public DoubleDouble[] Stored(SplitMatrix row, int count)
    {
        var stored = new DoubleDouble[count];
        for (var i = 0; i < count; i++)
        {
            stored[i] = DoubleDouble.ScaleByPowerOfTwo(row[0, i], solve.Scale[i]);
        }

        return stored;
    }

    /// <summary>The states just after the circuit is left with those of <paramref name="row"/>.</summary>
    public SplitMatrix Settle(SplitMatrix row) => projection is null ? row : row * projection;

    /// <summary>The rate of change of the states, per second.</summary>
    public SplitMatrix Rate(SplitMatrix row) => row * rate;

    /// <summary>Every unknown that goes with settled states, from (sE + G) x = P (s q − q′).</summary>
    public SplitMatrix Unknowns(SplitMatrix row) =>
        row.Times(solve.Shift).Plus(-DoubleDouble.One, Rate(row)) * solve.Unknowns;

    /// <summary>The impulse of every unknown where states jump from a row to a settled one, in volt-seconds
    /// and coulombs.</summary>
    public SplitMatrix Impulses(SplitMatrix before, SplitMatrix settled) =>
        before.Plus(-DoubleDouble.One, settled) * solve.Unknowns;

    /// <summary>The states a duration (s) later.</summary>
    public SplitMatrix Advance(SplitMatrix row, DoubleDouble duration)
    {
        var rungs = 0;
        while (duration.Hi >= Math.ScaleB(step, rungs + 1))
        {
            rungs++;
        }

        for (var k = rungs; k >= 0; k--)
        {
            DoubleDouble length = Math.ScaleB(step, k);
            if (duration >= length)
            {
                row *= Rung(k);
                duration -= length;
            }
        }

        // Rounding gathers in the directions that Π forbids, where nothing decays, and currents follow from
        // it times the shift: it is projected away again.
        return Settle(Taylor(row, duration));
    }

    /// <summary>The relative error that truncation and squaring leave over a duration, estimated.</summary>
    public double ErrorOver(double duration) =>
        (TruncationPerStep + (64 * DoubleDouble.Rounding)) * (1 + (duration * Radius));

    private SplitMatrix Rung(int k)
    {
        while (ladder.Count <= k)
        {
            ladder.Add(ladder[^1] * ladder[^1]);
        }

        return ladder[k];
    }

    private SplitMatrix Taylor(SplitMatrix row, DoubleDouble duration)
    {
        var sum = row;
        var term = row;
        for (var k = 1; k <= Degree && !duration.IsZero; k++)
        {
            term = (term * rate).Times(duration / k);
            sum = sum.Plus(1, term);
            if (k > 2 && term.RowNorm() <= DoubleDouble.Rounding * sum.RowNorm() * 1e-3)
            {
                break;
            }
        }

        return sum;
    }

    // s K = Π + A/s + …: its eigenvalues are s/(s − λ), near 1 for every finite pole since s is beyond them
    // all, and 0 for the infinite ones. Π → 3Π² − 2Π³ moves each to the nearer of 0 and 1. On the range of Π
    // the inverse of s K is I − A/s.
    private static (SplitMatrix? Projection, SplitMatrix Rate)? Split(ShiftedSolve solve)
    {
        DoubleDouble shift = solve.Shift;
        var scaled = solve.Storage.Times(shift);
        var unit = SplitMatrix.Unit(scaled.Rows);
        if (scaled.Plus(-DoubleDouble.One, unit).RowNorm() < 0.5)
        {
            return Inverse(scaled) is { } inverse
                ? (null, unit.Plus(-DoubleDouble.One, inverse).Times(shift))
                : null;
        }

        if (ProjectionOf(scaled) is not { } projection
            || Inverse(scaled.Plus(1, unit).Plus(-DoubleDouble.One, projection)) is not { } regular)
        {
            return null;
        }

        return (projection, projection.Plus(-DoubleDouble.One, projection * regular).Times(shift));
    }

    private static SplitMatrix? ProjectionOf(SplitMatrix scaled)
    {
        const int MostSteps = 60;
        const double Converged = 1e-20; // the next step squares it
        var nearly = scaled;
        var isLast = false;
        for (var k = 0; k < MostSteps; k++)
        {
            var square = nearly * nearly;
            var next = square.Times(3).Plus(-2, square * nearly);
            if (isLast)
            {
                return next;
            }

            isLast = next.Plus(-DoubleDouble.One, nearly).RowNorm() <= Converged * next.RowNorm();
            nearly = next;
        }

        return null;
    }

    private static SplitMatrix? Inverse(SplitMatrix a)
    {
        var system = new SplitMatrix(a.Rows, 2 * a.Rows);
        for (var i = 0; i < a.Rows; i++)
        {
            for (var j = 0; j < a.Rows; j++)
            {
                system[i, j] = a[i, j];
            }

            system[i, a.Rows + i] = 1;
        }

        return SplitElimination.Solve(system, equilibrates: false);
    }

    // A, A², … A⁵.
    private static SplitMatrix[] PowersOf(SplitMatrix rate)
    {
        var square = rate * rate;
        var fourth = square * square;
        return [rate, square, square * rate, fourth, fourth * rate];
    }

    private static double RadiusOf(SplitMatrix[] powers) =>
        Math.Min(
            powers[0].RowNorm(),
            Math.Max(Math.Pow(powers[3].RowNorm(), 0.25), Math.Pow(powers[4].RowNorm(), 0.2)));

    // Σ (hA)ᵏ/k! up to degree 25, five terms at a time.
    private static SplitMatrix Exponential(SplitMatrix[] powers, double h)
    {
        var size = powers[0].Rows;
        var unit = SplitMatrix.Unit(size);
        var inverseFactorials = new DoubleDouble[Degree + 1];
        inverseFactorials[0] = 1;
        for (var k = 1; k <= Degree; k++)
        {
            inverseFactorials[k] = inverseFactorials[k - 1] / k;
        }

        var fifth = powers[4].Times(Math.Pow(h, 5));
        var sum = unit.Times(inverseFactorials[Degree]);
        for (var block = 4; block >= 0; block--)
        {
            sum = (sum * fifth).Plus(inverseFactorials[5 * block], unit);
            for (var k = 1; k < 5; k++)
            {
                sum = sum.Plus(inverseFactorials[(5 * block) + k] * Math.Pow(h, k), powers[k - 1]);
            }
        }

        return sum;
    }
}
