using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>What a file says once for the whole circuit.</summary>
/// <param name="ReferenceSpan">Where the reference is named; the first statement where it is not.</param>
internal sealed record StudySettings(
    string? Title, ImmutableArray<string> Notes, string Reference, TextSpan ReferenceSpan, bool StartsSettled,
    UntilStatement? Until)
{
    private const double LongestStudy = 1e12; // a terasecond

    public static StudySettings Read(CircuitSyntax syntax, Findings findings)
    {
        var title = Once<TitleStatement>(syntax, findings, "the title");
        var reference = Once<ReferenceStatement>(syntax, findings, "the reference");
        var start = Once<StartStatement>(syntax, findings, "the start");
        var until = Once<UntilStatement>(syntax, findings, "the end of the study");
        ForbidInside(syntax.Statements, findings);
        return new StudySettings(
            title?.Title,
            [.. syntax.Statements.OfType<NoteStatement>().Select(n => n.Note)],
            reference?.Node.Text ?? "ground",
            reference?.Node.Span ?? syntax.Statements.FirstOrDefault()?.Span ?? default,
            start?.IsSettled ?? false,
            until);
    }

    /// <summary>The end of the study in seconds, or null where none is written or an error was
    /// reported.</summary>
    public double? End(CheckState state, Scope scope)
    {
        if (Until is null || Expected.Fixed(state, Until.Time, scope, Dimension.Time) is not { } end)
        {
            return null;
        }

        if (end is > 0 and <= LongestStudy)
        {
            return end;
        }

        state.Findings.Error(Until.Time.Span, end > 0
            ? $"a study of {Amount.Of(end, "s")} is longer than a terasecond"
            : $"the study would end at {Amount.Of(end, "s")}, and it starts at 0 s",
            end > 0 ? "end it earlier; the slowest time constant is a guide" : "give an end after 0 s");
        return null;
    }

    private static T? Once<T>(CircuitSyntax syntax, Findings findings, string what)
        where T : Statement
    {
        T[] all = [.. syntax.Statements.OfType<T>()];
        foreach (var again in all.Skip(1))
        {
            findings.Error(again.Span, $"{what} is given twice",
                $"line {findings.LineOf(all[0].Span)} has it already; leave one of them out");
        }

        return all.FirstOrDefault();
    }

    private static void ForbidInside(ImmutableArray<Statement> statements, Findings findings)
    {
        foreach (var body in statements.Select(s => s switch
        {
            RepeatStatement repeat => repeat.Body,
            AssemblyStatement assembly => assembly.Body,
            _ => [],
        }))
        {
            foreach (var statement in body)
            {
                if (statement is TitleStatement or NoteStatement or ReferenceStatement or StartStatement
                    or UntilStatement)
                {
                    findings.Error(statement.Span,
                        "this speaks of the whole circuit and cannot stand inside a block",
                        "move it above the `repeat` or `assembly`");
                }
            }

            ForbidInside(body, findings);
        }
    }
}
