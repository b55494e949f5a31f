namespace CircuitTransient.Numerics;

/// <summary>Which poles must stay together. Starts from each pole alone; where the spectral projector of a
/// cluster is large, that is where separating it would be ill conditioned, it is merged with the near cluster
/// whose invariant directions are most nearly parallel, until every projector is modest or nothing near is
/// left.</summary>
internal sealed class PoleClusters
{
    /// <summary>Beyond so many poles each instant of a block costs more than the digits are worth.</summary>
    public const int LargeBlock = 12;

    // costs three digits of a double, and double-double has them to spare
    private const double ModestProjector = 1e3;
    private const double BearableProjector = 1e6; // what is borne rather than make a large block
    private const double FarthestRatio = 3; // poles of moduli farther apart are never merged for condition
    private const double Noise = 1e-31; // relative to ‖A‖ and per unit of projector norm: the blur of a pole
    private const double WidestBlur = 0.01; // of ‖A‖; the blur of a twelvefold pole is near this

    private readonly ComplexSchur schur;
    private readonly int largeBlock;
    private readonly double norm;
    private readonly DoubleDoubleComplex[] poles;
    private readonly int[] mirror; // the index of the conjugate pole
    private readonly int[] cluster; // the cluster of each pole, named by its least member
    private readonly int[] order; // which pole stands at which place of the diagonal
    private readonly List<int> starts = [];

    private PoleClusters(ComplexSchur schur, double norm, int largeBlock)
    {
        this.largeBlock = largeBlock;
        var n = schur.T.Rows;
        this.schur = schur;
        this.norm = norm;
        order = [.. Enumerable.Range(0, n)];
        cluster = [.. Enumerable.Range(0, n)];
        poles = new DoubleDoubleComplex[n];
        mirror = new int[n];
        for (var i = 0; i < n; i++)
        {
            poles[i] = schur.T[i, i];
            mirror[i] = poles[i].Im.IsZero ? i : poles[i].Im.Hi > 0 ? i + 1 : i - 1;
        }
    }

    /// <summary>The Schur form, reordered cluster by cluster.</summary>
    public ComplexSchur Schur => schur;

    /// <summary>The clusters' bases in the Schur basis, and whether each is its own mirror.</summary>
    public IReadOnlyList<(InvariantBasis Basis, bool IsReal)> Found { get; private set; } = [];

    /// <summary>Clusters the poles of <paramref name="schur"/>, which is reordered. Blocks larger than
    /// <paramref name="largeBlock"/> are made only where a projector would else be unbearable.</summary>
    public static PoleClusters Of(ComplexSchur schur, double norm, int largeBlock)
    {
        PoleClusters clusters = new(schur, norm, largeBlock);
        InvariantBasis[] bases;
        do
        {
            clusters.Arrange();
            bases = clusters.Decouple();
        }
        while (clusters.Merge(bases));

        List<(InvariantBasis Basis, bool IsReal)> found = [];
        for (var b = 0; b < bases.Length; b++)
        {
            var name = clusters.NameOf(b);
            var isReal = clusters.MirrorOf(name) == name;
            if (isReal || clusters.MeanImaginary(name) > 0)
            {
                found.Add((bases[b], isReal));
            }
        }

        clusters.Found = found;
        return clusters;
    }

    private int NameOf(int block) => cluster[order[starts[block]]];

    private int MirrorOf(int name) => cluster[mirror[name]];

    private IEnumerable<int> Members(int name) =>
        Enumerable.Range(0, cluster.Length).Where(i => cluster[i] == name);

    private double MeanImaginary(int name) => Members(name).Average(i => poles[i].Im.Hi);

    /// <summary>Swaps neighbours until each cluster stands together on the diagonal.</summary>
    private void Arrange()
    {
        var n = order.Length;
        var negligible = BlockSubstitution.ZeroPole * 1e-4 * norm;
        starts.Clear();
        for (var place = 0; place < n;)
        {
            starts.Add(place);
            var name = cluster[order[place]];
            var end = place + 1;
            for (var k = end; k < n; k++)
            {
                if (cluster[order[k]] != name)
                {
                    continue;
                }

                for (var down = k - 1; down >= end; down--)
                {
                    schur.Swap(down, negligible);
                    (order[down], order[down + 1]) = (order[down + 1], order[down]);
                }

                end++;
            }

            place = end;
        }

        starts.Add(n);
    }

