namespace CircuitTransient.Text;

/// <summary>What a value measures, as exponents of volt, ampere and second; angles and fractions have
/// none.</summary>
public readonly record struct Dimension(int Volt, int Ampere, int Second)
{
    /// <summary>A pure number.</summary>
    public static Dimension None => default;

    /// <summary>Voltage.</summary>
    public static Dimension Voltage => new(1, 0, 0);

    /// <summary>Current.</summary>
    public static Dimension Current => new(0, 1, 0);

    /// <summary>Time.</summary>
    public static Dimension Time => new(0, 0, 1);

    /// <summary>Resistance.</summary>
    public static Dimension Resistance => new(1, -1, 0);

    /// <summary>Capacitance.</summary>
    public static Dimension Capacitance => new(-1, 1, 1);

    /// <summary>Inductance.</summary>
    public static Dimension Inductance => new(1, -1, 1);

    /// <summary>Power.</summary>
    public static Dimension Power => new(1, 1, 0);

    /// <summary>Energy.</summary>
    public static Dimension Energy => new(1, 1, 1);

    /// <summary>Electric charge.</summary>
    public static Dimension Charge => new(0, 1, 1);

    /// <summary>Flux linkage.</summary>
    public static Dimension Flux => new(1, 0, 1);

    /// <summary>Frequency.</summary>
    public static Dimension Frequency => new(0, 0, -1);

    /// <summary>The Joule integral, A²s.</summary>
    public static Dimension JouleIntegral => new(0, 2, 1);

    /// <summary>Dimension of a product.</summary>
    public static Dimension operator *(Dimension a, Dimension b) =>
        new(a.Volt + b.Volt, a.Ampere + b.Ampere, a.Second + b.Second);

    /// <summary>Dimension of a quotient.</summary>
    public static Dimension operator /(Dimension a, Dimension b) =>
        new(a.Volt - b.Volt, a.Ampere - b.Ampere, a.Second - b.Second);
}
