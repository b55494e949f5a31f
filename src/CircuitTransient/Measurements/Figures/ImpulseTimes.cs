namespace CircuitTransient.Measurements.Figures;

/// <summary>Front time and time to half-value of an impulse, as testers measure them.</summary>
internal sealed record ImpulseTimes
{
    private ImpulseTimes(double lowFraction, double frontFactor, double originFraction)
    {
        LowFraction = lowFraction;
        FrontFactor = frontFactor;
        OriginFraction = originFraction;
    }

    /// <summary>The lower of the two levels, of the peak.</summary>
    public double LowFraction { get; }

    /// <summary>The front time over the time between the two levels.</summary>
    public double FrontFactor { get; }

    /// <summary>How long before the lower level the virtual origin lies, of the front time.</summary>
    public double OriginFraction { get; }

    /// <summary>A voltage: T1 = (t90 − t30)/0.6, virtual origin t30 − 0.3·T1. IEC 60060-1, as an
    /// impulse-measurement maker's evaluation page quotes it.</summary>
    public static ImpulseTimes OfVoltage { get; } = new(0.3, 1 / 0.6, 0.3);

    /// <summary>A current, and whatever is no voltage: T1 = 1.25·(t90 − t10), virtual origin t10 − 0.1·T1.
    /// IEC 62475 and IEC 61000-4-5, from memory; the factors are quoted by surge generator makers.</summary>
    public static ImpulseTimes OfCurrent { get; } = new(0.1, 1.25, 0.1);

    /// <summary>How the front time is defined, in words.</summary>
    public string FrontDefinition => IsVoltage
        ? "T1 = (t90 - t30)/0.6, first crossings relative to the peak of greatest magnitude (IEC 60060-1)"
        : "T1 = 1.25·(t90 - t10), first crossings relative to the peak of greatest magnitude";

    /// <summary>How the time to half-value is defined, in words.</summary>
    public string HalfValueDefinition => IsVoltage
        ? "from the virtual origin t30 - 0.3·T1, T1 = (t90 - t30)/0.6, to the first fall to half the peak "
            + "after it (IEC 60060-1)"
        : "from the virtual origin t10 - 0.1·T1, T1 = 1.25·(t90 - t10), to the first fall to half the peak "
            + "after it";

    private bool IsVoltage => LowFraction > 0.2;

    /// <summary>Reads the front time.</summary>
    public FigureReading Front(WindowedCurve curve) =>
        Crossings(curve) is { } t
            ? new FigureReading(FrontFactor * (t.High - t.Low), t.High)
            : FigureReading.None(curve);

    /// <summary>Reads the time to half-value.</summary>
    public FigureReading HalfValue(WindowedCurve curve)
    {
        if (Crossings(curve) is not { } t)
        {
            return FigureReading.None(curve);
        }

        var peak = curve.Peak;
        var origin = t.Low - (OriginFraction * FrontFactor * (t.High - t.Low));
        return curve.FirstReach(-Math.Sign(peak.Value), peak.Value / 2, peak.Time) is { } half
            ? new FigureReading(half - origin, half)
            : FigureReading.None(curve);
    }

    private (double Low, double High)? Crossings(WindowedCurve curve)
    {
        var peak = curve.Peak.Value;
        var sign = Math.Sign(peak);
        return sign != 0 && curve.FirstReach(sign, LowFraction * peak, curve.From) is { } low
            && curve.FirstReach(sign, 0.9 * peak, low) is { } high
            ? (low, high)
            : null;
    }
}
