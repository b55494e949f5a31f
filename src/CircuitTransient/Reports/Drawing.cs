using System.Collections.Immutable;

namespace CircuitTransient.Reports;

/// <summary>A picture made of a few kinds of shapes, which every renderer draws alike. Units are points of
/// a screen; x runs to the right, y downwards.</summary>
/// <param name="Title">What the picture shows, for those who cannot see it.</param>
/// <param name="Shapes">Drawn in this order.</param>
public sealed record Drawing(double Width, double Height, string Title, ImmutableArray<Shape> Shapes);

/// <summary>Something drawn.</summary>
public abstract record Shape;

/// <summary>A line through points.</summary>
public sealed record PolylineShape(ImmutableArray<PlotPoint> Points, Stroke Stroke) : Shape;

/// <summary>A straight line.</summary>
public sealed record LineShape(double X1, double Y1, double X2, double Y2, Stroke Stroke) : Shape;

/// <summary>A filled rectangle.</summary>
public sealed record RectangleShape(double X, double Y, double Width, double Height, string Fill) : Shape;

/// <summary>A filled area within a closed line through points.</summary>
public sealed record AreaShape(ImmutableArray<PlotPoint> Points, string Fill) : Shape;

/// <summary>A filled disc with a rim of the paper's colour.</summary>
public sealed record DiscShape(double X, double Y, double Radius, string Fill) : Shape;

/// <summary>A text on its base line.</summary>
/// <param name="Size">Height of the letters in points.</param>
/// <param name="HasHalo">Whether the paper's colour surrounds it, so that it reads over lines.</param>
public sealed record TextShape(
    double X,
    double Y,
    string Text,
    double Size,
    string Fill,
    TextAnchor Anchor = TextAnchor.Start,
    bool IsStrong = false,
    bool HasHalo = false
) : Shape;

/// <summary>Which end of a text stands at its place.</summary>
public enum TextAnchor
{
    /// <summary>It begins there.</summary>
    Start,

    /// <summary>Its middle is there.</summary>
    Middle,

    /// <summary>It ends there.</summary>
    End,
}

/// <summary>A place in a drawing.</summary>
public readonly record struct PlotPoint(double X, double Y);

/// <summary>How a line is drawn.</summary>
/// <param name="Colour">As <c>#rrggbb</c>.</param>
/// <param name="Width">In points.</param>
/// <param name="Dash">Lengths of strokes and gaps in turn; empty for an unbroken line.</param>
public sealed record Stroke(string Colour, double Width, ImmutableArray<double> Dash)
{
    /// <summary>An unbroken line.</summary>
    public Stroke(string colour, double width)
        : this(colour, width, []) { }
}
