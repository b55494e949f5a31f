using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Scans;

/// <summary>An event whose instant is anywhere within a distance of the one stated, each instant as likely as
/// any other.</summary>
/// <param name="Varied">The event.</param>
/// <param name="Index">Its index in the values of the varied circuit.</param>
/// <param name="By">How far to either side, in seconds.</param>
public sealed record ScanScatter(VariedValue Varied, int Index, double By)
{
    /// <summary>The earliest instant, in seconds; not before t = 0.</summary>
    public double From => Math.Max(0, Varied.Nominal - By);

    /// <summary>The latest instant, in seconds; not past the study.</summary>
    public double To => Math.Min(Until ?? double.PositiveInfinity, Varied.Nominal + By);

    /// <summary>The end of the study as an instant of the event; null where it is not stated, or where the
    /// event follows another.</summary>
    public double? Until { get; init; }

    /// <summary>Whether it would begin before t = 0.</summary>
    public bool IsCutBelow => Varied.Nominal - By < 0;

    /// <summary>Whether it would go past the study.</summary>
    public bool IsCutAbove => Varied.Nominal + By > Until;

    /// <summary>Which event scatters: the one named, or the only event that is scanned.</summary>
    internal static (EventTimeTarget? Event, Diagnostic? Mistake) Target(
        ScatterSyntax scatter, ImmutableArray<ScannedSyntax> scanned)
    {
        if (scatter.Switch is { } name)
        {
            return (new EventTimeTarget(name, scatter.Closes)
            {
                Written = scatter.Source,
                Span = scatter.NameSpan,
            }, null);
        }

        return scanned.Where(s => s.Kind == ScannedKind.Event).ToArray() is [var only]
            ? ((EventTimeTarget)ScanTargets.Of(only), null)
            : (null, Diagnostic.Error(scatter.Source, scatter.By.Span, "which event scatters is not said",
                $"write `Kmain closes by {scatter.Source[scatter.By.Span]}`"));
    }

    /// <summary>The scatter in the varied circuit; its event is the last of the values, or one of the
    /// axes.</summary>
    internal static ScanScatter? Of(VariedCircuit varied, ScatterSyntax? scatter)
    {
        if (scatter is null)
        {
            return null;
        }

        // An event that is scanned too stands with the axes, any other behind them.
        var events = Enumerable.Range(0, varied.Values.Length)
            .Where(i => varied.Values[i].Kind == VariedKind.EventTime);
        var index = scatter.Switch is not { } name
            ? events.First()
            : events.First(i => varied.Values[i].Name == $"{name} {(scatter.Closes ? "closes" : "opens")}");
        return new ScanScatter(varied.Values[index], index, scatter.By.Value)
        {
            Until = ScanAxisLowering.StudyEnd(varied.Circuit, varied.Values[index]),
        };
    }
}
