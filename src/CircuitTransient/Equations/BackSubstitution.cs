using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>Expresses every eliminated unknown by the state and the inputs, last eliminated first.</summary>
internal sealed class BackSubstitution(NetworkLayout layout, int order, LinearOutput[] unknowns,
    List<SparseVector> open)
{
    /// <summary>Fills in the unknowns that are not state variables.</summary>
    public void Run(List<(int Unknown, EquationRow Row)> substitutions)
    {
        for (var i = 0; i < unknowns.Length; i++)
        {
            var opens = open.Select(d => d.At(i)).ToArray();
            unknowns[i] = unknowns[i] is { } state
                ? state with { Open = opens }
                // held at zero where it is open itself
                : new LinearOutput(new DoubleDouble[order], [], opens);
        }

        for (var k = substitutions.Count - 1; k >= 0; k--)
        {
            Express(substitutions[k].Unknown, substitutions[k].Row);
        }
    }

    private void Express(int unknown, EquationRow row)
    {
        var pivot = row.G.At(unknown);
        var c = new DoubleDouble[order];
        var length = row.R.Length;
        foreach (var term in row.G.Terms)
        {
            length = Math.Max(length, unknowns[term.Index].Direct.Length);
        }

        var direct = new DoubleDouble[length][];
        for (var k = 0; k < length; k++)
        {
            direct[k] = new DoubleDouble[layout.InputCount];
            foreach (var term in k < row.R.Length ? row.R[k].Terms : [])
            {
                direct[k][term.Index] = term.Value / pivot;
            }
        }

        var openness = new OpenSum(open.Count);
        foreach (var term in row.G.Terms)
        {
            if (term.Index != unknown)
            {
                var f = -term.Value / pivot;
                AddTo(c, f, unknowns[term.Index].State);
                for (var k = 0; k < unknowns[term.Index].Direct.Length; k++)
                {
                    AddTo(direct[k], f, unknowns[term.Index].Direct[k]);
                }

                openness.Add(f, unknowns[term.Index].Open);
            }
        }

        unknowns[unknown] = new LinearOutput(c, direct, openness.Result());
    }

    private static void AddTo(DoubleDouble[] sum, DoubleDouble f, DoubleDouble[] x)
    {
        for (var i = 0; i < x.Length; i++)
        {
            if (!x[i].IsZero)
            {
                sum[i] += f * x[i];
            }
        }
    }

    /// <summary>A sum that knows an exact cancellation from a small value.</summary>
    private sealed class OpenSum(int count)
    {
        private readonly DoubleDouble[] values = new DoubleDouble[count];
        private readonly double[] scales = new double[count];

        public void Add(DoubleDouble f, DoubleDouble[] x)
        {
            for (var i = 0; i < x.Length; i++)
            {
                var added = f * x[i];
                values[i] += added;
                scales[i] = Math.Max(scales[i], Math.Abs(added.Hi));
            }
        }

        public DoubleDouble[] Result()
        {
            var result = new DoubleDouble[values.Length];
            for (var i = 0; i < values.Length; i++)
            {
                result[i] = Math.Abs(values[i].Hi) > SparseVector.Cancelled * scales[i] ? values[i]
                    : DoubleDouble.Zero;
            }

            return result;
        }
    }
}
