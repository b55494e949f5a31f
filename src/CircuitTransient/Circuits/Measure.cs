using System.Globalization;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>How a dimension is spoken of: <c>a resistance</c>, in <c>ohms</c>, written <c>Ω</c>.</summary>
internal sealed record Measure(string Phrase, string UnitWord, string Unit)
{
    private static readonly Dictionary<Dimension, Measure> Known = new()
    {
        [Dimension.None] = new("a pure number", "no unit", ""),
        [Dimension.Voltage] = new("a voltage", "volts", "V"),
        [Dimension.Current] = new("a current", "amperes", "A"),
        [Dimension.Time] = new("a time", "seconds", "s"),
        [Dimension.Resistance] = new("a resistance", "ohms", "Ω"),
        [Dimension.None / Dimension.Resistance] = new("a conductance", "siemens", "S"),
        [Dimension.Capacitance] = new("a capacitance", "farads", "F"),
        [Dimension.Inductance] = new("an inductance", "henries", "H"),
        [Dimension.Power] = new("a power", "watts", "W"),
        [Dimension.Energy] = new("an energy", "joules", "J"),
        [Dimension.Charge] = new("a charge", "coulombs", "C"),
        [Dimension.Flux] = new("a flux linkage", "webers", "Wb"),
        [Dimension.Frequency] = new("a frequency", "hertz", "Hz"),
        [Dimension.JouleIntegral] = new("a Joule integral", "ampere-squared seconds", "A²s"),
        [Dimension.Voltage / Dimension.Time] = new("a rate of change of voltage", "volts per second", "V/s"),
        [Dimension.Current / Dimension.Time] =
            new("a rate of change of current", "amperes per second", "A/s"),
    };

    public static Measure Of(Dimension dimension)
    {
        if (Known.TryGetValue(dimension, out var measure))
        {
            return measure;
        }

        string[] factors =
            [.. Power("V", dimension.Volt), .. Power("A", dimension.Ampere), .. Power("s", dimension.Second)];
        var unit = string.Join('·', factors);
        return new Measure($"a quantity in {unit}", unit, unit);
    }

    private static IEnumerable<string> Power(string unit, int exponent) => exponent switch
    {
        0 => [],
        1 => [unit],
        _ => [unit + "^" + exponent.ToString(CultureInfo.InvariantCulture)],
    };
}
