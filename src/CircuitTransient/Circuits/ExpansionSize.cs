using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Counts what a circuit grows to before any of it is written out.</summary>
internal sealed class ExpansionSize(
    Findings findings, ExpressionEvaluator evaluator, Dictionary<string, AssemblyStatement> assemblies)
{
    private const long MostVisits = 1_000_000;

    private long visits;

    /// <summary>Whether the circuit stays within a number of parts; if not, that is an error with the
    /// count.</summary>
    public bool IsWithin(ImmutableArray<Statement> statements, Scope scope, long most)
    {
        var count = Count(statements, scope);
        if (count <= most && visits <= MostVisits)
        {
            return true;
        }

        var said = visits > MostVisits ? "more than a million"
            : count < 1e15 ? ((long)count).ToString("#,0", CultureInfo.InvariantCulture).Replace(',', ' ')
            : count.ToString("0e0", CultureInfo.InvariantCulture);
        var largest = statements.Where(s => s is RepeatStatement or PlaceStatement)
            .MaxBy(s => Count([s], scope));
        var span = largest is RepeatStatement repeat ? repeat.Count.Span
            : largest is PlaceStatement place ? place.Name.Span : new TextSpan(0, 0);
        findings.Error(span, $"written out, this circuit has {said} parts; the most is 100 000",
            "repeat fewer times, or lump several sections into one");
        return false;
    }

    /// <summary>How often a repetition goes round, or null where that has been reported as an
    /// error.</summary>
    public static int? CountOf(RepeatStatement repeat, Scope scope, ExpressionEvaluator evaluator,
        Findings findings)
    {
        if (evaluator.Evaluate(repeat.Count, scope) is not { } count)
        {
            return null;
        }

        if (count.Dimension == Dimension.None && count.Value >= 0 && count.Value == Math.Round(count.Value)
            && count.Value <= int.MaxValue)
        {
            return (int)count.Value;
        }

        findings.Error(repeat.Count.Span,
            $"`{findings.Source[repeat.Count.Span]}` is not a number of times to repeat",
                "write a whole number");
        return null;
    }

    private double Count(ImmutableArray<Statement> statements, Scope scope)
    {
        var sum = 0.0;
        foreach (var statement in statements)
        {
            if (++visits > MostVisits)
            {
                return sum;
            }

            sum += statement switch
            {
                AssemblyStatement => 0,
                RepeatStatement repeat => Rounds(repeat, scope),
                PlaceStatement place => Placed(place, scope),
                _ => 1,
            };
        }

        return sum;
    }

    private double Rounds(RepeatStatement repeat, Scope scope)
    {
        if (CountOf(repeat, scope, evaluator, findings) is not { } count)
        {
            return 0;
        }

        // Rounds differ only where a repetition inside counts by this counter.
        Scope Round(int k) => scope with { Counters = scope.Counters.SetItem(repeat.Counter, k) };
        if (!repeat.Body.Any(s => s is RepeatStatement))
        {
            return Math.Max(1, Count(repeat.Body, Round(1))) * count;
        }

        var sum = 0.0;
        for (var k = 1; k <= count && visits <= MostVisits; k++)
        {
            sum += Math.Max(1, Count(repeat.Body, Round(k)));
        }

        return sum;
    }

    private double Placed(PlaceStatement place, Scope scope)
    {
        if (!assemblies.TryGetValue(place.Assembly.Text, out var assembly))
        {
            return 0;
        }

        var inner = Scope.Outermost(scope.Reference);
        return Math.Max(1, Count(assembly.Body, inner));
    }
}
