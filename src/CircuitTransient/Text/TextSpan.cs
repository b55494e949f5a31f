namespace CircuitTransient.Text;

/// <summary>A run of characters in a source text: where something was written.</summary>
public readonly record struct TextSpan(int Start, int Length)
{
    /// <summary>The offset just past the last character.</summary>
    public int End => Start + Length;

    /// <summary>The span from the start of one to the end of another.</summary>
    public static TextSpan Between(TextSpan first, TextSpan last) => new(first.Start, last.End - first.Start);
}
