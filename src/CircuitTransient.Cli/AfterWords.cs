using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>The words of <c>--after</c>: a switching, an instant, or <c>last</c>.</summary>
/// <param name="Text">As written.</param>
/// <param name="Event">What they mean.</param>
public sealed record AfterWords(string Text, AfterEvent Event)
{
    /// <summary>Reads the words; null where they mean nothing, which is said.</summary>
    public static AfterWords? Read(string text, Streams streams)
    {
        var read = AfterParser.Parse(new SourceText("--after", text));
        streams.Report(read.Diagnostics);
        return read.Value switch
        {
            AfterLastSyntax => new(text, new AfterLast()),
            AfterInstantSyntax { Instant.Value: var instant } => new(text, new AfterInstant(instant)),
            AfterSwitchingSyntax(var name, var closes) => new(text, new AfterSwitching(name, closes)),
            _ => null,
        };
    }

    /// <summary>Why a study has no such event; null where it has.</summary>
    public string? Missing(TransientResult result)
    {
        switch (Event)
        {
            case AfterSwitching switching:
                return result.Events.Any(e => e.Switch == switching.Switch && e.Closes == switching.Closes)
                    ? null
                    : $"--after: there is no event `{Words(switching.Switch, switching.Closes)}`"
                        + Nearest(switching, result.Events);
            case AfterInstant { Time: var time } when time > result.Until:
                return $"--after: the study ends before {Seconds(time)}, at {Seconds(result.Until)}";
            case AfterInstant { Time: var time } when !result.Events.Any(e => e.Time <= time):
                return $"--after: no switch acts up to {Seconds(time)}"
                    + (result.Events.IsEmpty
                        ? " or later"
                        : $"; the first is {Words(result.Events[0].Switch, result.Events[0].Closes)} at "
                            + Seconds(result.Events[0].Time));
            case AfterLast when result.Events.IsEmpty:
                return "--after: no switch acts in this study";
            default:
                return null;
        }
    }

    private static string Nearest(AfterSwitching sought, ImmutableArray<EventResult> events)
    {
        var known = events.Select(e => Words(e.Switch, e.Closes)).Distinct().ToArray();
        var nearest = known.Length == 0 ? null
            : NearestName.Find(Words(sought.Switch, sought.Closes), known);
        return nearest is not null ? $"; did you mean `{nearest}`?"
            : known.Length == 0 ? "; no switch acts in this study"
            : $"; there are {string.Join(", ", known.Take(10).Select(k => $"`{k}`"))}";
    }

    private static string Words(string name, bool closes) => $"{name} {(closes ? "closes" : "opens")}";

    private static string Seconds(double time) => EngineeringNumber.Format(time, "s");
}
