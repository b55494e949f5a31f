using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The equations of circuit and sources as one system without input: s E + G with −B beside it for
/// the sources' values, and s − S below for the sources' own states.</summary>
internal static class AugmentedEquations
{
    /// <summary>The elements that do not go with s, to be added where several share a place.</summary>
    public static IEnumerable<MatrixElement> Constant(DescriptorEquations equations, InputModel inputs)
    {
        var n = equations.Unknowns.UnknownCount;
        foreach (var element in equations.Conductances)
        {
            yield return element;
        }

        foreach (var rate in inputs.Rates())
        {
            yield return new MatrixElement(n + rate.Row, n + rate.Column, -rate.Value);
        }

        foreach (var input in equations.Inputs)
        {
            foreach (var group in inputs.Groups)
            {
                if (group.Part == input.Index)
                {
                    yield return new MatrixElement(input.Place, n + group.First, -input.Sign);
                }
            }
        }
    }

    /// <summary>The elements that go with s, likewise.</summary>
    public static IEnumerable<MatrixElement> Linear(DescriptorEquations equations, InputModel inputs)
    {
        var n = equations.Unknowns.UnknownCount;
        foreach (var element in equations.StorageElements())
        {
            yield return element;
        }

        for (var state = 0; state < inputs.StateCount; state++)
        {
            yield return new MatrixElement(n + state, n + state, 1);
        }
    }

    /// <summary>P q, and the source states below.</summary>
    public static DoubleDouble[] RightSide(
        DescriptorEquations equations, InputModel inputs, ReadOnlySpan<DoubleDouble> states)
    {
        var (n, m) = (equations.Unknowns.UnknownCount, equations.Storage.Count);
        var right = new DoubleDouble[n + inputs.StateCount];
        foreach (var row in equations.StorageRows)
        {
            right[row.Place] += row.Sign * states[row.Index];
        }

        states.Slice(m, inputs.StateCount).CopyTo(right.AsSpan(n));
        return right;
    }

    /// <summary>q = D Rᵀ x.</summary>
    public static DoubleDouble[] StoredOf(DescriptorEquations equations, ReadOnlySpan<DoubleDouble> x)
    {
        var voltages = new DoubleDouble[equations.Storage.Count];
        foreach (var column in equations.StorageColumns)
        {
            voltages[column.Index] += column.Sign * x[column.Place];
        }

        var stored = new DoubleDouble[voltages.Length];
        foreach (var element in equations.Storage.Values)
        {
            stored[element.Row] += element.Value * voltages[element.Column];
        }

        return stored;
    }
}
