namespace CircuitTransient.Studies.Spreads;

/// <summary>What a study of tolerances is asked for.</summary>
/// <param name="Draws">How many random draws; 0 for none.</param>
/// <param name="Seed">The seed of the draws.</param>
/// <param name="Threads">How many threads work; the result does not depend on it.</param>
public sealed record SpreadOptions(long Draws, ulong Seed, int Threads)
{
    /// <summary>How many draws are made where nothing is said.</summary>
    public const int UsualDraws = 2000;

    /// <summary>The most values whose corners are all solved: 65 536 of them.</summary>
    public const int MostValuesAtCorners = 16;

    /// <summary>The same where the exact engine must solve every point: 4096 of them.</summary>
    public const int MostValuesAtExactCorners = 12;

    /// <summary>The most draws of a study.</summary>
    public const int MostDraws = 100_000_000;
}

/// <summary>How far a long study has come.</summary>
/// <param name="Stage">What it is doing, in words.</param>
/// <param name="Done">How many points of this stage are solved.</param>
/// <param name="All">How many there are; 0 where that is not known.</param>
public readonly record struct SpreadProgress(string Stage, long Done, long All);
