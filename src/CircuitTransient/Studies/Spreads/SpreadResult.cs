using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Studies.Spreads;

/// <summary>What the tolerances of a circuit come to.</summary>
/// <param name="Varied">The circuit and its values that have a tolerance.</param>
/// <param name="Options">What was asked for.</param>
/// <param name="Nominal">The circuit with every value nominal.</param>
/// <param name="Account">What was solved to find the extremes.</param>
/// <param name="Figures">Every figure followed, with its extremes.</param>
/// <param name="Linear">Where parts leave the range their values are good for.</param>
/// <param name="Jumps">What jumps between neighbouring corners.</param>
/// <param name="Worst">The worst case, taken apart; null where no figure has one.</param>
/// <param name="Draws">The random draws; null where none were asked for.</param>
/// <param name="Sensitivities">The exact derivatives with every value nominal.</param>
public sealed record SpreadResult(
    VariedCircuit Varied, SpreadOptions Options, TransientResult Nominal, SearchAccount Account,
    ImmutableArray<FigureRange> Figures, ImmutableArray<LinearRange> Linear, JumpFindings Jumps,
    WorstCase? Worst, DrawFindings? Draws,
    SensitivityFindings Sensitivities)
{
    /// <summary>Whether every requirement and rating holds with every tolerance, as far as the search
    /// saw.</summary>
    public bool AllHold => Account.Unsolvable == 0 && Figures.All(f => f.Holds != false);
}

/// <summary>What was solved to find the extremes.</summary>
/// <param name="Corners">How many corners the tolerances have; a double, for there may be very many.</param>
/// <param name="AllCorners">Whether every corner was solved.</param>
/// <param name="CornerPoints">Points solved in search of the worst corners.</param>
/// <param name="InteriorPoints">Points solved between the corners.</param>
/// <param name="WorseInside">How many extremes stand between the corners.</param>
/// <param name="Unsolvable">Points without a unique solution.</param>
/// <param name="UnsolvablePoint">One of them; null where there is none.</param>
/// <param name="LargestCorrection">By how much, as a fraction, the exact engine at most corrected an extreme
/// that the fast evaluation found.</param>
/// <param name="WhyExact">Why some or all figures went to the exact engine at every point; null where none
/// did.</param>
public sealed record SearchAccount(
    double Corners, bool AllCorners, long CornerPoints, long InteriorPoints, int WorseInside,
    long Unsolvable, ImmutableArray<double>? UnsolvablePoint, double LargestCorrection,
    string? WhyExact);

/// <summary>A figure and how far the tolerances carry it.</summary>
/// <param name="Nominal">With every value nominal; null where it has none.</param>
/// <param name="Least">Where it is least; null where it has no value anywhere.</param>
/// <param name="Greatest">Where it is greatest.</param>
/// <param name="Alone">With each value alone at the ends of its range.</param>
/// <param name="Holds">Whether a requirement or rating holds at every point solved; null for other
/// figures.</param>
/// <param name="Missing">At how many points the figure had no value.</param>
public sealed record FigureRange(
    StudyFigure Figure, double? Nominal, double? NominalTime, ExtremePoint? Least, ExtremePoint? Greatest,
    ImmutableArray<ValueEffect> Alone, bool? Holds, long Missing)
{
    /// <summary>What each cause has in the nominal value; empty where the figure is not split.</summary>
    public ImmutableArray<CauseValue> NominalCauses { get; init; } = [];

    /// <summary>What the quantity of a requirement or rating reaches with every value nominal.</summary>
    public double? NominalReached { get; init; }

    /// <summary>The end that matters: of a margin the least, of a rating the greatest, else the one farther
    /// from zero.</summary>
    public ExtremePoint? Worst => Figure.Kind switch
    {
        StudyFigureKind.Margin => Least,
        StudyFigureKind.RatingUsed => Greatest,
        StudyFigureKind.Minimum => Least,
        _ => Greatest,
    };
}

