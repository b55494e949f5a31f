using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>A pole as it is shown: a real one, or a complex pair by its upper member.</summary>
/// <param name="Value">The pole, in reciprocals of the time unit; its imaginary part is zero or
/// positive.</param>
/// <param name="Multiplicity">How many poles (or pairs) coincide here to working accuracy.</param>
public sealed record PoleGroup(Complex Value, int Multiplicity);

/// <summary>The poles of a matrix as they are shown, those that coincide counted once.</summary>
public static class PoleGroups
{
    private const double InputRounding = 2.2e-16; // the matrix came from doubles
    private const double Slack = 8; // on the root of it; trials spread by up to 4
    private const double Widest = 0.2; // what the eye tells apart is not one pole, whatever its blur
    private const double SemisimpleRounding = 1e-13;
    private const double AxisRounding = 1e-22; // a resistance that small beside a reactance is no part's

    /// <summary>A pole, on the imaginary axis where only rounding in double-double keeps it off: a lossless
    /// network neither decays nor grows.</summary>
    public static Complex OnAxis(Complex pole) =>
        Math.Abs(pole.Real) <= AxisRounding * Math.Abs(pole.Imaginary)
            ? new Complex(0, pole.Imaginary)
            : pole;

    /// <summary>The poles of all blocks of a matrix, smallest first.</summary>
    public static ImmutableArray<PoleGroup> Of(ImmutableArray<SpectralBlock> blocks)
    {
        IEnumerable<PoleGroup> groups = blocks.SelectMany(block => OfBlock(block, block.V.Rows))
            .OrderBy(group => group.Value.Magnitude)
            .ThenBy(group => group.Value.Imaginary)
            .ThenBy(group => group.Value.Real);
        List<PoleGroup> merged = [];
        foreach (var group in groups)
        {
            var twin = merged.FindLastIndex(other => Coincide(group, other));
            if (twin < 0)
            {
                merged.Add(group);
            }
            else
            {
                var together = merged[twin].Multiplicity + group.Multiplicity;
                merged[twin] = merged[twin] with { Multiplicity = together };
            }
        }

        return [.. merged];
    }

    private static bool Coincide(PoleGroup a, PoleGroup b) =>
        (a.Value - b.Value).Magnitude <= SemisimpleRounding * Math.Max(a.Value.Magnitude, b.Value.Magnitude);

    /// <summary>Within a block, the largest sets whose spread rounding of the input explains count as one
    /// pole: an m-fold pole is blurred to the m-th root (J. H. Wilkinson, "The Algebraic Eigenvalue Problem",
    /// 1965, from memory).</summary>
    private static IEnumerable<PoleGroup> OfBlock(SpectralBlock block, int order)
    {
        List<DoubleDoubleComplex> rest = [.. Enumerable.Range(0, block.Size).Select(block.Pole)];
        for (var m = rest.Count; m >= 1; m--)
        {
            var width = m == 1 ? 0 : Math.Min(Widest, Slack * Math.Pow(order * InputRounding, 1.0 / m));
            while (rest.Count >= m && Coinciding(rest, m, width, block.IsReal) is { } found)
            {
                rest.RemoveAll(found.Contains);
                var mean = Mean(found);
                var isReal = block.IsReal && Math.Abs(mean.Im.Hi) <= width * mean.Magnitude;
                var im = isReal ? 0 : (double)mean.Im;
                if (im >= 0)
                {
                    yield return new(OnAxis(new Complex((double)mean.Re, im)), found.Count);
                }
            }
        }
    }

    /// <summary>m or more poles within <paramref name="width"/> of their mean (relative), closed under
    /// conjugation where they touch the axis; null where there are none.</summary>
    private static List<DoubleDoubleComplex>? Coinciding(
        List<DoubleDoubleComplex> poles, int m, double width, bool isReal)
    {
        foreach (var pole in poles)
        {
            var isNearAxis = isReal && Math.Abs(pole.Im.Hi) <= width * pole.Magnitude;
            var centre = isNearAxis ? pole.Re : pole;
            List<DoubleDoubleComplex> near = [.. poles.OrderBy(other => (other - centre).Magnitude).Take(m)];
            var mean = Mean(near);
            var touchesAxis = isReal && Math.Abs(mean.Im.Hi) <= width * mean.Magnitude;
            near =
            [
                .. poles.Where(
                    other => near.Contains(other) || (touchesAxis && near.Contains(other.Conjugate))),
            ];
            mean = Mean(near);
            if (near.TrueForAll(other => (other - mean).Magnitude <= width * mean.Magnitude))
            {
                return near;
            }
        }

        return null;
    }

    private static DoubleDoubleComplex Mean(List<DoubleDoubleComplex> poles)
    {
        DoubleDoubleComplex sum = 0;
        foreach (var pole in poles)
        {
            sum += pole;
        }

        return sum / poles.Count;
    }
}
