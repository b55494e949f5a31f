using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads one statement from its tokens.</summary>
internal static class StatementParser
{
    private const int MostMentions = 1000; // names kept of an unreadable statement

    /// <summary>The statement, or an <see cref="UnreadableStatement"/> with what was wrong said.</summary>
    public static Statement Read(StatementCursor cursor)
    {
        var statement = ReadByKeyWord(cursor, cursor.Current.Start);
        if (statement is not null && !cursor.HasErrors && !cursor.IsAtEnd)
        {
            ClauseParser.ReportRest(cursor);
        }

        return statement is null || cursor.HasErrors ? Unreadable(cursor) : statement;
    }

    private static Statement? ReadByKeyWord(StatementCursor cursor, int start)
    {
        var word = cursor.Current.Kind == TokenKind.Word ? cursor.Shown(cursor.Current) : "";
        cursor.Advance(word.Length > 0 ? 1 : 0);
        return word switch
        {
            "circuit" => ReadTitle(cursor, start),
            "note" => ReadNote(cursor, start),
            "reference" => ReadReference(cursor, start),
            "value" => ReadValue(cursor, start),
            "resistor" => PartParser.ReadSimple(cursor, start, SimplePartKind.Resistor),
            "capacitor" => PartParser.ReadSimple(cursor, start, SimplePartKind.Capacitor),
            "inductor" => PartParser.ReadSimple(cursor, start, SimplePartKind.Inductor),
            "source" => PartParser.ReadSource(cursor, start),
            "dependent" => PartParser.ReadDependent(cursor, start),
            "switch" => PartParser.ReadSwitch(cursor, start),
            "coupling" => PairParser.ReadCoupling(cursor, start),
            "transformer" => PairParser.ReadTransformer(cursor, start),
            "observe" => StudyParser.ReadObserve(cursor, start),
            "require" => StudyParser.ReadRequire(cursor, start),
            "start" => StudyParser.ReadStart(cursor, start),
            "until" => StudyParser.ReadUntil(cursor, start),
            "repeat" => BlockParser.ReadRepeat(cursor, start),
            "assembly" => BlockParser.ReadAssembly(cursor, start),
            "place" => BlockParser.ReadPlace(cursor, start),
            _ => ReportUnknown(cursor, start, word),
        };
    }

    private static Statement? ReportUnknown(StatementCursor cursor, int start, string word)
    {
        cursor.Form =
            "statements start with `resistor`, `source`, `switch`, `observe`, `require` or another key word";
        if (word.Length == 0)
        {
            cursor.Unexpected("a key word");
            return null;
        }

        var nearest = NearestName.Find(word, StatementKeyWords.All);
        cursor.Error(cursor.SpanFrom(start), $"no statement starts with `{word}`",
            nearest is null ? cursor.Form : $"did you mean `{nearest}`?");
        return null;
    }

    private static TitleStatement? ReadTitle(StatementCursor cursor, int start)
    {
        cursor.Form = "the title is written `circuit \"Bullwheel bus\"`";
        return StudyParser.ReadText(cursor, "the title in quotes", out var title)
            ? new TitleStatement(cursor.SpanFrom(start), title)
            : null;
    }

    private static NoteStatement? ReadNote(StatementCursor cursor, int start)
    {
        cursor.Form = "a note is written `note \"Kmain bypasses the charging resistor.\"`";
        return StudyParser.ReadText(cursor, "the note in quotes", out var note)
            ? new NoteStatement(cursor.SpanFrom(start), note)
            : null;
    }

    private static ReferenceStatement? ReadReference(StatementCursor cursor, int start)
    {
        cursor.Form = "the reference conductor is written `reference is minus`";
        return cursor.Expect("is") && NameParser.ReadNode(cursor) is { } node
            ? new ReferenceStatement(cursor.SpanFrom(start), node)
            : null;
    }

    private static ValueStatement? ReadValue(StatementCursor cursor, int start)
    {
        cursor.Form = "a value is written `value Rdamp : 2.2 Ω ±1 %`";
        return NameParser.Read(cursor, "the name") is { } name && PartParser.GoToValue(cursor)
            && ToleranceParser.ReadTolerated(cursor, acceptsSum: true) is { } value
            ? new ValueStatement(cursor.SpanFrom(start), name, value)
            : null;
    }

    /// <summary>What is kept of a statement that cannot be read.</summary>
    public static UnreadableStatement Unreadable(StatementCursor cursor)
    {
        var (keyWord, name) = cursor.Introduction();
        return new UnreadableStatement(
            cursor.WholeSpan, keyWord, name, [.. cursor.Names().Take(MostMentions)]);
    }
}