/// <summary>An extreme, solved by the exact engine.</summary>
/// <param name="Point">One value in SI for each varied value; what does not matter stands at its nominal
/// value.</param>
/// <param name="Matters">Whether the value is off its nominal one and the figure changes when it alone goes
/// back.</param>
/// <param name="Value">The figure there; infinite where it is.</param>
/// <param name="Time">When it stands, in seconds.</param>
/// <param name="IsCorner">Whether every value that matters stands at an end of its range.</param>
/// <param name="Returns">The figure with each value alone back at nominal.</param>
public sealed record ExtremePoint(
    ImmutableArray<double> Point, ImmutableArray<bool> Matters, double Value, double? Time, bool IsCorner,
    ImmutableArray<double> Returns)
{
    /// <summary>What the quantity of a requirement or rating reaches; of other figures the value.</summary>
    public double? Reached { get; init; }

    /// <summary>Of an extreme that stands between the corners: the figure at the worst corner.</summary>
    public double? AtWorstCorner { get; init; }

    /// <summary>What each cause has in it; empty where the figure is not split.</summary>
    public ImmutableArray<CauseValue> Causes { get; init; } = [];

    /// <summary>Where the figure or its instant jumps on the straight way from nominal to here.</summary>
    public ImmutableArray<FigureJump> Jumps { get; init; } = [];
}

/// <summary>A figure with one value alone at the ends of its range; NaN where it has none there.</summary>
public sealed record ValueEffect(double AtLowest, double AtHighest);

/// <summary>A jump on the way from nominal to an extreme.</summary>
/// <param name="Place">How far on that way, from 0 to 1.</param>
/// <param name="IsOfValue">Whether the value jumps; else only the instant of the peak.</param>
public sealed record FigureJump(
    double Place, double ValueBefore, double ValueAfter, double TimeBefore, double TimeAfter,
    bool IsOfValue);

/// <summary>The worst case in full.</summary>
/// <param name="Figure">Index of the figure that is worst off.</param>
/// <param name="Point">Where.</param>
/// <param name="Used">How much of what is allowed it takes; over 1 where it is broken; NaN where nothing is
/// required or rated.</param>
/// <param name="Result">The circuit at that point, measured and checked like any other.</param>
/// <param name="IsSteepest">Whether at that point every value's own derivative points out of its range, so
/// that no small change within the ranges makes it worse; null where a derivative is not known.</param>
public sealed record WorstCase(
    int Figure, ExtremePoint Point, double Used, TransientResult Result, bool? IsSteepest);

/// <summary>What random draws tell.</summary>
/// <param name="Draws">How many were made.</param>
/// <param name="Unsolvable">How many had no unique solution.</param>
/// <param name="UnsolvableDraws">The first of those, by their numbers.</param>
/// <param name="Figures">What each figure came to, in their order.</param>
/// <param name="Rows">The figures of the first draws, one draw after another; NaN where there is
/// none.</param>
/// <param name="Points">The values of the same draws, one draw after another, in SI.</param>
/// <param name="RowCount">How many draws those are.</param>
/// <param name="Linear">Of every part that states what it is linear up to: in how many draws it stays
/// there.</param>
/// <param name="Envelopes">The band of each observed waveform.</param>
public sealed record DrawFindings(
    long Draws, long Unsolvable, ImmutableArray<long> UnsolvableDraws,
    ImmutableArray<FigureStatistics> Figures, ImmutableArray<double> Rows, ImmutableArray<double> Points,
    int RowCount, ImmutableArray<HoldingEstimate> Linear, ImmutableArray<WaveformBand> Envelopes);

/// <summary>Between what an observed waveform runs from draw to draw, at fixed instants.</summary>
/// <param name="Observation">Index of the observation.</param>
/// <param name="Draws">How many draws it is made of, the first ones.</param>
/// <param name="Low">The value below which 5 % of the draws lie.</param>
/// <param name="High">The value above which 5 % lie.</param>
public sealed record WaveformBand(
    int Observation, int Draws, ImmutableArray<double> Times, ImmutableArray<double> Nominal,
    ImmutableArray<double> Least, ImmutableArray<double> Low, ImmutableArray<double> High,
    ImmutableArray<double> Greatest);
