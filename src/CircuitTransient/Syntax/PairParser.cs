namespace CircuitTransient.Syntax;

/// <summary>Reads what joins two windings: couplings and ideal transformers.</summary>
internal static class PairParser
{
    public static CouplingStatement? ReadCoupling(StatementCursor cursor, int start)
    {
        cursor.Form = "a coupling is written `coupling M1 of Lp and Ls : 0.98`, or `: 3 mH`";
        NameSyntax? first = null;
        NameSyntax? second = null;
        var name = NameParser.Read(cursor, "the name", "of");
        var isHead = name is not null && cursor.Expect("of")
            && (first = NameParser.ReadPart(cursor, "the name of an inductor")) is not null
            && cursor.Expect("and")
            && (second = NameParser.ReadPart(cursor, "the name of an inductor")) is not null;
        var value = PartParser.GoToValue(cursor)
            ? ToleranceParser.ReadTolerated(cursor, acceptsSum: true)
            : null;
        return isHead && value is not null
            ? new CouplingStatement(cursor.SpanFrom(start), name!, first!, second!, value)
            : null;
    }

    public static TransformerStatement? ReadTransformer(StatementCursor cursor, int start)
    {
        cursor.Form =
            "write `transformer T1 primary from p to minus, secondary from s to t : turns 10 to 1`";
        TerminalsSyntax? primary = null;
        TerminalsSyntax? secondary = null;
        var name = NameParser.Read(cursor, "the name", "primary");
        var isHead = name is not null && cursor.Expect("primary")
            && (primary = PartParser.ReadTerminals(cursor)) is not null && cursor.Expect(',')
            && cursor.Expect("secondary") && (secondary = PartParser.ReadTerminals(cursor)) is not null;
        ExpressionSyntax? first = null;
        ExpressionSyntax? second = null;
        var isValue = PartParser.GoToValue(cursor) && cursor.Expect("turns")
            && (first = ExpressionParser.ReadSum(cursor)) is not null && cursor.Expect("to")
            && (second = ExpressionParser.ReadSum(cursor)) is not null
            && ToleranceParser.Refuse(cursor, "a number of turns has no tolerance of its own",
                "name it: `value Turns : 10 ±1 %`");
        var clauses = PartParser.ReadClauses(cursor, isValue);
        return isHead && isValue
            ? new TransformerStatement(
                cursor.SpanFrom(start), name!, primary!, secondary!, first!, second!, clauses)
            : null;
    }
}
