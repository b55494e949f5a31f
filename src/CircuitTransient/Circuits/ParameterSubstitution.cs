using System.Collections.Immutable;
using System.Diagnostics;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The same circuit with other values of its parameters.</summary>
public static class ParameterSubstitution
{
    /// <summary>Puts values in place of the nominal ones.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="parameters">A value in SI for each of <see cref="Circuit.Parameters"/>.</param>
    /// <returns>The circuit, or why no part can have such a value.</returns>
    public static Outcome<Circuit> Put(Circuit circuit, ReadOnlySpan<double> parameters)
    {
        var values = parameters.ToArray();
        var parts = ImmutableArray.CreateBuilder<Part>(circuit.Parts.Length);
        foreach (var part in circuit.Parts)
        {
            var other = Put(part, values);
            if (Mistake(other) is { } mistake)
            {
                return new(null, [Diagnostic.Error(circuit.Source, part.Span, mistake)]);
            }

            parts.Add(other);
        }

        var couplings = circuit.Couplings
            .Select(c => c with { Value = Put(c.Value, values) }).ToImmutableArray();
        foreach (var coupling in couplings)
        {
            if (Mistake(coupling, parts) is { } mistake)
            {
                return new(null, [Diagnostic.Error(circuit.Source, coupling.Span, mistake)]);
            }
        }

        if (CoilSets.StoringNegativeEnergy(parts, couplings).FirstOrDefault() is { } set)
        {
            var names = string.Join(", ", set.Coils.Select(c => $"`{parts[c].Name}`"));
            return new(null, [Diagnostic.Error(
                circuit.Source, set.First.Span, $"{names} so coupled could store negative energy")]);
        }

        return new(
            circuit with
            {
                Parts = parts.ToImmutable(),
                Couplings = couplings,
                Parameters = [.. circuit.Parameters.Select((p, i) => p with { Nominal = values[i] })],
                Observations = [.. circuit.Observations
                    .Select(o => o with { Window = Put(o.Window, values) })],
                Requirements = [.. circuit.Requirements.Select(r => r with
                {
                    Window = Put(r.Window, values),
                    Bound = r.Bound is SettlesTo s ? s with { By = Put(s.By, values)! } : r.Bound,
                })],
            },
            []);
    }

    private static Part Put(Part part, double[] values) => part switch
    {
        Resistor r => r with { Resistance = Put(r.Resistance, values) },
        Capacitor c => c with
        {
            Capacitance = Put(c.Capacitance, values),
            InitialVoltage = PutOptional(c.InitialVoltage, values),
        },
        Inductor l => l with
        {
            Inductance = Put(l.Inductance, values),
            InitialCurrent = PutOptional(l.InitialCurrent, values),
        },
        VoltageSource s => s with { Wave = Put(s.Wave, values) },
        CurrentSource s => s with { Wave = Put(s.Wave, values) },
        DependentSource d => d with { Gain = Put(d.Gain, values) },
        Switch s => s with
        {
            ClosedResistance = PutOptional(s.ClosedResistance, values),
            OpenResistance = PutOptional(s.OpenResistance, values),
            Events = [.. s.Events.Select(e => e with { Trigger = Put(e.Trigger, values) })],
        },
        IdealTransformer => part,
        _ => throw new UnreachableException($"no values of {part}"),
    };

    private static Wave Put(Wave wave, double[] values) => new(
        wave.Pieces.Any(p => p.Share is not null)
            ? [.. wave.Pieces.Select(p => p.Share is null ? p : p.At(Put(p.Share.Factor, values).Nominal))]
            : wave.Pieces,
        Put(wave.Scale, values));

    private static Trigger Put(Trigger trigger, double[] values) => trigger switch
    {
        AtInstant at => new AtInstant(Put(at.Instant, values)!),
        WhenCrosses crossing => crossing with { After = Put(crossing.After, values) },
        _ => throw new UnreachableException($"no values of {trigger}"),
    };

    private static Window Put(Window window, double[] values) =>
        new(Put(window.From, values), Put(window.To, values));

    private static Instant? Put(Instant? instant, double[] values) =>
        instant is null ? null : instant with { Delay = Put(instant.Delay, values) };

    private static Quantity? PutOptional(Quantity? quantity, double[] values) =>
        quantity is null ? null : Put(quantity, values);

    private static Quantity Put(Quantity quantity, double[] values) =>
        quantity.Formula is null ? quantity
        : quantity with { Nominal = FormulaValue.Of(quantity.Formula, values) };

    private static string? Mistake(Part part) => part switch
    {
        Resistor { Resistance.Nominal: 0 or double.NaN } => NotPositive(part, "resistance"),
        Capacitor { Capacitance.Nominal: not > 0 } => NotPositive(part, "capacitance"),
        Inductor { Inductance.Nominal: not > 0 } => NotPositive(part, "inductance"),
        Switch { ClosedResistance.Nominal: not > 0 } => NotPositive(part, "closed resistance"),
        Switch { OpenResistance.Nominal: not > 0 } => NotPositive(part, "open resistance"),
        _ => null,
    };

    private static string NotPositive(Part part, string aspect) =>
        $"the {aspect} of `{part.Name}` would be zero, less, or no number";

    private static string? Mistake(Coupling coupling, IReadOnlyList<Part> parts)
    {
        var most = coupling.IsFactor ? 1
            : Math.Sqrt(((Inductor)parts[coupling.First]).Inductance.Nominal
                * ((Inductor)parts[coupling.Second]).Inductance.Nominal);
        return Math.Abs(coupling.Value.Nominal) <= most * (1 + CoilSets.Rounding) ? null
            : $"`{coupling.Name}` would couple `{parts[coupling.First].Name}` and "
                + $"`{parts[coupling.Second].Name}` by more than all their flux";
    }
}
