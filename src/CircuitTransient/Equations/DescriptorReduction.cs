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
    private readonly List<EquationRow> rows;
    private readonly double[] columnScales;
    private readonly bool[] isEliminated;
    private readonly List<(int Unknown, EquationRow Row)> substitutions = [];
    private readonly List<EquationRow> saysNothing = []; // each leaves one direction open
    private SingularEquations? singular;

    private DescriptorReduction(NetworkLayout layout, List<EquationRow> rows)
    {
        this.layout = layout;
        this.rows = rows;
        columnScales = UnknownScales.Of(layout);
        isEliminated = new bool[layout.UnknownCount];
    }

    /// <summary>Reduces the equations.</summary>
    /// <returns>The normal form; or null, with the equations at fault.</returns>
    public static NormalForm? Reduce(NetworkLayout layout, List<EquationRow> rows,
        out SingularEquations? singular)
    {
        var reduction = new DescriptorReduction(layout, rows);
        while (reduction.singular is null)
        {
            reduction.PutAlgebraicIn();
            if (reduction.singular is not null || !reduction.DerivativesDepend())
            {
                break;
            }
        }

        var state = reduction.ChooseState(out var open);
        singular = reduction.singular;
        return singular is null
            ? NormalFormSolver.Solve(layout, rows, reduction.substitutions, state, open)
            : null;
    }

    private void PutAlgebraicIn()
    {
        while (PickAlgebraic() is { } row)
        {
            rows.Remove(row);
            if (row.G.IsEmpty)
            {
                if (!row.HasNoRight)
                {
                    singular = new SingularEquations([Indices(row.Origin)], Contradicts: true);
                    return;
                }

                saysNothing.Add(row);
                continue;
            }

            var unknown = PickUnknown(row);
            foreach (var other in rows)
            {
                other.Substitute(unknown, row);
            }

            isEliminated[unknown] = true;
            substitutions.Add((unknown, row));
        }
    }

    private EquationRow? PickAlgebraic()
    {
        EquationRow? shortest = null;
        foreach (var row in rows)
        {
            if (row.IsAlgebraic && (shortest is null || row.G.Count < shortest.G.Count))
            {
                shortest = row;
            }
        }

        return shortest;
    }

    /// <summary>The unknown to solve an algebraic row for: one without a derivative where there is one, of
    /// reasonable weight in the row, and in as few other rows as possible (H. M. Markowitz, 1957).</summary>
    private int PickUnknown(EquationRow row)
    {
        var differentiated = new HashSet<int>();
        var uses = new Dictionary<int, int>();
        foreach (var other in rows)
        {
            foreach (var term in other.E.Terms)
            {
                differentiated.Add(term.Index);
            }

            foreach (var term in other.G.Terms)
            {
                uses[term.Index] = uses.GetValueOrDefault(term.Index) + 1;
            }
        }

        const double reasonable = 0.01; // of the heaviest in the row: keeps growth small and leaves a choice
        var onlyPlain = row.G.Terms.ToArray().Any(t => !differentiated.Contains(t.Index));
        var candidates =
            row.G.Terms.ToArray().Where(t => !onlyPlain || !differentiated.Contains(t.Index)).ToArray();
        var heaviest = candidates.Max(Weight);
        return candidates.Where(t => Weight(t) >= reasonable * heaviest)
            .MinBy(t => (uses.GetValueOrDefault(t.Index), -Weight(t))).Index;
    }

    private double Weight(Term term) => Math.Abs(term.Value.Hi) * columnScales[term.Index];

    /// <summary>Brings E to echelon form; true where a row's derivatives prove to be a sum of
    /// others'.</summary>
    private bool DerivativesDepend()
    {
        var waiting = new List<EquationRow>(rows);
        var found = false;
        while (waiting.Count > 0)
        {
            var row = waiting.MinBy(r => r.E.Count)!;
            waiting.Remove(row);
            if (row.IsAlgebraic)
            {
                found = true;
                continue;
            }

            var pivot = row.E.Terms.ToArray().MaxBy(Weight).Index;
            foreach (var other in waiting)
            {
                other.ClearDerivative(pivot, row);
            }
        }

        return found;
    }

    /// <summary>The unknowns left over are the state, as many as there are rows; a direction in them that no
    /// row feels is open (the potential of a floating group, the shares of two ideal contacts in
    /// parallel).</summary>
    private int[] ChooseState(out List<SparseVector> open)
    {
        var used = rows.SelectMany(r => Indices(r.E).Concat(Indices(r.G))).ToHashSet();
        var left = Enumerable.Range(0, layout.UnknownCount).Where(i => !isEliminated[i]).ToArray();
        open = [.. left.Where(i => !used.Contains(i)).Select(i => SparseVector.From((i, DoubleDouble.One)))];
        var state = left.Where(used.Contains).ToArray();
        FindDependentSourcesThatSayNothing();
        if (singular is null && state.Length > rows.Count)
        {
            var directions = OpenDirections.Find(rows, state);
            open.AddRange(directions.Select(d => d.Direction));
            state = [.. state.Except(directions.Select(d => d.Fixed))];
            if (state.Length > rows.Count)
            {
                singular = new SingularEquations(
                    [.. saysNothing.Select(r => Indices(r.Origin))], Contradicts: false);
            }
        }

        return state;
    }

    /// <summary>What ideal contacts leave open may stay open; a dependent source that says nothing, or what
    /// another says already, is at fault wherever it stands.</summary>
    private void FindDependentSourcesThatSayNothing()
    {
        // A part's law stands in the row whose index is that of its current.
        var laws = Enumerable.Range(0, layout.Circuit.Parts.Length)
            .Where(i => layout.Circuit.Parts[i] is DependentSource).Select(layout.Current).ToHashSet();
        int[][] atFault = [.. saysNothing.Select(r => Indices(r.Origin)).Where(laws.Overlaps)];
        if (singular is null && atFault.Length > 0)
        {
            singular = new SingularEquations([.. atFault], Contradicts: false);
        }
    }

    private static int[] Indices(SparseVector vector) => [.. vector.Terms.ToArray().Select(t => t.Index)];
}
