using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Sizes;

/// <summary>A requirement or rating that a sized part has to meet.</summary>
/// <param name="Name">In the user's words.</param>
/// <param name="Unit">Unit of its margin.</param>
/// <param name="Scale">What a margin is measured by: the greater bound's magnitude, or what is rated.</param>
/// <param name="Figure">The figure that judges it.</param>
public sealed record SizeConstraint(string Name, string Unit, double Scale, StudyFigure Figure)
{
    /// <summary>The requirements and ratings of a circuit, in this order.</summary>
    public static ImmutableArray<SizeConstraint> Of(Circuit circuit) =>
    [
        .. StudyFigures.Of(circuit)
            .Where(figure => figure.Kind is StudyFigureKind.Margin or StudyFigureKind.RatingUsed)
            .Select(figure => figure.Kind == StudyFigureKind.Margin
                ? OfRequirement(circuit.Requirements[figure.Index], figure)
                : OfRating(circuit.Parts[figure.Index], figure)),
    ];

    /// <summary>The margin as a fraction of the scale, from the figure's value: negative where broken,
    /// negative infinity where without limit or not judged.</summary>
    public double Share(double? value) => value is not { } number ? double.NegativeInfinity
        : Figure.Kind == StudyFigureKind.RatingUsed ? 1 - number
        : number / Scale;

    private static SizeConstraint OfRequirement(Requirement requirement, StudyFigure figure)
    {
        var scale = requirement.Bound switch
        {
            Limits limits => Math.Max(Math.Abs(limits.Lower ?? 0), Math.Abs(limits.Upper ?? 0)),
            SettlesTo settles => Math.Abs(settles.Target) * settles.Within,
            _ => throw new System.Diagnostics.UnreachableException($"no scale of {requirement.Bound}"),
        };

        // A bound of zero has no size of its own: its margin is measured in units.
        return new SizeConstraint(requirement.Statement, requirement.Unit, scale > 0 ? scale : 1, figure);
    }

    private static SizeConstraint OfRating(Part part, StudyFigure figure)
    {
        var rating = part.Ratings[figure.Rating];
        var (what, unit) = rating.Kind switch
        {
            RatingKind.PeakVoltage => ("peak voltage", "V"),
            RatingKind.PeakCurrent => ("peak current", "A"),
            RatingKind.MeanPower => ("mean power", "W"),
            RatingKind.Energy => ("energy", "J"),
            RatingKind.JouleIntegral => ("I²t", "A²s"),
            RatingKind.VoltageRate => ("steepest voltage", "V/s"),
            _ => ("steepest current", "A/s"),
        };
        var rated = Amount.Of(rating.Limit, unit);
        return new SizeConstraint(
            $"{what} of {part.Name} at most the rated {rated}", unit, rating.Limit, figure);
    }
}
