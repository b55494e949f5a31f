using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Studies;

/// <summary>A number that a study follows while values vary.</summary>
/// <param name="Name">In the user's words: <c>max of current through Ls</c>.</param>
/// <param name="Unit">Its SI unit; empty for a fraction.</param>
/// <param name="Kind">What it is.</param>
/// <param name="Index">Index of the observation, requirement or part.</param>
/// <param name="Rating">Index of the part's rating; −1 for all else, and for the used fraction of what a part
/// is linear up to.</param>
public sealed record StudyFigure(
    string Name, string Unit, StudyFigureKind Kind, int Index, int Rating = -1);

/// <summary>The kinds of figures a study follows.</summary>
public enum StudyFigureKind
{
    /// <summary>The greatest value of an observation.</summary>
    Maximum,

    /// <summary>The least value of an observation.</summary>
    Minimum,

    /// <summary>An observed figure, such as a rise time.</summary>
    Reading,

    /// <summary>The margin of a requirement, negative when broken.</summary>
    Margin,

    /// <summary>The used fraction of a rating; it holds up to 1.</summary>
    RatingUsed,
}

/// <summary>The figures of a circuit.</summary>
public static class StudyFigures
{
    /// <summary>Everything observed, required and rated, in this order.</summary>
    public static ImmutableArray<StudyFigure> Of(Circuit circuit)
    {
        var figures = ImmutableArray.CreateBuilder<StudyFigure>();
        for (var i = 0; i < circuit.Observations.Length; i++)
        {
            var (name, unit) = (circuit.Observations[i].Name, circuit.Observations[i].Unit);
            if (circuit.Observations[i].Quantity is Figure)
            {
                figures.Add(new StudyFigure(name, unit, StudyFigureKind.Reading, i));
                continue;
            }

            figures.Add(new StudyFigure($"max of {name}", unit, StudyFigureKind.Maximum, i));
            figures.Add(new StudyFigure($"min of {name}", unit, StudyFigureKind.Minimum, i));
        }

        for (var i = 0; i < circuit.Requirements.Length; i++)
        {
            var required = circuit.Requirements[i];
            figures.Add(new StudyFigure(
                $"margin of {required.Statement}", required.Unit, StudyFigureKind.Margin, i));
        }

        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            for (var r = 0; r < circuit.Parts[i].Ratings.Length; r++)
            {
                var rated = Words(circuit.Parts[i].Ratings[r].Kind);
                figures.Add(new StudyFigure(
                    $"{rated} of {circuit.Parts[i].Name} against its rating", "",
                    StudyFigureKind.RatingUsed, i, r));
            }
        }

        return figures.ToImmutable();
    }

    /// <summary>Of every part that states what it is linear up to: the used fraction of that.</summary>
    public static ImmutableArray<StudyFigure> LinearRanges(Circuit circuit) =>
    [
        .. Enumerable.Range(0, circuit.Parts.Length).Where(p => circuit.Parts[p].LinearUpTo is not null)
            .Select(p => new StudyFigure(
                $"linear range of {circuit.Parts[p].Name}", "", StudyFigureKind.RatingUsed, p)),
    ];

    private static string Words(RatingKind kind) => kind switch
    {
        RatingKind.PeakVoltage => "peak voltage",
        RatingKind.PeakCurrent => "peak current",
        RatingKind.MeanPower => "mean power",
        RatingKind.Energy => "energy",
        RatingKind.JouleIntegral => "Joule integral",
        RatingKind.VoltageRate => "steepest voltage",
        RatingKind.CurrentRate => "steepest current",
        _ => throw new System.Diagnostics.UnreachableException($"no words for {kind}"),
    };
}
