namespace CircuitTransient.Studies.Spreads;

/// <summary>A figure and its instant at a place of an edge; NaN where there is none.</summary>
internal readonly record struct PlacedFigure(double Place, double Value, double Time);

/// <summary>A part of an edge in which a figure steps, halved until nothing smooth is left of the
/// step.</summary>
/// <param name="Step">What was seen.</param>
/// <param name="Low">The lower end.</param>
/// <param name="High">The upper end.</param>
/// <param name="Slope">What of the step is smooth, for the whole edge.</param>
internal sealed record Halving(EdgeStep Step, PlacedFigure Low, PlacedFigure High, double Slope)
{
    /// <summary>The middle.</summary>
    public double Middle => (Low.Place + High.Place) / 2;

    /// <summary>By what the figure or its instant changes; infinite where a value ceases to be.</summary>
    public double Change => Stands(Low, High);

    /// <summary>The half in which the step is.</summary>
    public Halving Half(PlacedFigure middle) => Stands(Low, middle) >= Stands(middle, High)
        ? this with { High = middle }
        : this with { Low = middle };

    /// <summary>How far a change stands out of what is smooth.</summary>
    private double Stands(PlacedFigure from, PlacedFigure to)
    {
        var (a, b) = Step.IsTime ? (from.Time, to.Time) : (from.Value, to.Value);
        return double.IsFinite(a) != double.IsFinite(b) ? double.PositiveInfinity
            : !double.IsFinite(a) ? 0
            : Math.Abs(b - a - (Slope * (to.Place - from.Place)));
    }
}
