using System.Numerics;
using CircuitTransient.Numerics;
using CircuitTransient.Numerics.Sparse;

namespace CircuitTransient.Measurements.Verification;

/// <summary>(zE + G) X = P q + B U(z) in complex doubles, every resistance as a branch of its own, solved
/// point by point. Two right-hand sides go together: the segment's own, and that of a probe, known stored
/// quantities without sources.</summary>
internal sealed class ContourSystem
{
    private readonly DescriptorEquations equations;
    private readonly InputModel inputs;
    private readonly SparsePattern pattern;
    private readonly double[] g;
    private readonly double[] e;
    private readonly Complex[] values;
    private readonly SparseLu<Complex> lu;
    private readonly Complex[] right;
    private readonly Complex[] solution;
    private readonly Complex[] residual;
    private readonly double[] terms;

    /// <summary>The system of some equations.</summary>
    public ContourSystem(DescriptorEquations equations, InputModel inputs)
    {
        (this.equations, this.inputs) = (equations, inputs);
        MatrixElement[] storage = [.. equations.StorageElements()];
        pattern = SparsePattern.Of(
            Size, [.. equations.Conductances.Concat(storage).Select(at => (at.Row, at.Column))]);
        (g, e) = (Sum(equations.Conductances, 0), Sum(storage, equations.Conductances.Length));
        values = new Complex[pattern.Count];
        lu = new SparseLu<Complex>(pattern);
        (right, solution) = (new Complex[2 * Size], new Complex[2 * Size]);
        (residual, terms) = (new Complex[Size], new double[Size]);
    }

    /// <summary>Number of unknowns.</summary>
    public int Size => equations.Unknowns.UnknownCount;

    /// <summary>Complex multiply-adds of one point, about, once a point was solved.</summary>
    public long Cost => 20 * lu.FactorCount;

    /// <summary>X at a point: the segment's unknowns, then the probe's. Null where there is no
    /// solution.</summary>
    public ReadOnlySpan<Complex> At(Complex z, ReadOnlySpan<double> states, ReadOnlySpan<double> probe)
    {
        for (var p = 0; p < values.Length; p++)
        {
            values[p] = g[p] + (z * e[p]);
        }

        FillRight(z, states, probe);
        right.CopyTo(solution, 0);
        if (!lu.Factorise(values))
        {
            return default;
        }

        return Refine(0) < 1e-9 && Refine(Size) < 1e-9 ? solution : default;
    }

    private double[] Sum(IEnumerable<MatrixElement> elements, int firstSlot)
    {
        var sum = new DoubleDouble[pattern.Count];
        foreach (var (k, element) in elements.Index())
        {
            sum[pattern.Slots[firstSlot + k]] += element.Value;
        }

        return [.. sum.Select(value => (double)value)];
    }

    // Solves for one of the right-hand sides, refines once and tells what is left of it.
    private double Refine(int first)
    {
        var x = solution.AsSpan(first, Size);
        lu.Solve(x);
        Residual(first);
        lu.Solve(residual);
        for (var i = 0; i < Size; i++)
        {
            x[i] += residual[i];
        }

        return Residual(first);
    }

    // Relative to the largest terms of any row, rows in one scale: where a row's own terms are zero but for
    // rounding, as round a part that a contact shorts, they measure nothing.
    private double Residual(int first)
    {
        for (var i = 0; i < Size; i++)
        {
            residual[i] = right[first + i];
            terms[i] = Complex.Abs(residual[i]);
        }

        for (var j = 0; j < Size; j++)
        {
            for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
            {
                var term = values[p] * solution[first + j];
                residual[pattern.Rows[p]] -= term;
                terms[pattern.Rows[p]] += Math.Abs(term.Real) + Math.Abs(term.Imaginary);
            }
        }

        var (worst, largest) = (0.0, 0.0);
        for (var i = 0; i < Size; i++)
        {
            worst = Math.Max(worst, Complex.Abs(residual[i]) * lu.RowScale(i));
            largest = Math.Max(largest, terms[i] * lu.RowScale(i));
        }

        return largest == 0 ? 0 : worst / largest;
    }

    private void FillRight(Complex z, ReadOnlySpan<double> states, ReadOnlySpan<double> probe)
    {
        Array.Clear(right);
        foreach (var row in equations.StorageRows)
        {
            right[row.Place] += row.Sign * states[row.Index];
            right[Size + row.Place] += row.Sign * probe[row.Index];
        }

        foreach (var group in inputs.Groups)
        {
            var transform = Transform(group, z, states[equations.Storage.Count..]);
            foreach (var input in equations.Inputs)
            {
                if (input.Index == group.Part)
                {
                    right[input.Place] += input.Sign * transform;
                }
            }
        }
    }

    // Of (c + c′τ) e^(−dτ) turned by ωτ, c = a + jb: half the sum of the two conjugate terms.
    private static Complex Transform(InputGroup group, Complex z, ReadOnlySpan<double> states)
    {
        var of = states.Slice(group.First, group.StateCount);
        if (!group.Oscillates)
        {
            var p = z + group.DecayRate;
            return (of[0] / p) + (group.HasSlope ? of[1] / (p * p) : 0);
        }

        var c = new Complex(of[0], of[1]);
        var slope = group.HasSlope ? new Complex(of[2], of[3]) : 0;
        var upper = z + new Complex(group.DecayRate, -group.AngularFrequency);
        var lower = z + new Complex(group.DecayRate, group.AngularFrequency);
        return 0.5 * ((c / upper) + (slope / (upper * upper)) + (Complex.Conjugate(c) / lower)
            + (Complex.Conjugate(slope) / (lower * lower)));
    }
}
