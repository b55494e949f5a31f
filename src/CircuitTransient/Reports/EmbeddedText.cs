namespace CircuitTransient.Reports;

/// <summary>The texts that this library carries: schemas, the style and scripts of the page.</summary>
internal static class EmbeddedText
{
    /// <summary>A text by its file's name.</summary>
    public static string Of(string name)
    {
        using var stream = typeof(EmbeddedText).Assembly.GetManifestResourceStream(name)
            ?? throw new InvalidOperationException($"{name} is not embedded");
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
