namespace CircuitTransient.Measurements.Cautions;

/// <summary>How well the source of a threshold is known.</summary>
internal enum SourceGrade
{
    /// <summary>Seen where somebody quotes the standard.</summary>
    Quoted,

    /// <summary>Common practice without a source.</summary>
    Practice,
}

/// <summary>A figure from which on a caution is given.</summary>
/// <param name="Value">In SI.</param>
/// <param name="Source">Where to verify it.</param>
/// <param name="Grade">How well the source is known.</param>
internal sealed record CautionThreshold(double Value, string Source, SourceGrade Grade)
{
    /// <summary>What a reader is told of the source: never that a standard is met or broken.</summary>
    public string Words => Grade == SourceGrade.Quoted
        ? $"common threshold, verify in {Source}"
        : Source;
}

/// <summary>Every threshold of the cautions, with its source and how well that is known. Facts only: no
/// compliance is ever claimed.</summary>
internal static class CautionThresholds
{
    private const string Practice = "common practice, no source";

    /// <summary>Volts of a capacitor at rest: IEC 60204-1, clause 6.2.4, residual over 60 V to be brought to
    /// 60 V within 5 s; quoted on makers' pages, the standard itself not seen.</summary>
    public static CautionThreshold RestVoltage { get; } = new(60, "IEC 60204-1", SourceGrade.Quoted);

    /// <summary>Coulombs up to which the same clause exempts a part; quoted likewise.</summary>
    public static CautionThreshold ExemptCharge { get; } = new(60e-6, "IEC 60204-1", SourceGrade.Quoted);

    /// <summary>Seconds after switching off at which it is judged; quoted likewise.</summary>
    public static CautionThreshold RestDelay { get; } = new(5, "IEC 60204-1", SourceGrade.Quoted);

    /// <summary>Coulombs that may be touched: IEC 60335-1, clause 8.1.4, 45 µC from 450 V on; quoted. IEC
    /// 61010-1, clause 6.3.1, has the same figure, from memory.</summary>
    public static CautionThreshold TouchCharge { get; } = new(
        45e-6, "IEC 60335-1 (IEC 61010-1 has the same, from memory)", SourceGrade.Quoted);

    /// <summary>Joules that can kill or burn.</summary>
    public static CautionThreshold StoredEnergy { get; } = new(10, Practice, SourceGrade.Practice);

    /// <summary>Volts from which on such an energy counts.</summary>
    public static CautionThreshold StoredEnergyVoltage { get; } = new(100, Practice, SourceGrade.Practice);

    /// <summary>Amperes from which on forces and welding contacts are spoken of.</summary>
    public static CautionThreshold GreatCurrent { get; } = new(1000, Practice, SourceGrade.Practice);

    /// <summary>Amperes from which on a parting contact in a circuit with coils is taken to draw an
    /// arc.</summary>
    public static CautionThreshold ArcCurrent { get; } = new(0.1, Practice, SourceGrade.Practice);
}
