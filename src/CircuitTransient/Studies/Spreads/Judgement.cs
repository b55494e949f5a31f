using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Whether a requirement or rating holds at a figure's value, and how much of what is allowed that
/// takes.</summary>
internal static class Judgement
{
    /// <summary>Whether a figure is judged.</summary>
    public static bool IsJudged(StudyFigure figure) =>
        figure.Kind is StudyFigureKind.Margin or StudyFigureKind.RatingUsed;

    /// <summary>Whether it holds; a figure that has no value does not.</summary>
    public static bool Holds(StudyFigure figure, double value) =>
        figure.Kind == StudyFigureKind.Margin ? value >= 0 : value <= 1;

    /// <summary>The fraction used of what is allowed, over 1 where broken.</summary>
    public static double Used(Circuit circuit, StudyFigure figure, double value) => figure.Kind switch
    {
        StudyFigureKind.RatingUsed => value,
        StudyFigureKind.Margin => 1 - (value / Scale(circuit.Requirements[figure.Index].Bound)),
        _ => double.NaN,
    };

    /// <summary>The size of what is allowed; where a bound is zero there is none, and the margin stands for
    /// itself.</summary>
    private static double Scale(Bound bound)
    {
        var scale = bound switch
        {
            Limits limits => Math.Max(Math.Abs(limits.Lower ?? 0), Math.Abs(limits.Upper ?? 0)),
            SettlesTo settles => settles.Within * Math.Abs(settles.Target),
            _ => 0,
        };
        return scale > 0 ? scale : 1;
    }
}
