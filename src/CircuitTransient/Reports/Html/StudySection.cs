namespace CircuitTransient.Reports.Html;

/// <summary>What a study adds to the report page.</summary>
/// <param name="Title">The section's heading.</param>
/// <param name="Body">What stands below it.</param>
public sealed record StudySection(string Title, Markup Body);
