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

    private readonly ComplexSchur _schur;
    private readonly int _largeBlock;
    private readonly double _norm;
    private readonly DoubleDoubleComplex[] _poles;
    private readonly int[] _mirror; // the index of the conjugate pole
    private readonly int[] _cluster; // the cluster of each pole, named by its least member
    private readonly int[] _order; // which pole stands at which place of the diagonal
    private readonly List<int> _starts = [];

    private PoleClusters(ComplexSchur schur, double norm, int largeBlock)
    {
        _largeBlock = largeBlock;
        int n = schur.T.Rows;
        _schur = schur;
        _norm = norm;
        _order = [.. Enumerable.Range(0, n)];
        _cluster = [.. Enumerable.Range(0, n)];
        _poles = new DoubleDoubleComplex[n];
        _mirror = new int[n];
        for (int i = 0; i < n; i++)
        {
            _poles[i] = schur.T[i, i];
            _mirror[i] = _poles[i].Im.IsZero ? i : _poles[i].Im.Hi > 0 ? i + 1 : i - 1;
        }
    }

    /// <summary>The Schur form, reordered cluster by cluster.</summary>
    public ComplexSchur Schur => _schur;

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
        for (int b = 0; b < bases.Length; b++)
        {
            int name = clusters.NameOf(b);
            bool isReal = clusters.MirrorOf(name) == name;
            if (isReal || clusters.MeanImaginary(name) > 0)
            {
                found.Add((bases[b], isReal));
            }
        }

        clusters.Found = found;
        return clusters;
    }

    private int NameOf(int block) => _cluster[_order[_starts[block]]];

    private int MirrorOf(int name) => _cluster[_mirror[name]];

    private IEnumerable<int> Members(int name) =>
        Enumerable.Range(0, _cluster.Length).Where(i => _cluster[i] == name);

    private double MeanImaginary(int name) => Members(name).Average(i => _poles[i].Im.Hi);

    /// <summary>Swaps neighbours until each cluster stands together on the diagonal.</summary>
    private void Arrange()
    {
        int n = _order.Length;
        double negligible = BlockSubstitution.ZeroPole * 1e-4 * _norm;
        _starts.Clear();
        for (int place = 0; place < n;)
        {
            _starts.Add(place);
            int name = _cluster[_order[place]];
            int end = place + 1;
            for (int k = end; k < n; k++)
            {
                if (_cluster[_order[k]] != name)
                {
                    continue;
                }

                for (int down = k - 1; down >= end; down--)
                {
                    _schur.Swap(down, negligible);
                    (_order[down], _order[down + 1]) = (_order[down + 1], _order[down]);
                }

                end++;
            }

            place = end;
        }

        _starts.Add(n);
    }

    private InvariantBasis[] Decouple()
    {
        BlockSubstitution substitution = new(_schur.T, _norm, _starts);
        InvariantBasis[] bases = new InvariantBasis[_starts.Count - 1];
        for (int b = 0; b < bases.Length; b++)
        {
            bases[b] = InvariantBasis.Of(_schur.T, substitution, _starts[b], _starts[b + 1]);
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
        BlockDirections?[] directions = new BlockDirections?[bases.Length];
        HashSet<int> taken = [];
        foreach (int b in worst)
        {
            if (taken.Contains(names[b]))
            {
                continue;
            }

            int partner = Partner(bases, directions, names, b);
            if (partner >= 0 && !taken.Contains(names[partner])
                && (bases[b].ProjectorNorm > BearableProjector
                    || bases[b].T.Rows + bases[partner].T.Rows <= _largeBlock))
            {
                Join(names[b], names[partner], taken);
            }
        }

        return taken.Count > 0;
    }

    private int Partner(InvariantBasis[] bases, BlockDirections?[] directions, int[] names, int b)
    {
        int best = -1;
        double bestScore = double.PositiveInfinity;
        for (int c = 0; c < bases.Length; c++)
        {
            if (c == b)
            {
                continue;
            }

            double distance = Distance(names[b], names[c], Blur(bases[b]) + Blur(bases[c]));
            if (distance < 2.5)
            {
                BlockDirections own = directions[b] ??= new(bases[b]);
                BlockDirections other = directions[c] ??= new(bases[c]);
                double cosine = own.CosineTo(other);
                double score = (double.IsNaN(cosine) ? 0 : 1 - cosine) + (1e-3 * distance);
                (best, bestScore) = score < bestScore ? (c, score) : (best, bestScore);
            }
        }

        return best;
    }

    private double Blur(InvariantBasis basis) => Math.Min(Noise * basis.ProjectorNorm, WidestBlur) * _norm;

    /// <summary>The least relative distance of two members, at most 2; infinite where all moduli differ too
    /// much and the blur of rounding does not explain it.</summary>
    private double Distance(int first, int second, double blur)
    {
        double least = double.PositiveInfinity;
        foreach (int i in Members(first))
        {
            foreach (int j in Members(second))
            {
                double gap = (_poles[i] - _poles[j]).Magnitude;
                double larger = Math.Max(_poles[i].Magnitude, _poles[j].Magnitude);
                double smaller = Math.Min(_poles[i].Magnitude, _poles[j].Magnitude);
                if (gap <= blur || larger <= FarthestRatio * smaller)
                {
                    least = Math.Min(least, larger == 0 ? 0 : gap / larger);
                }
            }
        }

        return least;
    }

    /// <summary>Joins two clusters and their mirrors; all four where the two lie on both sides of the real
    /// axis.
    /// </summary>
    private void Join(int first, int second, HashSet<int> taken)
    {
        int firstMirror = MirrorOf(first);
        int secondMirror = MirrorOf(second);
        taken.UnionWith([first, second, firstMirror, secondMirror]);
        bool acrossAxis = firstMirror == first || secondMirror == second || firstMirror == second
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
        int name = names.Min();
        for (int i = 0; i < _cluster.Length; i++)
        {
            if (names.Contains(_cluster[i]))
            {
                _cluster[i] = name;
            }
        }
    }
}
