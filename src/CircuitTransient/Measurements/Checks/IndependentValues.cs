using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Checks;

/// <summary>Values of the closed forms against those of a route that estimates its own error.</summary>
/// <param name="Worst">The worst difference over the quantity's size in the study.</param>
/// <param name="Allowed">The route's own error estimate where the worst was found, at least 1e-9.</param>
/// <param name="Compared">How many values were compared.</param>
/// <param name="TooWeak">How many were left out because the route's own estimate was over 1e-6.</param>
internal sealed record IndependentValues(double Worst, double Allowed, int Compared, int TooWeak)
{
    private const double Least = 1e-9;
    private const double Weak = 1e-6;

    /// <summary>Nothing compared yet.</summary>
    public static IndependentValues None { get; } = new(0, Least, 0, 0);

    /// <summary>How many were left out, in words.</summary>
    public string LeftOut => TooWeak == 1 ? "1 value left out" : $"{TooWeak} values left out";

    /// <summary>Compares all quantities at one instant.</summary>
    /// <param name="curves">The closed forms.</param>
    /// <param name="quantities">The quantities.</param>
    /// <param name="segment">The segment that holds the instant.</param>
    /// <param name="tau">The instant, from the segment's start.</param>
    /// <param name="sizes">What errors are measured by.</param>
    /// <param name="other">The other route's value and its error estimate; null where it has none.</param>
    public IndependentValues With(
        CurveBuilder curves, ImmutableArray<Measurand> quantities, int segment, double tau, StudySizes sizes,
        Func<Measurand, (double Value, double EstimatedError)?> other)
    {
        var result = this;
        foreach (var quantity in quantities)
        {
            if (curves.Tables[segment].Segment.Coefficients(quantity) is { } coefficients
                && other(quantity) is { } value && double.IsFinite(value.Value) && sizes.Of(quantity) > 0)
            {
                var own = new LinearPiece(curves.Tables[segment], coefficients).ValueAt(tau);
                result = result.With(own - value.Value, value.EstimatedError, sizes.Of(quantity));
            }
        }

        return result;
    }

    /// <summary>Compares a final value.</summary>
    public IndependentValues With(double difference, double estimate, double size)
    {
        var (relative, error) = (Math.Abs(difference) / size, Math.Abs(estimate) / size);
        if (!(error <= Weak))
        {
            return this with { TooWeak = TooWeak + 1 };
        }

        var allowed = Math.Max(Least, error);
        var isWorse = Compared == 0 || relative / allowed > Worst / Allowed;
        return isWorse
            ? new IndependentValues(relative, allowed, Compared + 1, TooWeak)
            : this with { Compared = Compared + 1 };
    }
}
