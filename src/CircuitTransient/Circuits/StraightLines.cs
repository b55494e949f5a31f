using System.Collections.Immutable;

namespace CircuitTransient.Circuits;

/// <summary>Straight lines between points: zero before the first, the last value held.</summary>
internal static class StraightLines
{
    /// <summary>What is wrong with a point that comes next, or null.</summary>
    public static (string Message, string Advice)? Mistake(List<(double Time, double Level)> before,
        double time)
    {
        if (time < 0)
        {
            return ($"this point lies {Amount.Of(-time, "s")} before the start of the study",
                "the study starts at 0 s; shift the points");
        }

        if (before.Count == 0 || time > before[^1].Time)
        {
            return null;
        }

        if (time < before[^1].Time)
        {
            var last = Amount.Of(before[^1].Time, "s");
            return ($"this point at {Amount.Of(time, "s")} comes after one at {last}",
                "put the points in the order of time");
        }

        return before.Count > 1 && before[^2].Time == time
            ? ($"three points stand at {Amount.Of(time, "s")}",
                "two points at one instant make a jump; a third means nothing")
            : null;
    }

    /// <summary>One piece for each stretch between points that is not zero, then the value held.</summary>
    public static ImmutableArray<WavePiece> Pieces(IReadOnlyList<(double Time, double Level)> points)
    {
        var pieces = ImmutableArray.CreateBuilder<WavePiece>();
        for (var i = 1; i < points.Count; i++)
        {
            var (start, end) = (points[i - 1], points[i]);
            if (end.Time > start.Time && (start.Level != 0 || end.Level != 0))
            {
                pieces.Add(new WavePiece(
                    start.Time, end.Time, start.Level, (end.Level - start.Level) / (end.Time - start.Time), 0,
                    0, 0, $"line from {Amount.Of(start.Time, "s")} to {Amount.Of(end.Time, "s")}")
                {
                    Continues = pieces.Count > 0,
                });
            }
        }

        if (points.Count > 0 && (points[^1].Level != 0 || pieces.Count == 0))
        {
            var last = points[^1];
            pieces.Add(new WavePiece(last.Time, double.PositiveInfinity, last.Level, 0, 0, 0, 0,
                $"hold from {Amount.Of(last.Time, "s")}")
            {
                Continues = pieces.Count > 0,
            });
        }

        return pieces.ToImmutable();
    }
}
