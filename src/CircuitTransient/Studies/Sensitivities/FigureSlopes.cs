using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>A figure of a study with its derivatives.</summary>
/// <param name="Value">The figure, in its SI unit.</param>
/// <param name="Time">When it stands, in seconds; null where it has no instant.</param>
/// <param name="Slopes">∂figure/∂value, one for each value of the circuit; null where it does not exist or is
/// not known.</param>
/// <param name="TimeSlopes">∂instant/∂value, likewise.</param>
/// <param name="Reasons">Why a slope is null, one for each value; null where it is not.</param>
public sealed record FigureSlopes(
    double Value, double? Time, ImmutableArray<double?> Slopes, ImmutableArray<double?> TimeSlopes,
    ImmutableArray<string?> Reasons)
{
    /// <summary>A factor times the figure, and a number.</summary>
    public FigureSlopes Times(double factor, double plus) => this with
    {
        Value = (factor * Value) + plus,
        Slopes = [.. Slopes.Select(s => s * factor)],
    };

    internal static FigureSlopes Gathered(
        double value, double? time, ImmutableArray<PointSlope> slopes) => new(
        value, time, [.. slopes.Select(s => s.Value)], [.. slopes.Select(s => s.Time)],
        [.. slopes.Select(s => s.Reason)]);
}
