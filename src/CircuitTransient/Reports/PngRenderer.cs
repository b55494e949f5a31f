using System.Collections.Immutable;
using SkiaSharp;

namespace CircuitTransient.Reports;

/// <summary>Draws a drawing into a PNG picture.</summary>
public static class PngRenderer
{
    /// <summary>The picture.</summary>
    /// <param name="drawing">What to draw.</param>
    /// <param name="fonts">The faces of its texts.</param>
    /// <param name="scale">Pixels a point.</param>
    public static byte[] Write(Drawing drawing, PlotFonts fonts, double scale)
    {
        var width = (int)Math.Ceiling(drawing.Width * scale);
        var height = (int)Math.Ceiling(drawing.Height * scale);
        using var bitmap = new SKBitmap(width, height, SKColorType.Rgba8888, SKAlphaType.Opaque);
        using (var canvas = new SKCanvas(bitmap))
        {
            canvas.Clear(SKColor.Parse(PlotStyle.Paper));
            canvas.Scale((float)scale);
            Draw(drawing, canvas, fonts);
        }

        // One filter, moderate compression: twice as fast as trying them all, for 6 % more bytes (measured).
        using var pixels = bitmap.PeekPixels();
        using var image = pixels.Encode(new SKPngEncoderOptions(SKPngEncoderFilterFlags.Up, 6))
            ?? throw new InvalidOperationException("the picture could not be encoded");
        return image.ToArray();
    }

    /// <summary>Draws on any canvas.</summary>
    public static void Draw(Drawing drawing, SKCanvas canvas, PlotFonts fonts)
    {
        foreach (var shape in drawing.Shapes)
        {
            switch (shape)
            {
                case PolylineShape line:
                    DrawPolyline(canvas, line);
                    break;
                case LineShape line:
                    DrawLine(canvas, line);
                    break;
                case RectangleShape box:
                    DrawRectangle(canvas, box);
                    break;
                case AreaShape area:
                    DrawArea(canvas, area);
                    break;
                case DiscShape disc:
                    DrawDisc(canvas, disc);
                    break;
                case TextShape text:
                    DrawText(canvas, text, fonts);
                    break;
                default:
                    throw new System.Diagnostics.UnreachableException($"no picture of {shape}");
            }
        }
    }

    private static void DrawPolyline(SKCanvas canvas, PolylineShape line)
    {
        using var path = Path(line.Points);
        using var paint = Paint(line.Stroke);
        canvas.DrawPath(path, paint);
    }

    private static void DrawArea(SKCanvas canvas, AreaShape area)
    {
        using var path = Path(area.Points);
        using var fill = Fill(area.Fill);
        canvas.DrawPath(path, fill); // a fill closes the line
    }

    private static SKPath Path(ImmutableArray<PlotPoint> points)
    {
        using var builder = new SKPathBuilder();
        builder.MoveTo((float)points[0].X, (float)points[0].Y);
        foreach (var point in points.AsSpan()[1..])
        {
            builder.LineTo((float)point.X, (float)point.Y);
        }

        return builder.Detach();
    }

    private static void DrawLine(SKCanvas canvas, LineShape line)
    {
        using var paint = Paint(line.Stroke);
        canvas.DrawLine((float)line.X1, (float)line.Y1, (float)line.X2, (float)line.Y2, paint);
    }

    private static void DrawRectangle(SKCanvas canvas, RectangleShape box)
    {
        using var paint = Fill(box.Fill);
        canvas.DrawRect((float)box.X, (float)box.Y, (float)box.Width, (float)box.Height, paint);
    }

    private static void DrawDisc(SKCanvas canvas, DiscShape disc)
    {
        using var rim = Fill(PlotStyle.Paper);
        using var fill = Fill(disc.Fill);
        canvas.DrawCircle((float)disc.X, (float)disc.Y, (float)disc.Radius + 0.5f, rim);
        canvas.DrawCircle((float)disc.X, (float)disc.Y, (float)disc.Radius - 0.5f, fill);
    }

    private static void DrawText(SKCanvas canvas, TextShape text, PlotFonts fonts)
    {
        using var font = fonts.Font(text.Size, text.IsStrong);
        var align = text.Anchor switch
        {
            TextAnchor.Middle => SKTextAlign.Center,
            TextAnchor.End => SKTextAlign.Right,
            _ => SKTextAlign.Left,
        };
        if (text.HasHalo)
        {
            using var halo = Paint(new Stroke(PlotStyle.Paper, 3));
            canvas.DrawText(text.Text, (float)text.X, (float)text.Y, align, font, halo);
        }

        using var fill = Fill(text.Fill);
        canvas.DrawText(text.Text, (float)text.X, (float)text.Y, align, font, fill);
    }

    private static SKPaint Fill(string colour) =>
        new() { Color = SKColor.Parse(colour), IsAntialias = true };

    private static SKPaint Paint(Stroke stroke) =>
        new()
        {
            Style = SKPaintStyle.Stroke,
            Color = SKColor.Parse(stroke.Colour),
            StrokeWidth = (float)stroke.Width,
            StrokeJoin = SKStrokeJoin.Round,
            IsAntialias = true,
            PathEffect = stroke.Dash.IsEmpty ? null : SKPathEffect.CreateDash(Lengths(stroke.Dash), 0),
        };

    private static float[] Lengths(ImmutableArray<double> dash) =>
        [.. dash.Select(length => (float)length)];
}
