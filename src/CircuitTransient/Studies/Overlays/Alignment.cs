namespace CircuitTransient.Studies.Overlays;

/// <summary>What of an alignment the user gives; null where it is estimated.</summary>
/// <param name="Offset">Record time less study time, in seconds.</param>
/// <param name="Gain">Record values over model values.</param>
/// <param name="Level">Record value where the model is zero, in the record's unit.</param>
public sealed record AlignmentGiven(double? Offset = null, double? Gain = null, double? Level = null);

/// <summary>A number with its standard error; the error is zero where the user gave the number.</summary>
/// <param name="IsGiven">Whether the user gave it.</param>
public sealed record Estimate(double Value, double StandardError, bool IsGiven = false);

/// <summary>How a record lies over the model: record = level + gain · model(t − offset).</summary>
/// <param name="Offset">In seconds.</param>
/// <param name="Gain">A pure number.</param>
/// <param name="Level">In the record's unit.</param>
public sealed record Alignment(Estimate Offset, Estimate Gain, Estimate Level)
{
    /// <summary>Standard errors for the given variance of one sample.</summary>
    internal static Alignment Of(
        double offset, double gain, double level, AlignmentGiven given, double[,]? inverse, double variance)
    {
        var errors = new double[3];
        var place = 0;
        bool[] isGiven = [given.Offset is not null, given.Gain is not null, given.Level is not null];
        for (var i = 0; i < 3; i++)
        {
            if (!isGiven[i])
            {
                errors[i] = inverse is null ? double.PositiveInfinity
                    : Math.Sqrt(variance * inverse[place, place]);
                place++;
            }
        }

        return new Alignment(
            new Estimate(offset, errors[0], isGiven[0]), new Estimate(gain, errors[1], isGiven[1]),
            new Estimate(level, errors[2], isGiven[2]));
    }
}
