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
    private const string Form =
        "write a switching such as `Kmain closes`, an instant such as `6 s`, or `last`";

    /// <summary>Reads the words; null where they mean nothing, which is said.</summary>
    public static AfterWords? Read(string text, Streams streams)
    {
        var words = text.Trim();
        if (words == "last")
        {
            return new(text, new AfterLast());
        }

        foreach (var (ending, closes) in new[] { (" closes", true), (" opens", false) })
        {
            if (words.EndsWith(ending, StringComparison.Ordinal))
            {
                var name = words[..^ending.Length].Trim().Trim('"');
                return new(text, new AfterSwitching(name, closes));
            }
        }

        if (words is not [>= '0' and <= '9' or '-', ..])
        {
            streams.Complain($"--after `{text}` names no event: {Form}");
            return null;
        }

        var instants = InstantListParser.Parse(new SourceText("--after", text));
        streams.Report(instants.Diagnostics);
        if (instants.Value is { Instants.Length: > 1 })
        {
            streams.Complain($"--after `{text}` names several instants: {Form}");
            return null;
        }

        return instants.Value is { Instants: [var instant] }
            ? new(text, new AfterInstant(instant.Value))
            : null;
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
