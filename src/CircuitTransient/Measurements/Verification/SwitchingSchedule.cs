using System.Collections.Immutable;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The switchings of a study, resolved: which switches are closed from which instant on.</summary>
/// <param name="Intervals">In order of time; the first starts at 0.</param>
/// <param name="Until">End of the last one, in seconds.</param>
public sealed record SwitchingSchedule(ImmutableArray<SwitchedInterval> Intervals, double Until);

/// <summary>From an instant on, the switches stand so.</summary>
/// <param name="Start">In seconds.</param>
/// <param name="Closed">For each part of the circuit whether it is a closed switch; false for every other
/// part.</param>
public sealed record SwitchedInterval(double Start, ImmutableArray<bool> Closed);
