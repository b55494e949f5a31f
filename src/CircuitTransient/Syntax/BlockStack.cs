using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>The repetitions and assemblies that are open while a file is read.</summary>
internal sealed class BlockStack(SourceText source, List<Diagnostic> diagnostics)
{
    private const int Deepest = 200;

    private readonly Stack<(Statement Header, ImmutableArray<Statement>.Builder Body)> open = [];
    private ImmutableArray<Statement>.Builder current = ImmutableArray.CreateBuilder<Statement>();

    /// <summary>Whether blocks were nested past reason, and reading should stop.</summary>
    public bool IsTooDeep { get; private set; }

    /// <summary>Adds a statement to the innermost block; one that opens a block
    /// becomes the innermost.</summary>
    public void Add(Statement statement)
    {
        var opens = statement is RepeatStatement or AssemblyStatement
            or UnreadableStatement { KeyWord: "repeat" or "assembly" };
        if (!opens)
        {
            current.Add(statement);
            return;
        }

        if (open.Count == Deepest)
        {
            IsTooDeep = true;
            diagnostics.Add(Diagnostic.Error(source, statement.Span,
                $"blocks are nested deeper than {Deepest}", "close the outer ones with `end` first"));
            return;
        }

        open.Push((statement, current));
        current = ImmutableArray.CreateBuilder<Statement>();
    }

    /// <summary>Closes the innermost block at its <c>end</c>.</summary>
    public void Close(TextSpan end)
    {
        if (open.Count == 0)
        {
            diagnostics.Add(Diagnostic.Error(source, end, "this `end` closes nothing",
                "`end` closes `repeat` or `assembly`; a study ends with `until`"));
            return;
        }

        Pop(end);
    }

    /// <summary>The statements of the file; a block still open is an error.</summary>
    public ImmutableArray<Statement> Finish()
    {
        while (open.Count > 0)
        {
            if (IsTooDeep)
            {
                Pop(open.Peek().Header.Span);
                continue;
            }

            var header = open.Peek().Header;
            var word = header is AssemblyStatement or UnreadableStatement { KeyWord: "assembly" }
                ? "assembly"
                : "repeat";
            diagnostics.Add(Diagnostic.Error(source, new TextSpan(header.Span.Start, word.Length),
                $"the `{word}` that starts here has no `end`",
                "write `end` on a line of its own behind its last line"));
            Pop(header.Span);
        }

        return current.ToImmutable();
    }

    private void Pop(TextSpan end)
    {
        var (header, outer) = open.Pop();
        var body = current.ToImmutable();
        var span = TextSpan.Between(header.Span, end);
        outer.Add(header switch
        {
            RepeatStatement repeat => repeat with { Span = span, Body = body },
            AssemblyStatement assembly => assembly with { Span = span, Body = body },
            UnreadableStatement unreadable => unreadable with { Span = span },
            _ => throw new System.Diagnostics.UnreachableException($"{header} opens no block"),
        });
        current = outer;
    }
}
