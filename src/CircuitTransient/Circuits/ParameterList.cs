using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>The values a study may vary, as they are met. A value and a part that share a name are told apart
/// as <c>value R1</c> and <c>part R1</c>.</summary>
internal sealed class ParameterList
{
    private readonly ImmutableArray<Parameter>.Builder list = ImmutableArray.CreateBuilder<Parameter>();
    private readonly HashSet<string> shared = new(StringComparer.Ordinal);

    public int Count => list.Count;

    public Parameter this[int index] => list[index];

    /// <summary>Says that both a value and a part bear the name.</summary>
    public void Share(string name) => shared.Add(name);

    /// <summary>Adds a parameter and gives the formula that reads it.</summary>
    /// <param name="owner">The name of the value or part.</param>
    /// <param name="aspect">What of a part: <c>initial charge</c>; null for the value itself.</param>
    /// <param name="isNamedValue">Whether the owner is a named value.</param>
    /// <param name="written">Its value as written, with its tolerance.</param>
    public Formula Add(
        string owner, string? aspect, bool isNamedValue, Evaluated value, Tolerance? tolerance,
        TextSpan span, ToleratedSyntax written)
    {
        var name = aspect is not null ? $"{owner} {aspect}"
            : shared.Contains(owner) ? (isNamedValue ? "value " : "part ") + owner
            : owner;
        list.Add(new Parameter(
            name, Measure.Of(value.Dimension).Unit, value.Value, tolerance, span, written.Value.Span,
            written.Tolerance?.Span)
        {
            Owner = owner,
            Aspect = aspect,
            IsNamedValue = isNamedValue,
        });
        return new ParameterFormula(list.Count - 1);
    }

    public ImmutableArray<Parameter> ToImmutable() => list.ToImmutable();

    /// <summary>The indices of the parameters with a tolerance that a formula reads.</summary>
    public IEnumerable<int> Toleranced(Formula? formula) =>
        ReadParameters.In(formula).Where(index => list[index].Tolerance is not null);

    /// <summary>The first parameter with a tolerance that a formula reads, or null.</summary>
    public Parameter? FirstToleranced(Formula? formula) =>
        Toleranced(formula).Select(index => list[index]).FirstOrDefault();
}
