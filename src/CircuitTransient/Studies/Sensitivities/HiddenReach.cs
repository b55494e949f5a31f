using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>Finds what a value sets beside the quantities whose formulas are derived: the shape or the
/// instants of a wave, a level, a limit. Such a value has no derivative here.</summary>
internal static class HiddenReach
{
    private const double Step = 1e-3; // relative: far more than rounding, less than what changes a structure
    private const double Rounding = 1e-9;

    /// <summary>What else a value sets, in words; null where nothing.</summary>
    /// <param name="varied">The varied circuit.</param>
    /// <param name="circuit">The circuit with the values to start from.</param>
    /// <param name="values">These values.</param>
    /// <param name="index">Index of the value.</param>
    public static string? Of(VariedCircuit varied, Circuit circuit, ReadOnlySpan<double> values, int index)
    {
        var value = varied.Values[index];
        if (value.Kind is not (VariedKind.NamedValue or VariedKind.EventTime))
        {
            return null;
        }

        double[] other = [.. values];
        var step = Step * (other[index] == 0 ? 1 : other[index]);
        foreach (var moved in new[] { values[index] + step, values[index] - step })
        {
            other[index] = moved;
            if (varied.At(other) is { Succeeded: true, Value: var read }
                && Put(circuit, value, moved) is { Succeeded: true, Value: var put })
            {
                return Difference(read, put);
            }
        }

        return "the circuit allows no other value near it";
    }

    /// <summary>What a circuit read anew has that one with other parameters has not.</summary>
    private static string? Difference(Circuit read, Circuit put)
    {
        if (read.Parts.Length != put.Parts.Length)
        {
            return "it sets how many parts there are";
        }

        for (var i = 0; i < put.Parts.Length; i++)
        {
            if (!Agree(read.Parts[i], put.Parts[i]))
            {
                return put.Parts[i] is VoltageSource or CurrentSource
                    ? $"it sets the shape or the instants of {put.Parts[i].Name}'s wave"
                    : $"it sets a level or a ratio of {put.Parts[i].Name}";
            }
        }

        return !read.Requirements.Zip(put.Requirements)
                .All(r => Agree(r.First.Bound, r.Second.Bound) && r.First.Quantity == r.Second.Quantity)
                ? "it sets what is required"
            : !read.Observations.Zip(put.Observations).All(o => o.First.Quantity == o.Second.Quantity)
                ? "it sets what is observed"
            : null;
    }

    private static Text.Outcome<Circuit> Put(Circuit circuit, VariedValue value, double given)
    {
        var parameters = circuit.Parameters.Select(p => p.Nominal).ToArray();
        if (value.Parameter >= 0)
        {
            parameters[value.Parameter] = given;
        }

        return ParameterSubstitution.Put(circuit, parameters);
    }

    private static bool Agree(Part read, Part put) => (read, put) switch
    {
        (VoltageSource a, VoltageSource b) => Agree(a.Wave, b.Wave),
        (CurrentSource a, CurrentSource b) => Agree(a.Wave, b.Wave),
        (IdealTransformer a, IdealTransformer b) => Agree(a.Ratio, b.Ratio),
        (Switch a, Switch b) => a.Events.Zip(b.Events).All(e =>
            Agree(e.First.CutAtMost ?? 0, e.Second.CutAtMost ?? 0)
            && Agree(LevelOf(e.First), LevelOf(e.Second))),
        _ => read.GetType() == put.GetType(),
    } && read.Ratings.Zip(put.Ratings).All(r => Agree(r.First.Limit, r.Second.Limit));

    private static double LevelOf(SwitchEvent e) => (e.Trigger as WhenCrosses)?.Level ?? 0;

    private static bool Agree(Wave read, Wave put)
    {
        var (a, b) = (read.Scale.Nominal, put.Scale.Nominal);
        return read.Pieces.Length == put.Pieces.Length && read.Pieces.Zip(put.Pieces).All(p =>
            Agree(p.First.Start, p.Second.Start) && Agree(p.First.End, p.Second.End)
            && Agree(a * p.First.Amplitude, b * p.Second.Amplitude)
            && Agree(a * p.First.Slope, b * p.Second.Slope)
            && Agree(p.First.DecayRate, p.Second.DecayRate)
            && Agree(p.First.AngularFrequency, p.Second.AngularFrequency)
            && Agree(p.First.Phase, p.Second.Phase));
    }

    private static bool Agree(Bound read, Bound put) => (read, put) switch
    {
        (Limits a, Limits b) => Agree(a.Lower ?? 0, b.Lower ?? 0) && Agree(a.Upper ?? 0, b.Upper ?? 0),
        (SettlesTo a, SettlesTo b) => Agree(a.Target, b.Target) && Agree(a.Within, b.Within),
        _ => false,
    };

    private static bool Agree(double a, double b) =>
        a == b || Math.Abs(a - b) <= Rounding * Math.Max(Math.Abs(a), Math.Abs(b));
}
