using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>A value that a scan varies, and the values it takes.</summary>
/// <param name="Varied">What varies.</param>
/// <param name="Words">The range as the user wrote it: <c>from 10 Ω to 1 kΩ in 50 steps</c>.</param>
/// <param name="Spacing">How the values follow each other.</param>
/// <param name="Values">The values in SI, ascending; the ends of the range first and last.</param>
public sealed record ScanAxis(
    VariedValue Varied, string Words, ScanSpacing Spacing, ImmutableArray<double> Values)
{
    /// <summary>Whether it is an angle, which is written in degrees.</summary>
    public bool IsAngle => Varied.Kind == VariedKind.SourcePhase;

    /// <summary>The least value.</summary>
    public double From => Values[0];

    /// <summary>The greatest value.</summary>
    public double To => Values[^1];

    private double Greatest => Math.Max(Math.Abs(From), Math.Abs(To));

    /// <summary>How many digits tell its values apart; four, and more where the range is narrow.</summary>
    public int Digits => To > From
        ? Math.Clamp(2 + (int)Math.Ceiling(Math.Log10(Greatest / (To - From))), 4, 15)
        : 4;

    /// <summary>One of its values in words: <c>62.4 Ω</c>, <c>35°</c>.</summary>
    /// <param name="value">In SI.</param>
    /// <param name="fewer">By how many digits less than would tell the values apart.</param>
    public string Say(double value, int fewer = 0) => IsAngle
        ? EngineeringNumber.Format(value * 180 / Math.PI, "", Digits - fewer) + "°"
        : EngineeringNumber.Format(value, Varied.Unit, Digits - fewer);
}

/// <summary>How the values of a range follow each other.</summary>
public enum ScanSpacing
{
    /// <summary>By equal steps.</summary>
    Even,

    /// <summary>By equal factors.</summary>
    Logarithmic,

    /// <summary>As preferred values of IEC 60063 do.</summary>
    Preferred,
}
