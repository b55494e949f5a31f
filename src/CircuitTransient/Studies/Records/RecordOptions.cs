namespace CircuitTransient.Studies.Records;

/// <summary>What a user says of a record that the file itself does not.</summary>
/// <param name="Channel">Title or number of the channel to read; null for the only or the first.</param>
/// <param name="Interval">Sample interval in seconds; null where the file has a time column or states
/// it.</param>
/// <param name="Mark">The decimal mark, <c>.</c> or <c>,</c>; null where the file shows it.</param>
public sealed record RecordOptions(string? Channel = null, double? Interval = null, char? Mark = null);
