using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Measurements.Verification;

/// <summary>A circuit put together part by part; node 0 is the reference.</summary>
internal sealed class HandBuilt
{
    private readonly List<Part> parts = [];
    private readonly List<Coupling> couplings = [];

    public int Resistor(int from, int to, double ohms) =>
        Add(new Resistor(ohms) { Name = "", From = from, To = to, Span = default });

    public int Capacitor(int from, int to, double farads, double volts = 0) =>
        Add(new Capacitor(farads, new Quantity(volts)) { Name = "", From = from, To = to, Span = default });

    public int Inductor(int from, int to, double henries, double amperes = 0) =>
        Add(new Inductor(henries, new Quantity(amperes)) { Name = "", From = from, To = to, Span = default });

    public int Voltage(int from, int to, params WavePiece[] pieces) =>
        Add(new VoltageSource(new Wave([.. pieces], 1)) { Name = "", From = from, To = to, Span = default });

    public int Current(int from, int to, params WavePiece[] pieces) =>
        Add(new CurrentSource(new Wave([.. pieces], 1)) { Name = "", From = from, To = to, Span = default });

    public int Switch(int from, int to, double? closedOhms = null, double? openOhms = null) =>
        Add(new Switch(
            false, closedOhms is { } r ? r : (Quantity?)null, openOhms is { } gap ? gap : null, [])
        {
            Name = "",
            From = from,
            To = to,
            Span = default,
        });

    public int Dependent(int from, int to, bool setsVoltage, double gain, Measurand control) =>
        Add(new DependentSource(setsVoltage, gain, control)
        {
            Name = "",
            From = from,
            To = to,
            Span = default,
        });

    public int Transformer(int from, int to, int secondaryFrom, int secondaryTo, double ratio) =>
        Add(new IdealTransformer(secondaryFrom, secondaryTo, ratio)
        {
            Name = "",
            From = from,
            To = to,
            Span = default,
        });

    public void Couple(int first, int second, double factor) =>
        couplings.Add(new Coupling("", first, second, factor, true, default));

    public Circuit Circuit()
    {
        var nodes = parts.Select(part => Math.Max(
            Math.Max(part.From, part.To),
            part is IdealTransformer t ? Math.Max(t.SecondaryFrom, t.SecondaryTo) : 0)).Max() + 1;
        return new Circuit(
            new SourceText("", ""), null, [], [.. Enumerable.Range(0, nodes).Select(i => $"{i}")], [.. parts],
            [.. couplings], [], [], [], false, null);
    }

    /// <summary>Solves with the given switches closed from 0 s on, and further positions from further
    /// instants.</summary>
    public AllAtOnceSolution Solve(
        double until, int[]? closed = null, params (double Time, int[] Closed)[] later)
    {
        var intervals = new List<SwitchedInterval> { new(0, Positions(closed ?? [])) };
        intervals.AddRange(later.Select(l => new SwitchedInterval(l.Time, Positions(l.Closed))));
        return AllAtOnceSolution.Solve(Circuit(), new SwitchingSchedule([.. intervals], until));
    }

    public ImmutableArray<bool> Positions(int[] closed) =>
        [.. Enumerable.Range(0, parts.Count).Select(i => closed.Contains(i))];

    public static WavePiece Step(double height, double start = 0) =>
        new(start, double.PositiveInfinity, height, 0, 0, 0, 0, "step");

    public static WavePiece Sine(double crest, double angularFrequency, double phase = 0) =>
        new(0, double.PositiveInfinity, crest, 0, 0, angularFrequency, phase - (Math.PI / 2), "sine");

    private int Add(Part part)
    {
        parts.Add(part);
        return parts.Count - 1;
    }
}
