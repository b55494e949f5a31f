namespace CircuitTransient.Studies.Statistics;

/// <summary>A closed interval that holds an unknown figure with the stated confidence, in the figure's own
/// unit; an end that the sample cannot give is infinite.</summary>
public readonly record struct ConfidenceInterval(double Low, double High)
{
    /// <summary>The confidence of every interval that is shown.</summary>
    public const double Confidence = 0.95;
}
