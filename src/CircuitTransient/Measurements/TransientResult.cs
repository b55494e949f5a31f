using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Text;

namespace CircuitTransient.Measurements;

/// <summary>Everything a user is told of one circuit: the figures behind every file and every line of
/// output.</summary>
/// <param name="Circuit">The circuit that was solved.</param>
/// <param name="Until">End of the study in seconds.</param>
/// <param name="UntilReason">Why it ends there, where no <c>until</c> was written; else null.</param>
/// <param name="Causes">The causes, in the order of the parts.</param>
/// <param name="Intervals">The intervals between switchings.</param>
/// <param name="Events">Every switching in order, with what each switch saw.</param>
/// <param name="SampleTimes">Instants of the waveforms in seconds; a jump's instant stands twice: before and
/// after.</param>
/// <param name="Observations">The observed waveforms with their extremes and causes.</param>
/// <param name="Figures">Figures read off waveforms.</param>
/// <param name="Requirements">The verdict on each requirement.</param>
/// <param name="Parts">Stresses of each part.</param>
/// <param name="SelfChecks">The checks every solve runs.</param>
/// <param name="NotJudged">Checks that could not judge, each with its reason.</param>
/// <param name="Warnings">Warnings from text to result.</param>
/// <param name="Cautions">What can kill or burn.</param>
public sealed record TransientResult(
    Circuit Circuit,
    double Until,
    string? UntilReason,
    ImmutableArray<CauseName> Causes,
    ImmutableArray<IntervalResult> Intervals,
    ImmutableArray<EventResult> Events,
    ImmutableArray<double> SampleTimes,
    ImmutableArray<ObservationResult> Observations,
    ImmutableArray<FigureResult> Figures,
    ImmutableArray<RequirementResult> Requirements,
    ImmutableArray<PartResult> Parts,
    ImmutableArray<SelfCheck> SelfChecks,
    ImmutableArray<NotJudged> NotJudged,
    ImmutableArray<Notice> Warnings,
    ImmutableArray<Caution> Cautions)
{
    /// <summary>The waveforms, taken apart by causes, of what is judged and of what is quadratic, so that a
    /// reader can scale the causes; none where no page was asked for.</summary>
    public ImmutableArray<FollowedWave> Followed { get; init; } = [];

    /// <summary>The observed waveforms broken down otherwise, for a reader who chooses; none where no page
    /// was asked for.</summary>
    public ImmutableArray<OtherBreakdown> OtherBreakdowns { get; init; } = [];

    /// <summary>What peaks were asked to be broken down by.</summary>
    public Breakdown By { get; init; }

    /// <summary>Whether the breakdown since an event was asked for, so that it stands in the results
    /// document.</summary>
    public bool IsAfterAsked { get; init; }

    /// <summary>The event that a second breakdown was asked for since; null where none was.</summary>
    public AfterEvent? After { get; init; }

    /// <summary>Whether every requirement and rating holds.</summary>
    public bool AllHold =>
        Requirements.All(r => r.Holds) && Parts.All(p => p.Ratings.All(r => r.Holds));

    /// <summary>Whether every self-check holds.</summary>
    public bool ChecksHold => SelfChecks.All(c => c.Holds);
}

/// <summary>The kinds of causes.</summary>
public enum CauseKind
{
    /// <summary>An independent source.</summary>
    Source,

    /// <summary>A charge or flux stored at the start.</summary>
    Stored,

    /// <summary>One piece of a source: a step, a corner, a sine.</summary>
    Edge,
}

/// <summary>A cause by the user's own name.</summary>
/// <param name="Of">The source a piece belongs to; null for the others.</param>
public sealed record CauseName(string Name, CauseKind Kind, string? Of = null)
{
    /// <summary>The pulse whose rise or fall it is, <c>Feed pulse 3 from 131 µs</c>; null for what is
    /// none.</summary>
    public string? Pulse { get; init; }

