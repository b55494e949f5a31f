using System.Collections.Immutable;

namespace CircuitTransient.Studies.Records;

/// <summary>One channel of a record, in the order of its instants.</summary>
/// <param name="Name">The file's name as the user gave it.</param>
/// <param name="Sha256">SHA-256 of the file's bytes.</param>
/// <param name="Channel">The channel's title; empty where the file has none.</param>
/// <param name="Channels">The titles of all channels.</param>
/// <param name="Unit">Unit of the values in SI, <c>V</c> or <c>A</c>; null where the file says none.</param>
/// <param name="Times">Instants in seconds.</param>
/// <param name="Values">Values in SI; of a pair the middle.</param>
/// <param name="HalfWidths">Half the distance of each pair's two values; null where the record has no
/// pairs.</param>
/// <param name="RowCount">Rows of the table, those left out included.</param>
/// <param name="Remarks">How the file was understood, one sentence each.</param>
public sealed record OscilloscopeRecord(
    string Name, string Sha256, string Channel, ImmutableArray<string> Channels, string? Unit,
    double[] Times, double[] Values, double[]? HalfWidths, int RowCount, ImmutableArray<string> Remarks)
{
    /// <summary>The usual distance of two instants, in seconds.</summary>
    public double Interval =>
        Times.Length > 1 ? (Times[^1] - Times[0]) / (Times.Length - 1) : 0;
}
