using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Reads which values are to be fitted: <c>Llp, Cn, Rd</c>.</summary>
public static class FitTargets
{
    /// <summary>The targets in the order written; a part's name means its own value, any other a named
    /// value.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="written">The option's name and its text.</param>
    public static Outcome<TargetList> Read(Circuit circuit, SourceText written)
    {
        var owners = circuit.Parts.Select(p => p.Name).Concat(circuit.Couplings.Select(c => c.Name))
            .ToHashSet(StringComparer.Ordinal);
        var targets = ImmutableArray.CreateBuilder<StudyTarget>();
        var place = 0;
        foreach (var piece in written.Content.Split(','))
        {
            var name = piece.Trim();
            var start = place + piece.IndexOf(name, StringComparison.Ordinal);
            var span = new TextSpan(start, name.Length);
            place += piece.Length + 1;
            if (name.Length == 0)
            {
                return new(null, [Diagnostic.Error(written, new TextSpan(start, Math.Min(1,
                    written.Content.Length - start)), "a name is missing here", "such as `Llp, Cn, Rd`")]);
            }

            var plain = name.Trim('"');
            targets.Add(owners.Contains(plain)
                ? new PartValueTarget(plain) { Written = written, Span = span }
                : new NamedValueTarget(plain) { Written = written, Span = span });
        }

        return new(new TargetList(targets.ToImmutable(), written), []);
    }
}

/// <summary>What is to be fitted.</summary>
/// <param name="Targets">In the order written.</param>
/// <param name="Written">The text.</param>
public sealed record TargetList(ImmutableArray<StudyTarget> Targets, SourceText Written);