    private InvariantBasis[] Decouple()
    {
        BlockSubstitution substitution = new(schur.T, norm, starts);
        var bases = new InvariantBasis[starts.Count - 1];
        for (var b = 0; b < bases.Length; b++)
        {
            bases[b] = InvariantBasis.Of(schur.T, substitution, starts[b], starts[b + 1]);
        }

        return bases;
    }

    /// <summary>Merges the worst clusters, each at most once a round; whether any was.</summary>
    private bool Merge(InvariantBasis[] bases)
    {
        IEnumerable<int> worst = Enumerable.Range(0, bases.Length)
            .Where(b => !(bases[b].ProjectorNorm <= ModestProjector))
            .OrderByDescending(b => bases[b].ProjectorNorm)
            .ToArray();
        int[] names = [.. Enumerable.Range(0, bases.Length).Select(NameOf)];
        var directions = new BlockDirections?[bases.Length];
        HashSet<int> taken = [];
        foreach (var b in worst)
        {
            if (taken.Contains(names[b]))
            {
                continue;
            }

            var partner = Partner(bases, directions, names, b);
            if (partner >= 0 && !taken.Contains(names[partner])
                && (bases[b].ProjectorNorm > BearableProjector
                    || bases[b].T.Rows + bases[partner].T.Rows <= largeBlock))
            {
                Join(names[b], names[partner], taken);
            }
        }

        return taken.Count > 0;
    }

    private int Partner(InvariantBasis[] bases, BlockDirections?[] directions, int[] names, int b)
    {
        var best = -1;
        var bestScore = double.PositiveInfinity;
        for (var c = 0; c < bases.Length; c++)
        {
            if (c == b)
            {
                continue;
            }

            var distance = Distance(names[b], names[c], Blur(bases[b]) + Blur(bases[c]));
            if (distance < 2.5)
            {
                var own = directions[b] ??= new(bases[b]);
                var other = directions[c] ??= new(bases[c]);
                var cosine = own.CosineTo(other);
                var score = (double.IsNaN(cosine) ? 0 : 1 - cosine) + (1e-3 * distance);
                (best, bestScore) = score < bestScore ? (c, score) : (best, bestScore);
            }
        }

        return best;
    }

    private double Blur(InvariantBasis basis) => Math.Min(Noise * basis.ProjectorNorm, WidestBlur) * norm;

    /// <summary>The least relative distance of two members, at most 2; infinite where all moduli differ too
    /// much and the blur of rounding does not explain it.</summary>
    private double Distance(int first, int second, double blur)
    {
        var least = double.PositiveInfinity;
        foreach (var i in Members(first))
        {
            foreach (var j in Members(second))
            {
                var gap = (poles[i] - poles[j]).Magnitude;
                var larger = Math.Max(poles[i].Magnitude, poles[j].Magnitude);
                var smaller = Math.Min(poles[i].Magnitude, poles[j].Magnitude);
                if (gap <= blur || larger <= FarthestRatio * smaller)
                {
                    least = Math.Min(least, larger == 0 ? 0 : gap / larger);
                }
            }
        }

        return least;
    }

    /// <summary>Joins two clusters and their mirrors; all four where the two lie on both sides of the real
    /// axis.</summary>
    private void Join(int first, int second, HashSet<int> taken)
    {
        var firstMirror = MirrorOf(first);
        var secondMirror = MirrorOf(second);
        taken.UnionWith([first, second, firstMirror, secondMirror]);
        var acrossAxis = firstMirror == first || secondMirror == second || firstMirror == second
            || MeanImaginary(first) * MeanImaginary(second) < 0;
        int[] all = acrossAxis ? [first, second, firstMirror, secondMirror] : [first, second];
        Rename(all);
        if (!acrossAxis)
        {
            Rename([firstMirror, secondMirror]);
        }
    }

    private void Rename(int[] names)
    {
        var name = names.Min();
        for (var i = 0; i < cluster.Length; i++)
        {
            if (names.Contains(cluster[i]))
            {
                cluster[i] = name;
            }
        }
    }
}