    /// <summary>When it begins, in seconds; null where it has been on from the start.</summary>
    public double? From { get; init; }
}

/// <summary>A value and when it stood; the value is null where it is infinite or undetermined.</summary>
public sealed record TimedValue(double? Value, double Time);

/// <summary>On which side of its instant an extreme stands.</summary>
public enum InstantSide
{
    /// <summary>Just before a jump.</summary>
    Before,

    /// <summary>At an instant without a jump.</summary>
    At,

    /// <summary>Just after a jump.</summary>
    After,
}

/// <summary>A global extreme.</summary>
/// <param name="Bound">Proven not to be exceeded anywhere in the window.</param>
public sealed record Extreme(double? Value, double Time, InstantSide Side, double? Bound);

/// <summary>One interval between switchings.</summary>
/// <param name="StartsWith">The switchings at its start: <c>Kmain closes</c>.</param>
/// <param name="Poles">Every finite one, by magnitude.</param>
/// <param name="Impulses">At its start, or where a source steps.</param>
/// <param name="EnergyLost">In all of them, joules.</param>
public sealed record IntervalResult(
    double From, double Until, ImmutableArray<string> StartsWith, ImmutableArray<Pole> Poles,
    ImmutableArray<ImpulseResult> Impulses, double EnergyLost);

/// <summary>A pole, or a pair of conjugate ones (Im ≥ 0), in 1/s and rad/s.</summary>
public sealed record Pole(double Re, double Im, int Multiplicity);

/// <summary>An impulse through a part (coulombs) or across it (volt-seconds).</summary>
/// <param name="Remedy">Which real part would make it finite.</param>
public sealed record ImpulseResult(
    double Time, string Part, double? Charge, double? VoltSeconds, string? Remedy);

/// <summary>A switching, with what the switch saw; null where undetermined.</summary>
public sealed record EventResult(
    double Time, string Switch, bool Closes, double? VoltageBefore, double? VoltageAfter,
    double? CurrentBefore,
    double? CurrentAfter, string? Remark);

/// <summary>The verdict on a requirement.</summary>
/// <param name="Line">Line in the circuit file.</param>
/// <param name="Worst">The value nearest to, or furthest past, its bound.</param>
/// <param name="Margin">In the quantity's unit, negative when broken; null where infinite.</param>
public sealed record RequirementResult(
    string Statement, string? Reason, string Unit, int Line, bool Holds, TimedValue Worst, double? Margin)
{
    /// <summary>What is judged, without its bound; null where that is not told apart.</summary>
    public string? Quantity { get; init; }

    /// <summary>Whether there was something to judge: not where the quantity is undetermined, its window
    /// never opens, or the waveform has no such figure.</summary>
    public bool IsJudged { get; init; } = true;

    /// <summary>Why the verdict is in doubt: a part passed what it is <c>linear up to</c>; else
    /// null.</summary>
    public string? Doubt { get; init; }

    /// <summary>The quantity measured within the requirement's window, where its worst value is no extreme of
    /// what is observed; else null. Its waveforms are not filled in.</summary>
    public ObservationResult? Within { get; init; }
}

/// <summary>One check every solve runs: the worst relative figure against what is allowed.</summary>
public sealed record SelfCheck(string Name, double Worst, double Allowed, bool Holds);

/// <summary>A check that could not judge this circuit.</summary>
public sealed record NotJudged(string Name, string Reason);

/// <summary>A warning; line 0 where it belongs to no line.</summary>
public sealed record Notice(int Line, string Text)
{
    /// <summary>The same with its place in the text and what to do; null where it belongs to no
    /// place.</summary>
    public Diagnostic? Diagnostic { get; init; }

    /// <summary>A warning at a place.</summary>
    public static Notice Of(Diagnostic diagnostic) =>
        new(diagnostic.Source.LineOf(diagnostic.Span.Start), diagnostic.Message) { Diagnostic = diagnostic };
}
