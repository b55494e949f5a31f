using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Text;

namespace CircuitTransient.Measurements.Cautions;

/// <summary>Finds what in a result can kill, burn or wreck, each with its figure.</summary>
/// <param name="curves">The solved study's curves.</param>
/// <param name="parts">What every part bears.</param>
/// <param name="intervals">The intervals.</param>
/// <param name="events">The switchings.</param>
internal sealed class CautionFinder(
    CurveBuilder curves,
    ImmutableArray<PartResult> parts,
    ImmutableArray<IntervalResult> intervals,
    ImmutableArray<EventResult> events)
{
    private const int MostNamed = 3;

    private readonly TransientSolution solution = curves.Solution;

    /// <summary>All cautions, the most severe first.</summary>
    public ImmutableArray<Caution> Find()
    {
        IEnumerable<Caution?> all =
        [
            StoredEnergy(),
            RestVoltage(),
            TouchCharge(),
            OpenedCoils(),
            Impulses(),
            Surges(),
            GreatCurrents(),
            GrowingMode(),
            ReturningVoltage(),
        ];
        return [.. all.OfType<Caution>().OrderByDescending(c => c.Severity)];
    }

    private Caution? StoredEnergy()
    {
        var held = Named(Capacitors().Concat(Coils())
            .Where(i => parts[i].Energy > CautionThresholds.StoredEnergy.Value
                && PeakVoltage(i) > CautionThresholds.StoredEnergyVoltage.Value)
            .Select(i => (parts[i].Energy!.Value,
                $"{parts[i].Name} stores up to {Say(parts[i].Energy, "J")} ({Reach(i)})")));
        return held is null ? null : new Caution(
            CautionSeverity.Danger,
            $"{held}; over {CautionThresholds.StoredEnergy.Value} J at over "
                + $"{CautionThresholds.StoredEnergyVoltage.Value} V",
            CautionThresholds.StoredEnergy.Words);
    }

    /// <summary>In volts; infinite where an impulse stands across the part.</summary>
    private double PeakVoltage(int part) => parts[part].PeakVoltage is { } peak
        ? Math.Abs(peak.Value ?? double.PositiveInfinity)
        : 0;

    private string Reach(int part) =>
        !double.IsFinite(PeakVoltage(part)) ? "its current is cut in no time"
        : solution.Circuit.Parts[part] is Capacitor ? $"at {Say(PeakVoltage(part), "V")}"
        : $"and bears {Say(PeakVoltage(part), "V")}";

    /// <summary>A capacitor left charged: at the end of the study, else five seconds after the last
    /// opening.</summary>
    private Caution? RestVoltage()
    {
        var (volts, coulombs) = (CautionThresholds.RestVoltage, CautionThresholds.ExemptCharge.Value);
        if (Charged(solution.Until, volts.Value, coulombs) is { } atEnd)
        {
            return new Caution(
                CautionSeverity.Warning,
                $"{atEnd} at the end of the study, {Say(solution.Until, "s")}; over {volts.Value} V and "
                    + $"{Micro(CautionThresholds.ExemptCharge)} µC, and over "
                    + $"{Micro(CautionThresholds.TouchCharge)} µC",
                $"common thresholds, verify in {volts.Source} and {CautionThresholds.TouchCharge.Source}");
        }

        var opening = events.LastOrDefault(e => !e.Closes);
        var judged = opening?.Time + CautionThresholds.RestDelay.Value;
        return judged <= solution.Until && Charged(judged.Value, volts.Value, coulombs) is { } later
            ? new Caution(
                CautionSeverity.Warning,
                $"{later} {CautionThresholds.RestDelay.Value} s after {opening!.Switch} opens; over "
                    + $"{volts.Value} V and {Micro(CautionThresholds.ExemptCharge)} µC",
                volts.Words)
            : null;
    }

    /// <summary>A charge at the end of the study that is exempt by the one figure and not by the
    /// other.</summary>
    private Caution? TouchCharge()
    {
        var volts = CautionThresholds.RestVoltage.Value;
        var limit = CautionThresholds.TouchCharge;
        return Charged(solution.Until, volts, CautionThresholds.ExemptCharge.Value) is null
            && Charged(solution.Until, volts, limit.Value) is { } charged
            ? new Caution(
                CautionSeverity.Warning, $"{charged} at the end of the study; over {Micro(limit)} µC",
                limit.Words)
            : null;
    }

    private string? Charged(double time, double volts, double coulombs) => Named(Capacitors()
        .Select(i => (Part: (Capacitor)solution.Circuit.Parts[i],
            Voltage: Math.Abs(curves.Of(new VoltageAcross(i))?.ValueAt(solution, time, before: true) ?? 0)))
        .Select(c => (c.Part, c.Voltage, Charge: c.Part.Capacitance.Nominal * c.Voltage))
        .Where(c => c.Voltage > volts && c.Charge > coulombs)
        .Select(c => (c.Charge, $"{c.Part.Name} holds {Say(c.Voltage, "V")}, {Say(c.Charge, "C")}")));

    private Caution? OpenedCoils()
    {
        var opened = Named(events.Where(e => !e.Closes).SelectMany(Opened));
        return opened is null ? null : new Caution(
            CautionSeverity.Warning,
            $"{opened}; over {CautionThresholds.ArcCurrent.Value} A a real contact draws an arc, which the "
                + "result leaves out",
            CautionThresholds.ArcCurrent.Words
                + "; switching of inductive loads: see IEC 60947 and the switch's own data");
    }

    private IEnumerable<(double Size, string Words)> Opened(EventResult opening)
    {
        var (coil, carried) = Coils().Where(i => Feels(i, opening.Time))
            .Select(i => (Coil: i, Current: CurrentBefore(i, opening.Time)))
            .DefaultIfEmpty().MaxBy(c => c.Current);
        var cut = Math.Abs(opening.CurrentBefore ?? carried);
        if (Math.Min(cut, carried) > CautionThresholds.ArcCurrent.Value)
        {
            var name = parts[coil].Name;
            yield return (Math.Min(cut, carried),
                $"{opening.Switch} opens {Say(cut, "A")} while {name} carries {Say(carried, "A")}");
        }
    }

    /// <summary>Whether a coil's voltage jumps at an instant: else what parts there does not cut its current.
    /// At t = 0 the voltage before is not known.</summary>
    private bool Feels(int coil, double time)
    {
        const double rounding = 1e-9; // of the largest voltage in the circuit
        var curve = curves.Of(new VoltageAcross(coil));
        if (time == 0 || curve is null || intervals.SelectMany(i => i.Impulses)
            .Any(i => i.Time == time && i.VoltSeconds is not null && i.Part == parts[coil].Name))
        {
            return true;
        }

        var jump = curve.ValueAt(solution, time, before: false) - curve.ValueAt(solution, time, before: true);
        return Math.Abs(jump) > rounding * parts.Max(p => Math.Abs(p.PeakVoltage?.Value ?? 0));
    }

    private double CurrentBefore(int coil, double time)
    {
        if (time == 0)
        {
            var store = solution.Layout.Stores.IndexOf(coil);
            return store < 0 ? 0 : Math.Abs(solution.Initial[store]);
        }

        return Math.Abs(curves.Of(new CurrentThrough(coil))?.ValueAt(solution, time, before: true) ?? 0);
    }

    private Caution? Impulses()
    {
        var charges = Named(intervals.SelectMany(i => i.Impulses).Where(i => i.Charge is not null)
            .Select(i => (Math.Abs(i.Charge!.Value), $"{Say(i.Charge, "C")} through {i.Part} in no time")));
        return charges is null ? null : new Caution(
            CautionSeverity.Warning,
            charges + ": a real current is limited by stray parts alone, and may weld contacts",
            CautionThresholds.GreatCurrent.Words);
    }

    private Caution? Surges()
    {
        var surges = Named(intervals.SelectMany(i => i.Impulses).Where(i => i.VoltSeconds is not null)
            .Select(i => (Math.Abs(i.VoltSeconds!.Value),
                $"{Say(i.VoltSeconds, "Vs")} across {i.Part} in no time")));
        return surges is null ? null : new Caution(
            CautionSeverity.Warning,
            surges + ": a real voltage is limited by stray capacitance, an arc or a breakdown alone, and may "
                + "pierce insulation",
            "no threshold; the coil's own data and its insulation decide");
    }

    private Caution? GreatCurrents()
    {
        var great = Named(parts
            .Select(p => (p.Name, Current: Math.Abs(p.PeakCurrent?.Value ?? 0)))
            .Where(p => p.Current > CautionThresholds.GreatCurrent.Value)
            .GroupBy(p => Say(p.Current, "A"))
            .Select(g => (g.First().Current, $"{g.Key} through {Names([.. g.Select(p => p.Name)])}")));
        return great is null ? null : new Caution(
            CautionSeverity.Warning,
            $"{great}: over {CautionThresholds.GreatCurrent.Value / 1e3} kA, forces and contacts count",
            CautionThresholds.GreatCurrent.Words);
    }

    private Caution? GrowingMode()
    {
        const double rounding = 1e-12; // of a pole's magnitude
        var growth = intervals.SelectMany(i => i.Poles)
            .Where(p => p.Re > rounding * double.Hypot(p.Re, p.Im)).Select(p => p.Re).DefaultIfEmpty(0).Max();
        return growth == 0 ? null : new Caution(
            CautionSeverity.Warning,
            $"a mode grows, time constant {Say(1 / growth, "s")}: what limits it in truth is not in the "
            + "circuit", "no standard; every figure after it set in is in doubt");
    }

    /// <summary>Where a discharge is judged: dielectric absorption, which no linear network shows, from
    /// memory.</summary>
    private Caution? ReturningVoltage()
    {
        var judged = solution.Circuit.Requirements.Any(r => r.Quantity is Figure
        {
            Kind: FigureOf.TimeStaysBelow,
            Of: VoltageAcross or VoltageBetween,
        } || (r is
        {
            Quantity: VoltageAcross or VoltageBetween, Window.From: not null,
            Bound: Limits { Upper: { } upper }
        }
            && Capacitors().Any(i => Math.Abs(parts[i].PeakVoltage?.Value ?? 0) > upper)));
        return judged && Capacitors().Any() ? new Caution(
            CautionSeverity.Note,
            "after a discharge part of a capacitor's voltage returns by itself (dielectric absorption), "
            + "which a linear network does not show: short-circuit and earth before work",
            "no threshold; known of every capacitor") : null;
    }

    private static double Micro(CautionThreshold threshold) => Math.Round(threshold.Value * 1e6, 6);

    private IEnumerable<int> Coils() =>
        Enumerable.Range(0, parts.Length).Where(i => solution.Circuit.Parts[i] is Inductor);

    private IEnumerable<int> Capacitors() =>
        Enumerable.Range(0, parts.Length).Where(i => solution.Circuit.Parts[i] is Capacitor);

    /// <summary>The largest few in words; null where there are none.</summary>
    private static string? Named(IEnumerable<(double Size, string Words)> found)
    {
        var sorted = found.OrderByDescending(f => f.Size).ToArray();
        if (sorted.Length == 0)
        {
            return null;
        }

        var rest = sorted.Length > MostNamed ? $" and {sorted.Length - MostNamed} more likewise" : "";
        return string.Join(", ", sorted.Take(MostNamed).Select(f => f.Words)) + rest;
    }

    private static string Names(string[] names) => names.Length <= MostNamed
        ? string.Join(" and ", names)
        : $"{string.Join(" and ", names.Take(MostNamed))} and {names.Length - MostNamed} more";

    private static string Say(double? value, string unit) =>
        EngineeringNumber.Format(value ?? double.NaN, unit);
}
