using System.Collections.Immutable;

namespace CircuitTransient.Studies.Statistics;

/// <summary>What a sample of a figure tells.</summary>
/// <param name="Count">How many finite values it has.</param>
/// <param name="None">How many draws had no such figure.</param>
/// <param name="Infinite">How many had an infinite one.</param>
/// <param name="Least">The least finite value; NaN where there is none, as all that follows.</param>
/// <param name="Quantiles">At the fractions of <see cref="FigureTally.Fractions"/>.</param>
/// <param name="Resolution">Width of the classes the quantiles were read from; 0 where every value was
/// kept.</param>
/// <param name="Holding">How often a requirement or rating held; null for other figures.</param>
public sealed record FigureStatistics(
    long Count, long None, long Infinite, double Least, double Greatest, double Mean,
    ConfidenceInterval MeanInterval, double Deviation, ConfidenceInterval DeviationInterval,
    ImmutableArray<QuantileEstimate> Quantiles, double Resolution, Histogram Histogram,
    HoldingEstimate? Holding);

/// <summary>A quantile with the interval that encloses it whatever the distribution.</summary>
public sealed record QuantileEstimate(double Fraction, double Value, ConfidenceInterval Interval);

/// <summary>How many values fall in each of some classes of one width.</summary>
/// <param name="From">Lower end of the first class.</param>
/// <param name="To">Upper end of the last.</param>
public sealed record Histogram(double From, double To, ImmutableArray<long> Counts);

/// <summary>How often something held, and what that says of its probability.</summary>
/// <param name="Holding">Draws in which it held.</param>
/// <param name="All">All draws, also those that had no solution, in which nothing holds.</param>
public sealed record HoldingEstimate(long Holding, long All, ConfidenceInterval Interval)
{
    /// <summary>The fraction that held.</summary>
    public double Fraction => (double)Holding / All;
}
