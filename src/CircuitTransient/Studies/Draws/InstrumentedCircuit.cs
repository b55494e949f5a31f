using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>What of a part varies.</summary>
internal enum InstrumentKind
{
    /// <summary>A resistance.</summary>
    Resistance,

    /// <summary>The resistance of a switch, closed or open.</summary>
    Contact,

    /// <summary>A capacitance.</summary>
    Capacitance,

    /// <summary>An inductance, alone or coupled.</summary>
    Inductance,

    /// <summary>The gain of a dependent source.</summary>
    Gain,
}

/// <summary>A source that stands for what a part does when its value leaves the nominal one, and gives
/// nothing while it does not.</summary>
/// <param name="Part">Index of the part.</param>
/// <param name="Kind">What of it varies.</param>
/// <param name="Source">Index of the source's part in the instrumented circuit.</param>
/// <param name="IsParallel">Whether it is a current source beside the part, else a voltage source in
/// series.</param>
internal sealed record Instrument(int Part, InstrumentKind Kind, int Source, bool IsParallel);

/// <summary>The nominal circuit with an instrument at every part whose value varies: in series with a
/// resistance or inductance a voltage source σ = δ i or δ i′, beside a capacitance a current source σ = δ v′.
/// Then every circuit of the study is the nominal one with σ = Δ y fed back.</summary>
internal sealed class InstrumentedCircuit
{
    private readonly Dictionary<int, Instrument> byPart = [];

    private InstrumentedCircuit(
        Circuit original, Circuit circuit, ImmutableArray<Instrument> instruments)
    {
        Original = original;
        Layout = new NetworkLayout(circuit);
        Instruments = instruments;
        foreach (var instrument in instruments)
        {
            byPart.Add(instrument.Part, instrument);
        }
    }

    /// <summary>The circuit without instruments; parts keep their indices.</summary>
    public Circuit Original { get; }

    /// <summary>The layout of the instrumented circuit: the original sources first, then the
    /// instruments.</summary>
    public NetworkLayout Layout { get; }

    /// <summary>The instruments.</summary>
    public ImmutableArray<Instrument> Instruments { get; }

    /// <summary>How many independent sources the original has.</summary>
    public int SourceCount => Layout.Sources.Length - Instruments.Length;

    /// <summary>Puts the instruments in.</summary>
    /// <param name="circuit">The nominal circuit.</param>
    /// <param name="varied">For every parameter, whether it varies.</param>
    /// <returns>The instrumented circuit, or null with the reason why there is none.</returns>
    public static (InstrumentedCircuit? Circuit, string? Reason) Of(Circuit circuit, bool[] varied)
    {
        var parts = circuit.Parts.ToBuilder();
        var nodes = circuit.Nodes.ToBuilder();
        var instruments = ImmutableArray.CreateBuilder<Instrument>();
        var coils = VariedCoils(circuit, varied);
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            if (KindOf(circuit.Parts[i], varied, coils.Contains(i)) is not { } kind)
            {
                continue;
            }

            var part = circuit.Parts[i];
            var isParallel = part is Capacitor or DependentSource { SetsVoltage: false };
            instruments.Add(new Instrument(i, kind, parts.Count, isParallel));
            if (isParallel)
            {
                parts.Add(new CurrentSource(new Wave([], 1))
                {
                    Name = $"{part.Name} instrument",
                    From = part.From,
                    To = part.To,
                    Span = part.Span,
                });
            }
            else
            {
                parts[i] = part with { To = nodes.Count };
                parts.Add(new VoltageSource(new Wave([], 1))
                {
                    Name = $"{part.Name} instrument",
                    From = nodes.Count,
                    To = part.To,
                    Span = part.Span,
                });
                nodes.Add($"{part.Name} instrument");
            }
        }

        var made = instruments.ToImmutable();
        return Rewire(circuit, parts, made) is { } reason
            ? (null, reason)
            : (new InstrumentedCircuit(
                circuit, circuit with { Parts = parts.ToImmutable(), Nodes = nodes.ToImmutable() }, made),
                null);
    }

    /// <summary>A voltage or current of the original circuit as an output of the instrumented one.</summary>
    public LinearOutput Output(NormalForm form, Measurand quantity)
    {
        switch (quantity)
        {
            case VoltageAcross v:
                var part = Original.Parts[v.Part];
                return Outputs.Of(form, new VoltageBetween(part.From, part.To));
            case CurrentThrough c when byPart.TryGetValue(c.Part, out var beside) && beside.IsParallel:
                DoubleDouble sign = c.Delivered ? -1 : 1;
                return LinearOutput.Combine(
                    sign, Outputs.Of(form, new CurrentThrough(c.Part)),
                    sign, Outputs.Of(form, new CurrentThrough(beside.Source)));
            default:
                return Outputs.Of(form, quantity);
        }
    }

    /// <summary>Whether a value depends on a varied parameter.</summary>
    public static bool Varies(Quantity? quantity, bool[] varied) =>
        ReadParameters.In(quantity?.Formula).Any(index => varied[index]);

    private static InstrumentKind? KindOf(Part part, bool[] varied, bool isVariedCoil) => part switch
    {
        Resistor r when Varies(r.Resistance, varied) => InstrumentKind.Resistance,
        Capacitor c when Varies(c.Capacitance, varied) => InstrumentKind.Capacitance,
        Inductor when isVariedCoil => InstrumentKind.Inductance,
        DependentSource d when Varies(d.Gain, varied) => InstrumentKind.Gain,
        Switch s when Varies(s.ClosedResistance, varied) || Varies(s.OpenResistance, varied) =>
            InstrumentKind.Contact,
        _ => null,
    };

    /// <summary>Coils whose inductance varies, or a mutual inductance of theirs.</summary>
    private static HashSet<int> VariedCoils(Circuit circuit, bool[] varied)
    {
        HashSet<int> own = [.. Enumerable.Range(0, circuit.Parts.Length)
            .Where(i => circuit.Parts[i] is Inductor l && Varies(l.Inductance, varied))];
        var coils = new HashSet<int>(own);
        foreach (var coupling in circuit.Couplings)
        {
            var follows = coupling.IsFactor
                && (own.Contains(coupling.First) || own.Contains(coupling.Second));
            if (follows || Varies(coupling.Value, varied))
            {
                coils.Add(coupling.First);
                coils.Add(coupling.Second);
            }
        }

        return coils;
    }

    /// <summary>Lets dependent sources follow the whole of a part with its instrument; a reason where they
    /// cannot.</summary>
    private static string? Rewire(
        Circuit original, ImmutableArray<Part>.Builder parts, ImmutableArray<Instrument> instruments)
    {
        for (var i = 0; i < original.Parts.Length; i++)
        {
            if (parts[i] is not DependentSource follower)
            {
                continue;
            }

            if (follower.Control is VoltageAcross v)
            {
                var followed = original.Parts[v.Part];
                parts[i] = follower with { Control = new VoltageBetween(followed.From, followed.To) };
            }
            else if (follower.Control is CurrentThrough c
                && instruments.Any(s => s.Part == c.Part && s.IsParallel))
            {
                return $"`{follower.Name}` follows the current of `{original.Parts[c.Part].Name}`, which "
                    + "varies";
            }
        }

        return null;
    }
}
