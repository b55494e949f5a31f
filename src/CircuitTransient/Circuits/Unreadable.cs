using System.Collections.Immutable;
using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Keeps what follows from a statement that could not be read from being reported as well.</summary>
internal static class Unreadable
{
    /// <summary>Whether there was any; where none was kept, more than one statement may be missing.</summary>
    public static bool Excuse(ImmutableArray<Statement> statements, Findings findings)
    {
        var found = false;
        foreach (var statement in statements)
        {
            switch (statement)
            {
                case UnreadableStatement unreadable:
                    found = true;
                    findings.LacksParts |= unreadable.KeyWord is not (
                        "observe" or "require" or "value" or "note"
                        or "circuit" or "start" or "until");
                    findings.Excused.UnionWith(unreadable.Mentions);
                    if (unreadable.Name is { } name)
                    {
                        findings.Excused.Add(name.Text);
                    }

                    break;
                case RepeatStatement repeat:
                    found |= Excuse(repeat.Body, findings);
                    break;
                case AssemblyStatement assembly:
                    found |= Excuse(assembly.Body, findings);
                    break;
            }
        }

        return found;
    }
}
