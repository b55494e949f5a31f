namespace CircuitTransient.Solutions.Curves;

/// <summary>Finds when a curve's magnitude has fallen to a level. A magnitude that only touches the level, as
/// 1 − cos does zero, counts as reaching it at the very bottom, which the slope tells exactly where the value
/// itself is lost in rounding.</summary>
/// <param name="piece">The curve.</param>
/// <param name="level">The level, zero or more.</param>
/// <param name="rounding">What is no more than rounding of the curve's value.</param>
internal sealed class FallSearch(CurvePiece piece, double level, double rounding)
{
    /// <summary>The first instant, in seconds from the piece's start; null where there is none.</summary>
    public double? First(double from)
    {
        var until = piece.Segment.Length;
        var sign = piece.ValueAt(from) < 0 ? -1 : 1;
        if (LevelSearch.First(piece, -sign, -level - rounding, from, until) is not { } near)
        {
            return null;
        }

        if (sign * SlopeAt(near) >= 0)
        {
            return near;
        }

        var bottom = Bottom(sign, near, until);
        return bottom is { } b && sign * piece.ValueAt(b) >= level - rounding
            ? b
            : LevelSearch.First(piece, -sign, -level, near, until);
    }

    /// <summary>Where the magnitude, falling at an instant, rises again; null where it falls to the
    /// end.</summary>
    private double? Bottom(int sign, double near, double until)
    {
        const double firstStep = 1e-14; // of the segment; doubled until the slope has turned
        double falling = near, rising = near;
        for (var step = firstStep * until; sign * SlopeAt(rising) < 0; step *= 2)
        {
            if (rising >= until)
            {
                return null;
            }

            (falling, rising) = (rising, Math.Min(near + step, until));
        }

        while (true)
        {
            var middle = falling + ((rising - falling) / 2);
            if (middle == falling || middle == rising)
            {
                return rising;
            }

            (falling, rising) = sign * SlopeAt(middle) < 0 ? (middle, rising) : (falling, middle);
        }
    }

    private double SlopeAt(double tau)
    {
        var phi = new double[piece.Segment.Basis.Width];
        piece.Segment.Basis.Evaluate(tau, phi);
        return piece.At(tau, phi).Slope;
    }
}
