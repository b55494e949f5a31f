namespace CircuitTransient.Solutions.Curves;

/// <summary>Finds when a curve reaches a level, on its closed form: stretches whose upper bound stays below
/// the level are ruled out, monotone ones are bracketed, the others are halved.</summary>
public static class LevelSearch
{
    private const int MostStretches = 200_000;

    /// <summary>The first instant of a piece, in seconds from its start, at which sign × value is at least a
    /// level.</summary>
    /// <param name="piece">The piece.</param>
    /// <param name="sign">+1 to wait for a rise above, −1 for a fall below.</param>
    /// <param name="level">The level times the sign.</param>
    /// <param name="from">Where the search begins.</param>
    /// <param name="until">Where it ends.</param>
    /// <returns>The instant; null where the level is not reached.</returns>
    public static double? First(CurvePiece piece, double sign, double level, double from, double until) =>
        Search(piece, sign, level, from, until, forwards: true);

    /// <summary>The last instant of a piece at which sign × value is at least a level.</summary>
    public static double? Last(CurvePiece piece, double sign, double level, double from, double until) =>
        Search(piece, sign, level, from, until, forwards: false);

    private static double? Search(
        CurvePiece piece, double sign, double level, double from, double until, bool forwards)
    {
        var near = forwards ? from : until;
        if (sign * piece.ValueAt(near) >= level)
        {
            return near;
        }

        var stretches = new Stack<(double From, double Until)>();
        foreach (var stretch in Stretches(piece.Table.Instants, from, until, backwards: forwards))
        {
            stretches.Push(stretch);
        }

        for (var k = 0; stretches.TryPop(out var stretch) && k < MostStretches; k++)
        {
            var (a, b) = stretch;
            var look = Look(piece, sign, level, a, b);
            if (look == Finding.Halve)
            {
                var middle = a + ((b - a) / 2);
                stretches.Push(forwards ? (middle, b) : (a, middle));
                stretches.Push(forwards ? (a, middle) : (middle, b));
            }
            else if (look == Finding.Monotone && Reaches(piece, sign, level, forwards ? b : a))
            {
                return Bracket(piece, sign, level, a, b, forwards);
            }
        }

        return null;
    }

    /// <summary>The tabulated stretches, in the order in which a stack is to be filled.</summary>
    private static IEnumerable<(double From, double Until)> Stretches(
        double[] instants, double from, double until, bool backwards)
    {
        var inner = Enumerable.Range(0, instants.Length - 1)
            .Select(k => (From: Math.Max(from, instants[k]), Until: Math.Min(until, instants[k + 1])))
            .Where(s => s.From < s.Until);
        return backwards ? inner.Reverse() : inner;
    }

    private enum Finding
    {
        Below,
        Monotone,
        Halve,
    }

    private static Finding Look(CurvePiece piece, double sign, double level, double a, double b)
    {
        var middle = a + ((b - a) / 2);
        var model = piece.Between(a, b);
        return model.Upper(sign) < level ? Finding.Below
            : model.IsMonotone || middle <= a || middle >= b ? Finding.Monotone
            : Finding.Halve;
    }

    private static bool Reaches(CurvePiece piece, double sign, double level, double tau) =>
        sign * piece.ValueAt(tau) >= level;

    /// <summary>The crossing of a monotone stretch, halved until neighbouring numbers hold it.</summary>
    private static double Bracket(CurvePiece piece, double sign, double level, double a, double b,
        bool forwards)
    {
        var (below, reached) = forwards ? (a, b) : (b, a);
        while (true)
        {
            var middle = below + ((reached - below) / 2);
            if (middle == below || middle == reached)
            {
                return reached;
            }

            if (Reaches(piece, sign, level, middle))
            {
                reached = middle;
            }
            else
            {
                below = middle;
            }
        }
    }
}
