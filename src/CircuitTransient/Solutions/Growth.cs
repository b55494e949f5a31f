using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Modes that grow without limit, and how far they can be followed.</summary>
internal static class Growth
{
    private const double MostExponent = 300; // e³⁰⁰ = 10¹³⁰: a power made of two such is still a number

    /// <summary>The instant past which the fastest growing mode of an interval may leave the numbers;
    /// infinity where nothing grows.</summary>
    public static double Horizon(IntervalModel model, double now, DoubleDouble[][] stored)
    {
        var rate = FastestRate(model);
        var size = stored.SelectMany(own => own).Select(x => Math.Abs(x.Hi)).DefaultIfEmpty(0).Max();
        return rate <= 0
            ? double.PositiveInfinity
            : now + (Math.Max(0, MostExponent - Math.Log(Math.Max(1, size))) / rate);
    }

    /// <summary>The error for a study that goes past the horizon.</summary>
    public static Diagnostic Describe(Circuit circuit, IntervalModel model, double horizon) =>
        Diagnostic.Error(
        circuit.Source,
        default,
        $"a mode of this circuit grows with a time constant of "
        + $"{EngineeringNumber.Format(1 / FastestRate(model), "s")}: by "
        + $"{EngineeringNumber.Format(horizon, "s")} "
        + "it has passed every number",
        "end the study earlier, or look for a gain or a negative resistance of the wrong sign");

    private static double FastestRate(IntervalModel model) =>
        model.Blocks.SelectMany(b => Enumerable.Range(0, b.Size).Select(i => b.Pole(i).Re.Hi))
            .DefaultIfEmpty(0).Max();
}
