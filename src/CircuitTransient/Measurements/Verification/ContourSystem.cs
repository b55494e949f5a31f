using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>(zE + G) X = P q + B U(z) in complex doubles, every resistance as a branch of its own, solved
/// point by point. Two right-hand sides go together: the segment's own, and that of a probe, known stored
/// quantities without sources.</summary>
internal sealed class ContourSystem
{
    private readonly DescriptorEquations equations;
    private readonly InputModel inputs;
    private readonly (int Row, int Column)[] places;
    private readonly double[] g;
    private readonly double[] e;
    private EliminationProgram? program;
    private Complex[] values = [];
    private readonly Complex[] right;
    private readonly Complex[] work;

    /// <summary>The system of some equations.</summary>
    public ContourSystem(DescriptorEquations equations, InputModel inputs)
    {
        (this.equations, this.inputs) = (equations, inputs);
        var elements = new Dictionary<(int, int), (DoubleDouble G, DoubleDouble E)>();
        foreach (var element in equations.Conductances)
        {
            var old = elements.GetValueOrDefault((element.Row, element.Column));
            elements[(element.Row, element.Column)] = (old.G + element.Value, old.E);
        }

        foreach (var (row, column, value) in equations.StorageElements())
        {
            var old = elements.GetValueOrDefault((row, column));
            elements[(row, column)] = (old.G, old.E + value);
        }

        places = [.. elements.Keys];
        g = [.. elements.Values.Select(pair => (double)pair.G)];
        e = [.. elements.Values.Select(pair => (double)pair.E)];
        right = new Complex[2 * Size];
        work = new Complex[Size];
    }

    /// <summary>Number of unknowns.</summary>
    public int Size => equations.Unknowns.UnknownCount;

    /// <summary>Complex multiply-adds of one point, once a point was solved.</summary>
    public long Cost => program?.Cost ?? 0;

    /// <summary>X at a point: the segment's unknowns, then the probe's. Null where there is no
    /// solution.</summary>
    public ReadOnlySpan<Complex> At(Complex z, ReadOnlySpan<double> states, ReadOnlySpan<double> probe)
    {
        if (program is null && !Prepare(z))
        {
            return default;
        }

        if (!(Attempt(z, states, probe) < 1e-9) && (!Prepare(z) || !(Attempt(z, states, probe) < 1e-6)))
        {
            return default;
        }

        return right;
    }

    private bool Prepare(Complex z)
    {
        Fill(z, places.Length);
        program = EliminationProgram.Of(Size, places, values[..places.Length]);
        return program is not null;
    }

    // Solves and returns the residual relative to the terms that make it.
    private double Attempt(Complex z, ReadOnlySpan<double> states, ReadOnlySpan<double> probe)
    {
        Fill(z, program!.ValueCount);
        FillRight(z, states, probe);
        program.Solve(values, right, work);
        var terms = new double[Size];
        var residual = new Complex[Size];
        for (var k = 0; k < places.Length; k++)
        {
            var term = (g[k] + (z * e[k])) * right[Size + places[k].Column];
            residual[places[k].Row] += term;
            terms[places[k].Row] += Math.Abs(term.Real) + Math.Abs(term.Imaginary);
        }

        foreach (var row in equations.StorageRows)
        {
            residual[row.Place] -= row.Sign * probe[row.Index];
            terms[row.Place] += Math.Abs(probe[row.Index]);
        }

        var worst = 0.0;
        for (var i = 0; i < Size; i++)
        {
            worst = Math.Max(worst, terms[i] == 0 ? 0 : Complex.Abs(residual[i]) / terms[i]);
        }

        return worst;
    }

    private void Fill(Complex z, int count)
    {
        if (values.Length < count)
        {
            values = new Complex[count];
        }

        for (var k = 0; k < places.Length; k++)
        {
            values[k] = g[k] + (z * e[k]);
        }

        Array.Clear(values, places.Length, values.Length - places.Length);
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
