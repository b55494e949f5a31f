using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;

namespace CircuitTransient.Text;

/// <summary>What a stage returns: a value, or the errors that kept it from one; warnings come with
/// either.</summary>
public sealed record Outcome<T>(T? Value, ImmutableArray<Diagnostic> Diagnostics)
    where T : class
{
    /// <summary>Whether there is a value.</summary>
    [MemberNotNullWhen(true, nameof(Value))]
    public bool Succeeded => Value is not null;

    /// <summary>Hands the value to the next stage and gathers the diagnostics of both.</summary>
    public Outcome<TNext> Then<TNext>(Func<T, Outcome<TNext>> stage)
        where TNext : class
    {
        if (!Succeeded)
        {
            return new Outcome<TNext>(null, Diagnostics);
        }

        var next = stage(Value);
        return next with { Diagnostics = [.. Diagnostics, .. next.Diagnostics] };
    }
}
