using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>What is to be scanned: one or two values of a circuit over ranges, or how an event's instant
/// scatters, or both.</summary>
/// <param name="Varied">The circuit; its values are those of the axes, then the event that scatters.</param>
/// <param name="Axes">What is scanned; empty where only an event scatters.</param>
/// <param name="Scatter">The scatter; null where none was asked for.</param>
public sealed record ScanPlan(VariedCircuit Varied, ImmutableArray<ScanAxis> Axes, ScanScatter? Scatter)
{
    /// <summary>Looks up what the words name and checks the ranges, every mistake in one go.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="scanned">What is scanned: one or two, or none where an event scatters.</param>
    /// <param name="scatter">How an event scatters; null where nothing was said.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    public static Outcome<ScanPlan> Of(
        Circuit circuit, ImmutableArray<ScannedSyntax> scanned, ScatterSyntax? scatter,
        Func<string, Outcome<SourceText>> readBeside)
    {
        var ranged = scanned.Where(s => s.Range is not null).ToImmutableArray();
        if (Bare(circuit, scanned, scatter, readBeside) is { } bare)
        {
            return new(null, [bare]);
        }

        var targets = ranged.Select(ScanTargets.Of).ToList();
        var scattered = scatter is null ? default : ScanScatter.Target(scatter, scanned);
        if (scattered.Mistake is { } mistake)
        {
            return new(null, [mistake]);
        }

        if (scattered.Event is { } target)
        {
            targets.Add(target);
        }

        var found = VariedCircuit.Of(circuit, [.. targets], readBeside);
        return found.Then(varied => Lower(varied, ranged, scatter));
    }

    private static Outcome<ScanPlan> Lower(
        VariedCircuit varied, ImmutableArray<ScannedSyntax> ranged, ScatterSyntax? scatter)
    {
        var axes = ImmutableArray.CreateBuilder<ScanAxis>();
        var mistakes = new List<Diagnostic>();
        for (var i = 0; i < ranged.Length; i++)
        {
            if (i > 0 && ScanTargets.AreAlike(ranged[i], ranged[i - 1]))
            {
                mistakes.Add(Diagnostic.Error(ranged[i].Source, ranged[i].NameSpan,
                    $"`{ranged[i].Name}` is scanned twice", "scan two different values, or one"));
                break;
            }

            var axis = new ScanAxisLowering(varied.Circuit, ranged[i], varied.Values[i]).Lower();
            mistakes.AddRange(axis.Diagnostics);
            if (axis.Value is { } lowered)
            {
                axes.Add(lowered);
            }
        }

        if (mistakes.Count == 0 && axes is [var first, var second]
            && (long)first.Values.Length * second.Values.Length > ScanAxisLowering.MostPoints)
        {
            mistakes.Add(Diagnostic.Error(ranged[1].Source, ranged[1].Range!.Span,
                $"{first.Values.Length} × {second.Values.Length} points are "
                + $"{(long)first.Values.Length * second.Values.Length}, more than the "
                + $"{ScanAxisLowering.MostPoints} that a scan takes",
                "take wider steps: what lies between the points is searched too"));
        }

        return mistakes.Count > 0
            ? new(null, [.. mistakes])
            : new(new ScanPlan(varied, axes.ToImmutable(), ScanScatter.Of(varied, scatter)), []);
    }

    /// <summary>A name without a range is only a mistake where no scatter belongs to it; the advice offers a
    /// range about the value of the file.</summary>
    private static Diagnostic? Bare(
        Circuit circuit, ImmutableArray<ScannedSyntax> scanned, ScatterSyntax? scatter,
        Func<string, Outcome<SourceText>> readBeside)
    {
        foreach (var one in scanned.Where(s => s.Range is null))
        {
            if (one.Kind == ScannedKind.Event && scatter is { Switch: null })
            {
                continue;
            }

            var found = VariedCircuit.Of(circuit, [ScanTargets.Of(one)], readBeside);
            if (found.Value is not { } varied)
            {
                return found.Diagnostics[0];
            }

            var axis = new ScanAxis(varied.Values[0], "", ScanSpacing.Even, [0]);
            var nominal = varied.Values[0].Nominal;
            var (from, to) = one.Kind switch
            {
                ScannedKind.Phase => (0.0, Math.Tau),
                _ when nominal == 0 => (0, 1),
                _ => (Math.Min(nominal / 2, 2 * nominal), Math.Max(nominal / 2, 2 * nominal)),
            };
            return Diagnostic.Error(one.Source, one.NameSpan, "over which range is not said",
                $"write `{one.Source[one.NameSpan]} from {axis.Say(from)} to {axis.Say(to)}`");
        }

        return null;
    }
}
