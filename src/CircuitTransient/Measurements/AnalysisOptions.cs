using System.Collections.Immutable;

namespace CircuitTransient.Measurements;

/// <summary>What a caller may ask of an analysis beyond the circuit file.</summary>
/// <param name="At">Instants in seconds for which exact values are wanted, in the order asked.</param>
/// <param name="SampleCount">Waveform samples aimed at.</param>
/// <param name="After">The event since which contributions are broken down a second time; null for the last
/// before each extreme, without showing it in the results document.</param>
public sealed record AnalysisOptions(
    ImmutableArray<double> At, int SampleCount = 2000, AfterEvent? After = null)
{
    /// <summary>What causes are told apart.</summary>
    public Breakdown By { get; init; } = Breakdown.Origin;

    /// <summary>Whether waveforms are taken apart in every way that the reader of a page may
    /// choose.</summary>
    public bool IsForPage { get; init; } = true;

    /// <summary>Nothing asked for.</summary>
    public static AnalysisOptions Default { get; } = new([]);

    /// <summary>Nothing asked for, of a circuit that no page is written of.</summary>
    public static AnalysisOptions WithoutPage { get; } = Default with { IsForPage = false };
}

/// <summary>Into what peaks are broken down.</summary>
public enum Breakdown
{
    /// <summary>The sources and what was stored at the start.</summary>
    Origin,

    /// <summary>Each source by its edges.</summary>
    Edge,

    /// <summary>The effect of each switching, beside the origin.</summary>
    Switching,

    /// <summary>The modes of the network, beside the origin.</summary>
    Mode,
}

/// <summary>The event that a second breakdown begins with.</summary>
public abstract record AfterEvent;

/// <summary>The last event before each extreme.</summary>
public sealed record AfterLast : AfterEvent;

/// <summary>The event at an instant, in seconds, or the last before it.</summary>
public sealed record AfterInstant(double Time) : AfterEvent;

/// <summary>A switch's closing or opening, the last of them where there are several.</summary>
public sealed record AfterSwitching(string Switch, bool Closes) : AfterEvent;
