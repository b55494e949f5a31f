using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Finds what is asked for although the equations leave it open: the current of one of several ideal
/// contacts in parallel, the voltage of a node between open contacts.</summary>
/// <param name="circuit">The circuit.</param>
/// <param name="instantOf">A declared instant in seconds; infinite where it has not come.</param>
internal sealed class AskedQuantities(Circuit circuit, Func<Instant, double> instantOf)
{
    /// <summary>An error for each thing observed, required, rated or controlling that one interval leaves
    /// open.</summary>
    public IEnumerable<Diagnostic> LeftOpenIn(NormalForm form, double from, double until)
    {
        foreach (var (asked, span, words) in Asked(from, until))
        {
            foreach (var quantity in asked.SelectMany(Linear))
            {
                if (!Outputs.Of(form, quantity).IsDetermined)
                {
                    yield return Describe(quantity, span, words, from);
                    break;
                }
            }
        }
    }

    private IEnumerable<(Measurand[] Quantities, TextSpan Span, string Words)> Asked(
        double from, double until)
    {
        foreach (var o in circuit.Observations.Where(o => !o.IsByDefault && Overlaps(o.Window, from, until)))
        {
            yield return ([o.Quantity], o.Span, "observed");
        }

        foreach (var r in circuit.Requirements.Where(r => Overlaps(r.Window, from, until)))
        {
            yield return ([r.Quantity], r.Span, "required");
        }

        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            foreach (var rating in circuit.Parts[i].Ratings)
            {
                yield return ([Rated(rating.Kind, i)], rating.Span, "rated");
            }

            if (circuit.Parts[i].LinearUpTo is { } limit)
            {
                Measurand judged = limit.IsVoltage ? new VoltageAcross(i) : new CurrentThrough(i);
                yield return ([judged], limit.Span, "judged");
            }

            if (circuit.Parts[i] is DependentSource follower)
            {
                yield return ([follower.Control], follower.Span, $"followed by `{follower.Name}`");
            }

            foreach (var declared in (circuit.Parts[i] as Switch)?.Events ?? [])
            {
                if (declared.Trigger is WhenCrosses condition)
                {
                    yield return ([condition.Quantity], declared.Span, "waited for");
                }
                else if (declared is { CutAtMost: not null, Trigger: AtInstant at }
                    && instantOf(at.Instant) < until)
                {
                    yield return ([new CurrentThrough(i)], declared.Span, "waited for");
                }
            }
        }
    }

    private bool Overlaps(Window window, double from, double until) =>
        (window.From is null || instantOf(window.From) < until)
        && (window.To is null || instantOf(window.To) > from);

    private static Measurand Rated(RatingKind kind, int part) => kind switch
    {
        RatingKind.PeakVoltage or RatingKind.VoltageRate => new VoltageAcross(part),
        RatingKind.PeakCurrent or RatingKind.CurrentRate or RatingKind.JouleIntegral =>
            new CurrentThrough(part),
        _ => new EnergyIn(part),
    };

    /// <summary>The voltages and currents that a quantity is made of.</summary>
    private IEnumerable<Measurand> Linear(Measurand quantity) => quantity switch
    {
        Figure f => Linear(f.Of),
        RateOfChange r => Linear(r.Of),
        _ when QuantityFactors.OfAny(circuit, quantity) is { } product => [product.First, product.Second],
        _ => [quantity],
    };

    private Diagnostic Describe(Measurand quantity, TextSpan span, string words, double from)
    {
        var when = from > 0 ? $" from {EngineeringNumber.Format(from, "s")} on" : string.Empty;
        var (message, advice) = quantity switch
        {
            CurrentThrough c when circuit.Parts[c.Part] is Inductor coil => (
                $"the current through `{coil.Name}` is {words}, but nothing decides how coils coupled "
                + "without "
                + $"leakage share it{when}",
                "say what leaks: a coupling of 0.99, or a winding resistance in series"),
            CurrentThrough c => (
                $"the current through `{circuit.Parts[c.Part].Name}` is {words}, but nothing decides how it "
                + "is "
                + $"shared with the ideal contacts or sources in parallel{when}",
                "give the contacts the resistance they have: `closed resistance 1 mΩ`"),
            _ => (
                $"this voltage is {words}, but nothing fixes it{when}: only open contacts lead to "
                + $"{Where(quantity)}",
                "give an open contact the resistance of its gap: `open resistance 10 MΩ`"),
        };
        return Diagnostic.Error(circuit.Source, span, message, advice);
    }

    private string Where(Measurand quantity)
    {
        var (from, to) = quantity switch
        {
            VoltageBetween v => (v.From, v.To),
            VoltageAcross v => (circuit.Parts[v.Part].From, circuit.Parts[v.Part].To),
            _ => (0, 0),
        };
        return string.Join(" or ", new[] { from, to }.Where(n => n > 0).Select(n => $"`{circuit.Nodes[n]}`"));
    }
}
