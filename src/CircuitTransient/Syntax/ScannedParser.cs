using System.Globalization;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads what a scan varies: a name, <c>from</c>, <c>to</c>, and how the range is divided.</summary>
public static class ScannedParser
{
    /// <summary>The steps of a range that says none.</summary>
    public const int UsualSteps = 60;

    private static readonly string[] Actions = ["closes", "opens"];
    private static readonly int[] Series = [3, 6, 12, 24, 48, 96, 192];

    /// <summary>Reads one; errors point into its own text.</summary>
    public static Outcome<ScannedSyntax> Parse(SourceText source, ScannedKind kind) =>
        OptionText.Parse(source, "nothing is named", FormOf(kind), cursor => Read(cursor, source, kind));

    /// <summary>The name of a part, source, switch or value with its index and the assemblies it stands in;
    /// null where an error was reported.</summary>
    internal static string? ReadName(StatementCursor cursor, string what)
    {
        var name = NameParser.ReadPart(cursor, what);
        return name is null ? null : WrittenName.Of(cursor, name);
    }

    /// <summary>A switch and what it does: <c>Kmain closes</c>.</summary>
    internal static (string Name, bool Closes)? ReadEvent(StatementCursor cursor)
    {
        if (ReadName(cursor, "the name of a switch") is not { } name)
        {
            return null;
        }

        var closes = cursor.Take("closes");
        if (!closes && !cursor.Take("opens"))
        {
            cursor.Unexpected("`closes` or `opens`", Actions);
            return null;
        }

        return (name, closes);
    }

    private static string FormOf(ScannedKind kind, string? name = null) => kind switch
    {
        ScannedKind.Value => $"write `{name ?? "Rdamp"} from 1 Ω to 10 Ω in 50 steps`",
        ScannedKind.Part => $"write `{name ?? "Rsn"} from 10 Ω to 1 kΩ in 20 steps a decade`",
        ScannedKind.Phase => $"write `{name ?? "Grid"} from 0° to 360° in 5° steps`",
        _ => $"write `{name ?? "Kmain closes"} from 0 s to 20 ms in 200 steps`",
    };

    private static ScannedSyntax? Read(StatementCursor cursor, SourceText source, ScannedKind kind)
    {
        var start = cursor.Current.Start;
        var closes = false;
        string? name;
        if (kind == ScannedKind.Event)
        {
            var read = ReadEvent(cursor);
            (name, closes) = (read?.Name, read?.Closes ?? false);
        }
        else
        {
            name = ReadName(cursor, kind switch
            {
                ScannedKind.Value => "the name of a value",
                ScannedKind.Phase => "the name of a source",
                _ => "the name of a part",
            });
        }

        if (name is null)
        {
            return null;
        }

        var span = cursor.SpanFrom(start);
        cursor.Form = FormOf(kind, source[span]);
        if (cursor.IsAtEnd)
        {
            return new(source, kind, name, span, closes, null);
        }

        return ReadRange(cursor) is { } range ? new(source, kind, name, span, closes, range) : null;
    }

    private static RangeSyntax? ReadRange(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (!cursor.Expect("from") || ReadNumber(cursor) is not { } from
            || !cursor.Expect("to") || ReadNumber(cursor) is not { } to)
        {
            return null;
        }

        var span = cursor.SpanFrom(start);
        if (cursor.IsAtEnd)
        {
            return new(span, from, to, new StepCountSyntax(span, UsualSteps));
        }

        return cursor.Expect("in") && ReadSpacing(cursor) is { } spacing
            ? new(cursor.SpanFrom(start), from, to, spacing)
            : null;
    }

    private static SpacingSyntax? ReadSpacing(StatementCursor cursor)
    {
        var start = cursor.Current;
        if (start.Kind == TokenKind.Word && ReadSeries(cursor) is { } values)
        {
            return new PreferredValuesSyntax(cursor.SpanFrom(start.Start), values);
        }

        if (start.Kind == TokenKind.Number && cursor.IsWord("steps", 1))
        {
            return ReadCount(cursor) is not { } count ? null
                : cursor.Take("a", "decade") ? new StepsADecadeSyntax(cursor.SpanFrom(start.Start), count)
                : new StepCountSyntax(cursor.SpanFrom(start.Start), count);
        }

        if (start.Kind == TokenKind.Number)
        {
            return ReadNumber(cursor) is { } width && cursor.Expect("steps")
                ? new StepWidthSyntax(cursor.SpanFrom(start.Start), width)
                : null;
        }

        if (!cursor.HasErrors)
        {
            cursor.Form = "write `in 50 steps`, `in 20 steps a decade`, `in 5 Ω steps` or `in E12`";
            cursor.Unexpected("a number of steps");
        }

        return null;
    }

    private static int? ReadCount(StatementCursor cursor)
    {
        var token = cursor.Advance();
        if (int.TryParse(cursor.TextOf(token), NumberStyles.None, CultureInfo.InvariantCulture, out var count)
            && count > 0)
        {
            cursor.Advance(); // `steps`
            return count;
        }

        cursor.Error(token.Span, $"`{cursor.Shown(token)}` is not a number of steps",
            "steps are counted with a whole number from 1 on");
        return null;
    }

    private static int? ReadSeries(StatementCursor cursor)
    {
        var text = cursor.TextOf(cursor.Current);
        if (text is not ['E', ..]
            || !int.TryParse(text[1..], NumberStyles.None, CultureInfo.InvariantCulture, out var values))
        {
            return null;
        }

        if (Series.Contains(values))
        {
            cursor.Advance();
            return values;
        }

        cursor.Error(cursor.Current.Span, $"there is no series `{cursor.Shown(cursor.Current)}`",
            $"the series of IEC 60063 are {string.Join(", ", Series.Select(s => $"E{s}"))}");
        return null;
    }

    /// <summary>A number with its sign and its unit.</summary>
    internal static NumberSyntax? ReadNumber(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        var isNegative = cursor.Take('-');
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("a number");
            return null;
        }

        return NumberParser.Read(cursor) is not { } number ? null
            : number with
            {
                Span = cursor.SpanFrom(start),
                Value = isNegative ? -number.Value : number.Value,
            };
    }
}
