namespace CircuitTransient.Reports.Html;

/// <summary>What a study adds to the report page.</summary>
/// <param name="Title">The section's heading.</param>
/// <param name="Body">What stands below it.</param>
public sealed record StudySection(string Title, Markup Body)
{
    /// <summary>What the study comes to, in a sentence that stands with the verdict, lest that of the one
    /// circuit shown be taken for the study's; null where the study judges nothing.</summary>
    public string? Headline { get; init; }

    /// <summary>Which circuit the rest of the page shows.</summary>
    public string Shown { get; init; } = "As written";
}
