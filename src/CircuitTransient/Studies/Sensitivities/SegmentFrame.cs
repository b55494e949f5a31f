using System.Numerics;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>What the derivatives with respect to every value have in common on one segment: its functions,
/// and the motion of the whole circuit on it.</summary>
internal sealed class SegmentFrame
{
    private readonly Lazy<DoubleDoubleComplex[][]> carriersAtEnd;

    public SegmentFrame(IntervalModel model, Segment segment, IEnumerable<Forcing> changes)
    {
        Model = model;
        Segment = segment;
        Total = segment.MotionOf(Segment.Total);
        Length = (DoubleDouble)segment.End - segment.Start;
        Modes = new SegmentModes(model, segment.Start, segment.End, Total.Forcings.Concat(changes));
        Driven = new DrivenModes(model.Blocks, Modes.Basis, segment.Length);
        carriersAtEnd = new(() =>
            [.. Driven.Basis.Modes.Select(m => ModeEvaluation.EvaluateExactly(m, Length))]);
    }

    /// <summary>The network, its laws disturbed.</summary>
    public IntervalModel Model { get; }

    /// <summary>The segment of the solution.</summary>
    public Segment Segment { get; }

    /// <summary>The motion of all causes together.</summary>
    public Motion Total { get; }

    /// <summary>Its length in seconds.</summary>
    public DoubleDouble Length { get; }

    /// <summary>Its own functions.</summary>
    public SegmentModes Modes { get; }

    /// <summary>Its own functions and what they drive.</summary>
    public DrivenModes Driven { get; }

    /// <summary>Every function at the end.</summary>
    public DoubleDoubleComplex[][] CarriersAtEnd => carriersAtEnd.Value;

    /// <summary>A set of zero coefficients, one for each function.</summary>
    public static DoubleDoubleComplex[][] NoCoefficients(SegmentBasis basis) =>
        [.. basis.Modes.Select(m => new DoubleDoubleComplex[m.CarrierCount])];

    /// <summary>Coefficients in double precision, as the functions' numbers are laid out; those of what is
    /// driven may be left out.</summary>
    public double[] Rounded(DoubleDoubleComplex[][] coefficients)
    {
        var basis = Driven.Basis;
        var rounded = new double[basis.Width];
        for (var m = 0; m < coefficients.Length; m++)
        {
            for (var k = 0; k < coefficients[m].Length; k++)
            {
                basis.Put(rounded, m, k, (Complex)coefficients[m][k]);
            }
        }

        return rounded;
    }

    /// <summary>The weights of the segment's own functions in the disturbance of one law.</summary>
    public DoubleDoubleComplex[][] Sum(IEnumerable<LawTerm> terms)
    {
        var sums = NoCoefficients(Modes.Basis);
        foreach (var term in terms)
        {
            var weights = Modes.Coefficients(Model.Project(term.Quantity), Total);
            for (var m = 0; m < sums.Length; m++)
            {
                for (var k = 0; k < sums[m].Length; k++)
                {
                    sums[m][k] += weights[m][k] * term.Weight;
                }
            }
        }

        return sums;
    }

    /// <summary>The real part of a sum of the segment's own functions, at its start or end.</summary>
    public DoubleDouble Value(DoubleDoubleComplex[][] weights, bool isAtEnd)
    {
        var sum = DoubleDouble.Zero;
        for (var m = 0; m < weights.Length; m++)
        {
            var mode = Modes.Basis.Modes[m];
            for (var i = 0; i < mode.Rows; i++)
            {
                for (var j = i; j < (isAtEnd ? mode.Order : i + 1); j++)
                {
                    var carrier = mode.Carrier(i, j);
                    sum += isAtEnd ? (weights[m][carrier] * CarriersAtEnd[m][carrier]).Re
                        : weights[m][carrier].Re;
                }
            }
        }

        return sum;
    }

    /// <summary>With X′ = X T, c′ᵢⱼ = Σₖ Tⱼₖ cᵢₖ.</summary>
    public static DoubleDoubleComplex[][] Differentiate(
        SegmentBasis basis, DoubleDoubleComplex[][] coefficients)
    {
        var derivative = SegmentFrame.NoCoefficients(basis);
        for (var m = 0; m < derivative.Length; m++)
        {
            var mode = basis.Modes[m];
            for (var i = 0; i < mode.Rows; i++)
            {
                for (var j = i; j < mode.Order; j++)
                {
                    for (var k = j; k < mode.Order; k++)
                    {
                        derivative[m][mode.Carrier(i, j)] +=
                            mode.Triangle[j, k] * coefficients[m][mode.Carrier(i, k)];
                    }
                }
            }
        }

        return derivative;
    }
}
