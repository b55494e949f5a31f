using System.Collections.Immutable;

namespace CircuitTransient.Measurements;

/// <summary>What a caller may ask of an analysis beyond the circuit file.</summary>
/// <param name="At">Instants in seconds for which exact values are wanted, in the order asked.</param>
/// <param name="SampleCount">Waveform samples aimed at.</param>
public sealed record AnalysisOptions(ImmutableArray<double> At, int SampleCount = 2000)
{
    /// <summary>Nothing asked for.</summary>
    public static AnalysisOptions Default { get; } = new([]);
}
