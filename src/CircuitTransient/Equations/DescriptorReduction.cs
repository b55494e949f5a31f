using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>Solves (s E + G) X = R(s) (U, x₀) for its state by structure: algebraic equations are put into
/// the others one by one; where rows of E prove dependent, their combination is algebraic and is put in
/// likewise, until E is regular. Each step lowers the index by one and is exact in double-double; no part is
/// perturbed. This is the shuffle algorithm (D. G. Luenberger, "Time-invariant descriptor systems",
/// Automatica 14, 1978, from memory), with substitution in place of differentiation so that no pole is
/// invented.</summary>
internal sealed class DescriptorReduction
{
    private readonly NetworkLayout layout;
    private readonly RowOccurrences occurrences;
    private readonly double[] columnScales;
    private readonly bool[] isEliminated;
    private readonly List<(int Unknown, EquationRow Row)> substitutions = [];
    private readonly List<EquationRow> saysNothing = []; // each leaves one direction open
    private readonly List<EquationRow> rows;
    private readonly int[] state;
    private readonly List<SparseVector> open;

    /// <summary>Reduces the equations, whose rows are used up.</summary>
    public DescriptorReduction(NetworkLayout layout, List<EquationRow> rows)
    {
        this.layout = layout;
        occurrences = new RowOccurrences(rows, layout.UnknownCount);
        columnScales = UnknownScales.Of(layout);
        isEliminated = new bool[layout.UnknownCount];
        while (Singular is null)
        {
            PutAlgebraicIn();
            if (Singular is not null
                || !occurrences.DerivativesDepend(row => row.E.Terms.ToArray().MaxBy(Weight).Index))
            {
                break;
            }
        }

        this.rows = occurrences.Rows;
        state = ChooseState(out open);
    }

    /// <summary>The equations at fault; null where there is a solution.</summary>
    public SingularEquations? Singular { get; private set; }

    /// <summary>Whether the equations leave some unknown open.</summary>
    public bool LeavesOpen => open.Count > 0;

    /// <summary>Reduces the equations.</summary>
    /// <returns>The normal form; or null, with the equations at fault.</returns>
    public static NormalForm? Reduce(NetworkLayout layout, List<EquationRow> rows,
        out SingularEquations? singular)
    {
        var reduction = new DescriptorReduction(layout, rows);
        singular = reduction.Singular;
        return singular is null ? reduction.Solve() : null;
    }

    /// <summary>The normal form of equations that have a solution.</summary>
    public NormalForm Solve() => NormalFormSolver.Solve(layout, rows, substitutions, state, open);

    private void PutAlgebraicIn()
    {
        while (occurrences.TakeAlgebraic() is { } row)
        {
            if (row.G.IsEmpty)
            {
                if (!row.HasNoRight)
                {
                    Singular = new SingularEquations([Indices(row.Origin)], Contradicts: true);
                    return;
                }

                saysNothing.Add(row);
                continue;
            }

            var unknown = PickUnknown(row);
            occurrences.Substitute(unknown, row);
            isEliminated[unknown] = true;
            substitutions.Add((unknown, row));
        }
    }

    /// <summary>The unknown to solve an algebraic row for: one without a derivative where there is one, of
    /// reasonable weight in the row, and in as few other rows as possible (H. M. Markowitz, 1957, from
    /// memory).</summary>
    private int PickUnknown(EquationRow row)
    {
        const double reasonable = 0.01; // of the heaviest in the row: keeps growth small and leaves a choice
        var terms = row.G.Terms.ToArray();
        var plain = terms.Where(t => !occurrences.IsDifferentiated(t.Index)).ToArray();
        var candidates = plain.Length > 0 ? plain : terms;
        var heaviest = candidates.Max(Weight);
        return candidates.Where(t => Weight(t) >= reasonable * heaviest)
            .MinBy(t => (occurrences.Uses(t.Index), -Weight(t))).Index;
    }

    private double Weight(Term term) => Math.Abs(term.Value.Hi) * columnScales[term.Index];

    /// <summary>The unknowns left over are the state, as many as there are rows; a direction in them that no
    /// row feels is open (the potential of a floating group, the shares of two ideal contacts in
    /// parallel).</summary>
    private int[] ChooseState(out List<SparseVector> directionsLeft)
    {
        var used = rows.SelectMany(r => Indices(r.E).Concat(Indices(r.G))).ToHashSet();
        var left = Enumerable.Range(0, layout.UnknownCount).Where(i => !isEliminated[i]).ToArray();
        directionsLeft =
        [
            .. left.Where(i => !used.Contains(i)).Select(i => SparseVector.From((i, DoubleDouble.One))),
        ];
        var chosen = left.Where(used.Contains).ToArray();
        FindDependentSourcesThatSayNothing();
        if (Singular is null && chosen.Length > rows.Count)
        {
            var directions = OpenDirections.Find(rows, chosen);
            directionsLeft.AddRange(directions.Select(d => d.Direction));
            chosen = [.. chosen.Except(directions.Select(d => d.Fixed))];
            if (chosen.Length > rows.Count)
            {
                Singular = new SingularEquations(
                    [.. saysNothing.Select(r => Indices(r.Origin))], Contradicts: false);
            }
        }

        return chosen;
    }

    /// <summary>What ideal contacts leave open may stay open; a dependent source that says nothing, or what
    /// another says already, is at fault wherever it stands.</summary>
    private void FindDependentSourcesThatSayNothing()
    {
        // A part's law stands in the row whose index is that of its current.
        var laws = Enumerable.Range(0, layout.Circuit.Parts.Length)
            .Where(i => layout.Circuit.Parts[i] is DependentSource).Select(layout.Current).ToHashSet();
        int[][] atFault = [.. saysNothing.Select(r => Indices(r.Origin)).Where(laws.Overlaps)];
        if (Singular is null && atFault.Length > 0)
        {
            Singular = new SingularEquations([.. atFault], Contradicts: false);
        }
    }

    private static int[] Indices(SparseVector vector) => [.. vector.Terms.ToArray().Select(t => t.Index)];
}
