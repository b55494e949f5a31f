
namespace CircuitTransient.Solutions.Curves;

/// <summary>The instants and weights that integrate products of a segment's functions to rounding: panels
/// that the fastest living function crosses in at most two time constants, by the rules of Gauss and
/// Legendre.</summary>
internal static class Quadrature
{
    private const int MostPanels = 100_000;

    /// <summary>Visits the nodes between two instants.</summary>
    public static void Visit(SegmentBasis basis, double from, double until, Action<double, double> node)
    {
        while (from < until)
        {
            var (stop, fastest) = Living(basis, from, until);
            var panels = (int)Math.Clamp(Math.Ceiling(fastest * (stop - from) / 2), 1, MostPanels);
            var half = (stop - from) / (2 * panels);
            var (nodes, weights) = GaussLegendre.For(fastest * 2 * half);
            for (var p = 0; p < panels; p++)
            {
                var middle = from + (((2 * p) + 1) * half);
                for (var k = 0; k < nodes.Length; k++)
                {
                    node(middle - (half * nodes[k]), half * weights[k]);
                    node(middle + (half * nodes[k]), half * weights[k]);
                }
            }

            from = stop;
        }
    }

    /// <summary>How fast the living functions are, and until when that stays so.</summary>
    private static (double Stop, double Fastest) Living(SegmentBasis basis, double from, double until)
    {
        const double dead = 40; // e^-40 is below the rounding of what it was
        var stop = until;
        double fastest = 0;
        foreach (var mode in basis.Modes)
        {
            if (mode.Decay * from >= dead)
            {
                continue;
            }

            fastest = Math.Max(fastest, mode.Speed);
            var death = dead / mode.Decay;
            if (death > from && death < stop)
            {
                stop = death;
            }
        }

        return (stop, fastest);
    }
}
