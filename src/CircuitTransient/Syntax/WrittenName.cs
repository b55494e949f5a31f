using System.Globalization;

namespace CircuitTransient.Syntax;

/// <summary>The name of a part as results write it, read outside a circuit: there no counter of a repetition
/// is known.</summary>
internal static class WrittenName
{
    /// <summary>The name written out; null, and said, where it holds a counter.</summary>
    public static string? Of(StatementCursor cursor, NameSyntax name)
    {
        var owner = name.Owner is { } outer ? Of(cursor, outer) : "";
        if (owner is null)
        {
            return null;
        }

        if (name.Index is { Counter: { } counter } index)
        {
            cursor.Error(index.Span, $"there is no counter `{counter}` on the command line",
                $"write which one, such as `{name.Text}[1]`");
            return null;
        }

        var text = name.Index is { } number
            ? string.Create(CultureInfo.InvariantCulture, $"{name.Text}[{number.Offset}]")
            : name.Text;
        return owner.Length > 0 ? $"{owner}/{text}" : text;
    }
}
