using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;
using CircuitTransient.Text;

namespace CircuitTransient.Measurements;

/// <summary>Warnings that the text gave, and those that only the answer can give.</summary>
internal static class Notices
{
    /// <summary>All warnings, those of the text first.</summary>
    public static ImmutableArray<Notice> Of(
        TransientSolution solution, ImmutableArray<Diagnostic> warnings,
        ImmutableArray<ObservationResult> observations) =>
    [
        .. warnings.Select(Notice.Of),
        .. solution.NeverActed
            .Where(e => Schedule.Resolve(Declared(solution, e), solution.Circuit.Parts) is null)
            .Select(e => NeverActed(solution, e)),
        .. solution.Lapsed.Select(lapse => Lapsed(solution, lapse)),
        .. observations.Where(o => o.EndsRising).Select(o => new Notice(
            0,
            $"{o.Name} is greatest at the end of the study and still rises: look further with a later "
                + "`until`")),
    ];

    private static SwitchEvent Declared(TransientSolution solution, EventReference reference) =>
        ((Switch)solution.Circuit.Parts[reference.Part]).Events[reference.Event];

    private static Notice Lapsed(TransientSolution solution, Lapse lapse)
    {
        var declared = Declared(solution, lapse.Event);
        var name = solution.Circuit.Parts[lapse.Event.Part].Name;
        var acts = declared.Closes ? "close" : "open";
        return Notice.Of(Diagnostic.Warning(
            solution.Circuit.Source,
            declared.Span,
            $"`{name}` does not {acts} here: what it waits for does not happen before its next event at "
                + EngineeringNumber.Format(lapse.Time, "s"),
            "let it wait for what is reached, or give it a fixed instant"));
    }

    private static Notice NeverActed(TransientSolution solution, EventReference reference)
    {
        var declared = Declared(solution, reference);
        var name = solution.Circuit.Parts[reference.Part].Name;
        return Notice.Of(Diagnostic.Warning(
            solution.Circuit.Source,
            declared.Span,
            declared.Closes
                ? $"`{name}` never closes within the study: what it waits for does not happen"
                : $"`{name}` never opens within the study: what it waits for does not happen, so it stays "
                    + "closed",
            "let it wait for what is reached, or end the study later with `until`"));
    }
}
