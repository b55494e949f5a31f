using System.Collections.Immutable;

namespace CircuitTransient.Syntax;

/// <summary>Reads the first lines of repetitions and assemblies, and where an assembly is placed.</summary>
internal static class BlockParser
{
    public static RepeatStatement? ReadRepeat(StatementCursor cursor, int start)
    {
        cursor.Form = "a repetition is written `repeat 40 as k`, and `end` closes it";
        return ExpressionParser.ReadSum(cursor) is { } count && cursor.Expect("as")
            && NameParser.Read(cursor, "the name of the counter") is { Index: null, IsQuoted: false } counter
            ? new RepeatStatement(cursor.SpanFrom(start), count, counter.Text, [])
            : null;
    }

    public static AssemblyStatement? ReadAssembly(StatementCursor cursor, int start)
    {
        cursor.Form =
            "an assembly is written `assembly filter with terminals in, out, ret`, and `end` closes it";
        if (NameParser.Read(cursor, "the name", "with") is not { } name
            || !cursor.Expect("with", "terminals"))
        {
            return null;
        }

        var terminals = ImmutableArray.CreateBuilder<NameSyntax>();
        do
        {
            if (NameParser.ReadNode(cursor, "the name of a terminal") is not { } terminal)
            {
                return null;
            }

            terminals.Add(terminal);
        }
        while (cursor.Take(','));
        return new AssemblyStatement(cursor.SpanFrom(start), name, terminals.ToImmutable(), []);
    }

    public static PlaceStatement? ReadPlace(StatementCursor cursor, int start)
    {
        cursor.Form = "it is written `place filter as Stage1 with in = a, out = b, ret = minus`";
        if (NameParser.Read(cursor, "the name of the assembly", "as") is not { } assembly
            || !cursor.Expect("as")
            || NameParser.Read(cursor, "the name", "with") is not { } name || !cursor.Expect("with"))
        {
            return null;
        }

        var assignments = ImmutableArray.CreateBuilder<AssignmentSyntax>();
        do
        {
            if (ReadAssignment(cursor) is not { } assignment)
            {
                return null;
            }

            assignments.Add(assignment);
        }
        while (cursor.Take(','));
        return new PlaceStatement(cursor.SpanFrom(start), assembly, name, assignments.ToImmutable());
    }

    private static AssignmentSyntax? ReadAssignment(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (NameParser.ReadNode(cursor, "a terminal or value of the assembly") is not { } inner
            || !cursor.Expect('='))
        {
            return null;
        }

        // `in = a/b` may be an inner node or a quotient: both readings are kept for the checker to choose.
        var here = cursor.Here;
        var node = NameParser.ReadNode(cursor);
        var isNode = node is not null && (cursor.IsAtEnd || cursor.IsSign(','));
        var behindNode = cursor.Here;
        cursor.Return(here);
        var value = ToleranceParser.ReadTolerated(cursor, acceptsSum: true);
        if (value is null && isNode)
        {
            cursor.Return((behindNode.Position, here.Errors));
        }

        return value is null && !isNode
            ? null
            : new AssignmentSyntax(cursor.SpanFrom(start), inner, isNode ? node : null, value);
    }
}
