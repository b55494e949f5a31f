using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Starts that contradict themselves: stated charges and currents that jump at t = 0.</summary>
internal static class StoredContradictions
{
    private const double Rounding = 1e-9; // stated values that agree to nine digits are meant to agree

    public static void Check(CheckState state)
    {
        CheckLoops(state);
        CheckCutSets(state);
    }

    // Round a loop of sources, capacitors and closed contacts the voltages sum to zero.
    private static void CheckLoops(CheckState state)
    {
        var sets = new DisjointSets(state.Nodes.Count);
        foreach (var part in state.Parts.OfType<Switch>().Where(IsShut))
        {
            sets.Join(part.From, part.To);
        }

        foreach (var source in state.Parts.OfType<VoltageSource>())
        {
            sets.Join(source.From, source.To, AtStart(source.Wave));
        }

        foreach (var capacitor in state.Parts.OfType<Capacitor>().Where(c => c.InitialVoltage is not null)
            .Concat(state.Parts.OfType<Capacitor>().Where(c => c.InitialVoltage is null)))
        {
            var stated = capacitor.InitialVoltage?.Nominal ?? 0;
            var (from, to) = (sets.Find(capacitor.From), sets.Find(capacitor.To));
            if (from.Root != to.Root)
            {
                sets.Join(capacitor.From, capacitor.To, stated);
                continue;
            }

            var imposed = from.Height - to.Height;
            var jump = imposed - stated;
            if (Math.Abs(jump) > Rounding * Math.Max(Math.Abs(imposed), Math.Abs(stated))
                && Clause<ChargedToSyntax>(state, capacitor) is { } clause)
            {
                state.Findings.Warn(clause.Span,
                    $"`{capacitor.Name}` is charged to {Amount.Of(stated, "V")}, but is held at "
                        + $"{Amount.Of(imposed, "V")}",
                    $"it jumps by {Amount.Of(jump, "V")} at once; "
                    + $"write `charged to {Amount.Of(imposed, "V")}` if no jump is meant");
            }
        }
    }

    // Where only coils, current sources and open contacts meet, the currents sum to zero.
    private static void CheckCutSets(CheckState state)
    {
        var sets = new DisjointSets(state.Nodes.Count);
        foreach (var part in state.Parts.OfType<Part>())
        {
            if (part is not (Inductor or CurrentSource) && !(part is Switch s && IsGap(s)))
            {
                sets.Join(part.From, part.To);
            }

            if (part is IdealTransformer t)
            {
                sets.Join(t.SecondaryFrom, t.SecondaryTo);
                sets.Join(t.From, t.SecondaryFrom); // windings tie their currents together
            }
        }

        var sums = new Dictionary<int, (double Sum, double Largest, Inductor? Coil)>();
        foreach (var part in state.Parts)
        {
            double? current = part switch
            {
                Inductor coil => coil.InitialCurrent?.Nominal ?? 0,
                CurrentSource source => AtStart(source.Wave),
                _ => null,
            };
            if (current is not { } i || sets.Find(part!.From).Root == sets.Find(part.To).Root)
            {
                continue;
            }

            Add(sums, sets.Find(part.From).Root, i, part);
            Add(sums, sets.Find(part.To).Root, -i, part);
        }

        foreach (var (_, (sum, largest, coil)) in sums.Where(e => e.Key != sets.Find(0).Root)
            .OrderBy(e => e.Key))
        {
            if (coil is not null && Math.Abs(sum) > Rounding * largest && Clause<CarryingSyntax>(state, coil)
                is { } clause)
            {
                state.Findings.Warn(clause.Span,
                    $"the current that `{coil.Name}` carries has no way on: "
                    + $"{Amount.Of(Math.Abs(sum), "A")} is left",
                    "it jumps at once; let coils in series carry one current");
            }
        }
    }

    private static void Add(
        Dictionary<int, (double Sum, double Largest, Inductor? Coil)> sums, int node, double current,
        Part part)
    {
        var (sum, largest, coil) = sums.GetValueOrDefault(node);
        var stated = part is Inductor { InitialCurrent: not null } inductor ? inductor : null;
        sums[node] = (sum + current, Math.Max(largest, Math.Abs(current)), coil ?? stated);
    }

    private static bool IsShut(Switch part) =>
        part is { StartsClosed: true, ClosedResistance: null } && !ActsAtStart(part);

    private static bool IsGap(Switch part) => part is { StartsClosed: false, OpenResistance: null }
        && !ActsAtStart(part);

    // What happens when a switch acts at 0 s is a switching, with its own impulse, and no contradiction.
    private static bool ActsAtStart(Switch part) =>
        part.Events is [{ Trigger: AtInstant { Instant: { Delay.Nominal: 0, After: null } } }, ..];

    private static double AtStart(Wave wave) => wave.Scale.Nominal * wave.Pieces
        .Where(p => p.Start <= 0 && p.End > 0)
        .Sum(p => p.Amplitude * Math.Cos(p.Phase));

    private static T? Clause<T>(CheckState state, Part part)
        where T : ClauseSyntax =>
        state.DeclarationOf(part).Clauses.OfType<T>().FirstOrDefault();
}
