using System.Diagnostics;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>Voltages, currents and their rates as linear outputs of a normal form.</summary>
public static class Outputs
{
    /// <summary>The output of a linear quantity.</summary>
    public static LinearOutput Of(NormalForm form, Measurand measurand) => measurand switch
    {
        VoltageBetween v => Between(form, v.From, v.To),
        VoltageAcross v =>
            Between(form, form.Layout.Circuit.Parts[v.Part].From, form.Layout.Circuit.Parts[v.Part].To),
        CurrentThrough { Delivered: true } c => Negate(form.Unknowns[form.Layout.Current(c.Part)]),
        CurrentThrough c => form.Unknowns[form.Layout.Current(c.Part)],
        RateOfChange r => Rate(form, Of(form, r.Of)),
        _ => throw new UnreachableException($"{measurand} is not linear"),
    };

    private static LinearOutput Between(NormalForm form, int from, int to) =>
        (from, to) switch
        {
            (0, 0) => new LinearOutput(new DoubleDouble[form.Order], [], []),
            (_, 0) => form.Unknowns[NetworkLayout.Voltage(from)],
            (0, _) => Negate(form.Unknowns[NetworkLayout.Voltage(to)]),
            _ => LinearOutput.Combine(
                1, form.Unknowns[NetworkLayout.Voltage(from)], -1, form.Unknowns[NetworkLayout.Voltage(to)]),
        };

    private static LinearOutput Negate(LinearOutput output) =>
        LinearOutput.Combine(-1, output, 0, output);

    /// <summary>y′ = c A z + c B u + d₀ u′ + d₁ u″ + …; a stored quantity drives no z′, its impulse has set
    /// z.</summary>
    private static LinearOutput Rate(NormalForm form, LinearOutput output)
    {
        var n = form.Order;
        var state = new DoubleDouble[n];
        var first = new DoubleDouble[form.Layout.InputCount];
        for (var i = 0; i < n; i++)
        {
            if (output.State[i].IsZero)
            {
                continue;
            }

            for (var j = 0; j < n; j++)
            {
                state[j] += output.State[i] * form.A[i, j];
            }

            for (var j = 0; j < form.Layout.Sources.Length; j++)
            {
                first[j] += output.State[i] * form.B[i, j];
            }
        }

        return new LinearOutput(state, [first, .. output.Direct], output.Open);
    }
}
