using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Starts that contradict themselves: stated charges and currents that jump at t = 0.</summary>
internal static class StoredContradictions
{
    private const int MostNamed = 3;

    /// <summary>Warns of each set of capacitors or coils whose stated quantities contradict each other, with
    /// the jumps that follow.</summary>
    public static void Check(CheckState state, IReadOnlyCollection<Coupling> couplings, bool startsSettled)
    {
        // What these do to the sharing is known when the equations are solved.
        var isPlain = !state.Parts.Any(p => p is IdealTransformer or DependentSource
            || (p is Switch s && s.ActsAtStart())) && !couplings.Any(c => IsTight(state, c));
        Report(new StoredCharges(state.Parts, state.Nodes.Count).Contradictions());
        Report(new StoredCurrents(state.Parts, state.Nodes.Count, couplings).Contradictions());

        void Report(IEnumerable<Contradiction> found)
        {
            foreach (var contradiction in found)
            {
                Warn(state, contradiction, isPlain, startsSettled);
            }
        }
    }

    private static bool IsTight(CheckState state, Coupling coupling) =>
        Math.Abs(CoilSets.Factor(state.Parts, coupling)) > 1 - 1e-9; // shares as a transformer does

    private static void Warn(
        CheckState state, Contradiction contradiction, bool isPlain, bool startsSettled)
    {
        var held = contradiction.Parts;
        if (held.LastOrDefault(h => h.IsStated) is not { } last
            || (startsSettled && held.Any(h => !h.IsStated))) // what is not stated follows from the sources
        {
            return;
        }

        var clause = state.DeclarationOf(last.Part).Clauses
            .First(c => c is ChargedToSyntax or CarryingSyntax);
        var (message, advice) = held is [{ After: { } after } only]
            ? Alone(only, after)
            : Together(held, isPlain);
        state.Findings.Warn(clause.Span, message, advice);
    }

    private static (string Message, string Advice) Alone(HeldQuantity held, double after) =>
        (held.Part is Capacitor
            ? $"`{held.Part.Name}` is {Words(held, held.Before)}, but is held at {Say(held, after)}"
            : $"`{held.Part.Name}` carries {Say(held, held.Before)}, but is held at {Say(held, after)}",
        $"it jumps by {Say(held, after - held.Before)} at once; "
            + $"write `{Words(held, after)}` if no jump is meant");

    private static (string Message, string Advice) Together(HeldQuantity[] held, bool isPlain)
    {
        var isCharge = held[0].Part is Capacitor;
        var message = Joined([
            .. held.Take(MostNamed).Select((h, n) => $"`{h.Part.Name}` "
                + (n == 0 ? Words(h, h.Before) : (isCharge ? "to " : "") + Say(h, h.Before))),
            .. held.Length > MostNamed ? [$"{held.Length - MostNamed} more"] : Array.Empty<string>(),
        ]) + (isCharge ? " do not agree round their loop" : " do not agree where only they meet");
        var otherwise = (isCharge ? "charge them to" : "let them carry") + " what fits if no jump is meant";
        if (!isPlain || held.Any(h => h.After is null))
        {
            return (message, $"they share their {(isCharge ? "charge" : "flux")} at once, as the impulses in "
                + $"the result show; {otherwise}");
        }

        var moved = held.Where(h => h.Jumps).Take(MostNamed).ToArray();
        var jumps = moved.Select((h, n) =>
            $"`{h.Part.Name}` {(n == 0 ? "jumps by" : "by")} {Say(h, h.After!.Value - h.Before)}");
        var edits = moved.Select(h => $"`{Words(h, h.After!.Value)}`").Distinct();
        var more = held.Count(h => h.Jumps) - moved.Length;
        return (message, string.Join(", ", jumps) + (more > 0
            ? $" and {more} more; {otherwise}"
            : $"; if no jump is meant, write {Joined([.. edits])}"));
    }

    private static string Joined(string[] words) => words.Length == 1
        ? words[0]
        : $"{string.Join(", ", words[..^1])} and {words[^1]}";

    private static string Words(HeldQuantity held, double value) =>
        (held.Part is Capacitor ? "charged to " : "carrying ") + Say(held, value);

    // A jump found by elimination is off in the last digits; twelve are exact for what a file states.
    private static string Say(HeldQuantity held, double value) =>
        Amount.Of(double.Parse(value.ToString("E11")), held.Part is Capacitor ? "V" : "A");
}

/// <summary>Parts whose stored quantities contradict each other.</summary>
/// <param name="Parts">All that share what is too much, in the order of the file.</param>
internal sealed record Contradiction(HeldQuantity[] Parts);

/// <summary>A capacitor's voltage or a coil's current about t = 0.</summary>
/// <param name="Part">The part.</param>
/// <param name="Before">What is stated, or 0; in volts or amperes.</param>
/// <param name="IsStated">Whether the file states it.</param>
/// <param name="After">What it jumps to; null where that is not known.</param>
internal sealed record HeldQuantity(Part Part, double Before, bool IsStated, double? After)
{
    /// <summary>Stated values that agree to nine digits are meant to agree.</summary>
    public const double Rounding = 1e-9;

    /// <summary>Whether it changes by more than rounding.</summary>
    public bool Jumps => After is { } after && Math.Abs(after - Before)
        > Rounding * Math.Max(Math.Abs(after), Math.Abs(Before));
}
