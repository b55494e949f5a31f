using System.Numerics;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>The limit of a quantity for t → ∞ if the last segment went on with its sources as they
/// stand.</summary>
internal static class FinalValue
{
    /// <summary>The limit; null where there is none.</summary>
    public static double? Of(Curve curve) => curve.Pieces[^1] switch
    {
        LinearPiece linear => OfLinear(linear),
        QuadraticPiece quadratic => OfProducts(quadratic),
        AccumulatedPiece accumulated => OfIntegral(accumulated),
        _ => null,
    };

    private static double? OfProducts(QuadraticPiece piece)
    {
        double sum = 0;
        foreach (var term in piece.Terms)
        {
            if (OfLinear(term.First) is not { } a || OfLinear(term.Second) is not { } b)
            {
                return null;
            }

            sum += term.Factor * a * b;
        }

        return sum;
    }

    /// <summary>An integral has a limit where its rate dies out: then it is gathered over many time constants
    /// more.</summary>
    private static double? OfIntegral(AccumulatedPiece piece)
    {
        if (piece.Rate.Terms.IsEmpty)
        {
            return piece.AtEnd;
        }

        if (OfProducts(piece.Rate) is not 0)
        {
            return null;
        }

        var slowest =
            piece.Segment.Basis.Modes.Where(m => m.Decay > 0).Select(m => m.Decay).DefaultIfEmpty(0).Min();
        if (slowest == 0)
        {
            return null;
        }

        const double timeConstants = 45; // e^-45 is below rounding
        var gram = GramIntegral.Of(piece.Segment.Basis, piece.Segment.Length + (timeConstants / slowest));
        var shorter = GramIntegral.Of(piece.Segment);
        double added = 0;
        foreach (var term in piece.Rate.Terms)
        {
            added += term.Factor * (GramIntegral.Form(gram, term.First.Coefficients, term.Second.Coefficients)
                - GramIntegral.Form(shorter, term.First.Coefficients, term.Second.Coefficients));
        }

        return piece.AtEnd + added;
    }

    private static double? OfLinear(LinearPiece piece)
    {
        var basis = piece.Segment.Basis;
        double limit = 0;
        for (var m = 0; m < basis.Modes.Length; m++)
        {
            if (ModeLimit(basis, m, piece.Coefficients, piece.Scale) is not { } part)
            {
                return null;
            }

            limit += part;
        }

        return limit;
    }

    private static double? ModeLimit(SegmentBasis basis, int m, ReadOnlySpan<double> coefficients,
        double scale)
    {
        var mode = basis.Modes[m];
        var t = mode.Rounded;
        var size = 0.0;
        for (var k = 0; k < mode.CarrierCount; k++)
        {
            size = Math.Max(size, basis.Coefficient(coefficients, m, k).Magnitude);
        }

        const double rounding = 1e-13; // of the waveform's own size
        if (size == 0 || (mode.Order == 1 && size <= rounding * scale) || mode.Decay > 0)
        {
            return 0;
        }

        var last = mode.Order - 1;
        if (mode.Kind == ModeKind.Joined && t[last, last] == Complex.Zero)
        {
            return JoinedLimit(basis, m, coefficients);
        }

        if (mode.Order == 1 && t[0, 0] == Complex.Zero)
        {
            return basis.Coefficient(coefficients, m, 0).Real;
        }

        return mode.Order == 2 && mode.Kind == ModeKind.Forced && t[0, 0] == Complex.Zero
            && basis.Coefficient(coefficients, m, 1) == Complex.Zero
            ? basis.Coefficient(coefficients, m, 0).Real
            : null;
    }

    /// <summary>A decaying pole p kept with a constant: the divided difference tends to −1/p.</summary>
    private static double? JoinedLimit(SegmentBasis basis, int m, ReadOnlySpan<double> coefficients)
    {
        var mode = basis.Modes[m];
        var t = mode.Rounded;
        if (mode.Order != 2 || t[0, 0].Real >= 0)
        {
            return null;
        }

        return (basis.Coefficient(coefficients, m, 1) * (-1 / t[0, 0])).Real;
    }
}
