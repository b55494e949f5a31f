using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using Switch = CircuitTransient.Circuits.Switch;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>One value of a circuit and everything that moves with it.</summary>
internal sealed class Variation
{
    private readonly Circuit circuit;
    private readonly double[] parameters;
    private readonly int parameter;
    private readonly int turned;
    private readonly EventReference? moved;

    private Variation(Circuit circuit, int parameter, int turned, EventReference? moved)
    {
        this.circuit = circuit;
        this.parameter = parameter;
        this.turned = turned;
        this.moved = moved;
        parameters = [.. circuit.Parameters.Select(p => p.Nominal)];
    }

    /// <summary>A value of a varied circuit.</summary>
    /// <param name="circuit">The circuit with the values to start from.</param>
    /// <param name="value">The value.</param>
    /// <param name="hidden">What it sets beside quantities that have a formula; null where nothing.</param>
    public static Variation Of(Circuit circuit, VariedValue value, string? hidden) =>
        new(circuit, value.Parameter, value.Source, value.Event) { Hidden = hidden };

    /// <summary>Why the value has no derivative; null where it has.</summary>
    public string? Hidden { get; private init; }

    /// <summary>How a quantity goes with the value.</summary>
    public double SlopeOf(Quantity? quantity) => parameter < 0 || quantity is null
        ? 0 : FormulaValue.Slope(quantity.Formula, parameter, parameters);

    /// <summary>How the delay of an event goes with the value.</summary>
    public double DelaySlope(EventReference reference, Instant instant) =>
        reference == moved ? 1 : SlopeOf(instant.Delay);

    /// <summary>How what a store holds at the start goes with the value, as far as the file states
    /// it.</summary>
    public double StoredSlope(int part) => circuit.Parts[part] switch
    {
        Capacitor c => SlopeOf(c.InitialVoltage),
        Inductor l => SlopeOf(l.InitialCurrent),
        _ => 0,
    };

    /// <summary>How a source goes with the value just after an instant.</summary>
    /// <param name="layout">Where its input stands.</param>
    /// <param name="source">Index of the part.</param>
    /// <param name="start">The instant in seconds.</param>
    /// <param name="isSettled">Whether only what has been on for ever counts.</param>
    public ImmutableArray<Forcing> Forcings(NetworkLayout layout, int source, double start, bool isSettled)
    {
        var wave = circuit.Parts[source] switch
        {
            VoltageSource s => s.Wave,
            CurrentSource s => s.Wave,
            _ => throw new System.Diagnostics.UnreachableException("not a source"),
        };
        var pieces = wave.Pieces.Where(p => p.IsPerpetual || !isSettled);
        var slope = SlopeOf(wave.Scale);
        if (slope != 0)
        {
            return Forcing.Of(pieces, layout.Input(source), slope, start);
        }

        var shared = pieces.Select(p => (Piece: p, Slope: SlopeOf(p.Share?.Factor))).Where(p => p.Slope != 0);
        return source != turned
            ? Forcing.Of(shared.Select(p => p.Piece.At(p.Slope)), layout.Input(source), 1, start)
            : [.. Forcing.Of(pieces.Where(p => p.StatedPhase is not null), layout.Input(source),
                wave.Scale.Nominal, start).Select(Turned)];
    }

    /// <summary>What the value's change puts on the right side of the parts' laws.</summary>
    /// <param name="isClosed">For every part, whether it is a switch that is closed.</param>
    public ImmutableArray<LawTerm> Terms(ImmutableArray<bool> isClosed)
    {
        var terms = ImmutableArray.CreateBuilder<LawTerm>();
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            switch (circuit.Parts[i])
            {
                case Resistor r:
                    Add(i, new CurrentThrough(i), SlopeOf(r.Resistance));
                    break;
                case Capacitor c:
                    var capacitance = (DoubleDouble)c.Capacitance.Nominal;
                    Add(i, new CurrentThrough(i),
                        -SlopeOf(c.Capacitance) / (capacitance * capacitance));
                    break;
                case Switch s:
                    Add(i, new CurrentThrough(i),
                        SlopeOf(isClosed[i] ? s.ClosedResistance : s.OpenResistance));
                    break;
                case DependentSource d:
                    Add(i, d.Control, SlopeOf(d.Gain));
                    break;
                case Inductor l:
                    var inductance = (DoubleDouble)l.Inductance.Nominal;
                    Add(i, new VoltageAcross(i), -SlopeOf(l.Inductance) / (inductance * inductance));
                    break;
                case VoltageSource or CurrentSource or IdealTransformer:
                    break; // sources are no terms of a law, and turns are exact
                default:
                    throw new System.Diagnostics.UnreachableException(
                        $"no derivative by {circuit.Parts[i]}");
            }
        }

        foreach (var coupling in circuit.Couplings)
        {
            AddCoupling(coupling);
        }

        return terms.ToImmutable();

        void Add(int part, Measurand quantity, DoubleDouble weight)
        {
            if (!weight.IsZero)
            {
                terms.Add(new LawTerm(part, quantity, weight));
            }
        }

        void AddCoupling(Coupling coupling)
        {
            var mutual = MutualInductances.Mutual(circuit, coupling);
            var change = MutualSlope(coupling);
            AddShare(coupling.First, coupling.Second);
            AddShare(coupling.Second, coupling.First);

            // A coil's law is divided by its inductance: M / L stands beside the other's rate of change.
            void AddShare(int coil, int other)
            {
                var (own, slope) = Inductance(coil);
                Add(coil, new RateOfChange(new CurrentThrough(other)),
                    (mutual * slope / (own * own)) - (change / own));
            }
        }
    }

    /// <summary>∂M/∂value of M = k √(L₁ L₂), or of a mutual inductance that is given.</summary>
    public DoubleDouble MutualSlope(Coupling coupling)
    {
        DoubleDouble own = SlopeOf(coupling.Value);
        if (!coupling.IsFactor)
        {
            return own;
        }

        var (first, firstSlope) = Inductance(coupling.First);
        var (second, secondSlope) = Inductance(coupling.Second);
        return (own.IsZero ? own : own * DoubleDouble.Sqrt(first * second))
            + (MutualInductances.Mutual(circuit, coupling) * 0.5
                * ((firstSlope / first) + (secondSlope / second)));
    }

    private (DoubleDouble Value, DoubleDouble Slope) Inductance(int part)
    {
        var inductance = ((Inductor)circuit.Parts[part]).Inductance;
        return (inductance.Nominal, SlopeOf(inductance));
    }

    /// <summary>The slope of e^(j(ω t + φ)) with φ: a quarter of a turn ahead.</summary>
    private static Forcing Turned(Forcing forcing)
    {
        var quarter = new DoubleDoubleComplex(0, forcing.Exponent.Im.IsNegative ? -1 : 1);
        return forcing with { Amplitude = forcing.Amplitude * quarter, Slope = forcing.Slope * quarter };
    }
}
