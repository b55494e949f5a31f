using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>A limit that a requirement sets an observed quantity.</summary>
/// <param name="Value">In SI.</param>
/// <param name="From">From when it is asked for, in seconds.</param>
/// <param name="To">Until when.</param>
/// <param name="Words">What is asked: <c>at most 1.1 kV</c>.</param>
internal sealed record PlotLimit(double Value, double From, double To, string Words)
{
    /// <summary>The limits on an observation.</summary>
    public static ImmutableArray<PlotLimit> On(TransientResult result, ObservationResult observation)
    {
        var circuit = result.Circuit;
        var observed = circuit.Observations.FirstOrDefault(o => o.Name == observation.Name);
        return observed is null
            ? []
            :
            [
                .. circuit.Requirements.SelectMany(r =>
                    Of(result, r, observation.Unit, Sign(circuit, r, observed))),
            ];
    }

    private static int Sign(Circuit circuit, Requirement requirement, Observation observed) =>
        SameQuantity.Sign(circuit, requirement.Quantity, observed.Quantity);

    private static IEnumerable<PlotLimit> Of(
        TransientResult result,
        Requirement requirement,
        string unit,
        int sign)
    {
        if (sign == 0)
        {
            yield break;
        }

        var from = DeclaredInstant.Seconds(result, requirement.Window.From) ?? 0;
        var to = DeclaredInstant.Seconds(result, requirement.Window.To) ?? result.Until;
        var (lower, upper) = requirement.Bound switch
        {
            Limits limits => (limits.Lower, limits.Upper),
            SettlesTo settles => (
                settles.Target - Math.Abs(settles.Within * settles.Target),
                (double?)(settles.Target + Math.Abs(settles.Within * settles.Target))),
            _ => (null, null),
        };
        if (requirement.Bound is SettlesTo { By: var by })
        {
            from = DeclaredInstant.Seconds(result, by) ?? from;
        }

        if (sign < 0)
        {
            (lower, upper) = (-upper, -lower);
        }

        if (upper is { } most)
        {
            yield return new(most, from, to, $"at most {EngineeringNumber.Format(most, unit)}");
        }

        if (lower is { } least)
        {
            yield return new(least, from, to, $"at least {EngineeringNumber.Format(least, unit)}");
        }
    }
}
