using System.Collections.Immutable;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Studies.Records;

namespace CircuitTransient.Cli;

/// <summary>A record to be laid over, and what was said of it.</summary>
/// <param name="File">Its file.</param>
/// <param name="Reading">How it is to be read.</param>
/// <param name="Shows">The quantity it shows; null where nothing was said.</param>
/// <param name="With">Parts added for it.</param>
/// <param name="ScopeInput">The instrument's input; null for an ideal one.</param>
/// <param name="Generator">The resistance of a source; null for none.</param>
/// <param name="Given">What of the alignment is given.</param>
public sealed record RecordOrder(
    string File, RecordOptions Reading, string? Shows, ImmutableArray<string> With, string? ScopeInput,
    string? Generator, AlignmentGiven Given);

/// <summary>What an overlay was asked for.</summary>
/// <param name="Records">The records.</param>
/// <param name="Fit">The values to fit, as written; null for none.</param>
/// <param name="Fitted">Where the circuit with the fitted values goes; null for nowhere.</param>
/// <param name="Command">The words as typed, for the page.</param>
/// <param name="Study">What every study is asked for.</param>
public sealed record OverlayOptions(
    ImmutableArray<RecordOrder> Records, string? Fit, string? Fitted, string Command, StudyOptions Study);
