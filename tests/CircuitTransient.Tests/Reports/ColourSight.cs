namespace CircuitTransient.Tests.Reports;

/// <summary>Colours as the usual kinds of sight see them, and how far apart they are.</summary>
internal static class ColourSight
{
    // Machado, Oliveira and Fernandes 2009, "A physiologically-based model for simulation of color vision
    // deficiency", severity 1; from memory.
    private static readonly double[][] Protanopia =
    [
        [0.152286, 1.052583, -0.204868],
        [0.114503, 0.786281, 0.099216],
        [-0.003882, -0.048116, 1.051998],
    ];

    private static readonly double[][] Deuteranopia =
    [
        [0.367322, 0.860646, -0.227968],
        [0.280085, 0.672501, 0.047413],
        [-0.011820, 0.042940, 0.968881],
    ];

    private static readonly double[][] Tritanopia =
    [
        [1.255528, -0.076749, -0.178779],
        [-0.078411, 0.930809, 0.147602],
        [0.004733, 0.691367, 0.303900],
    ];

    private static readonly double[][] Usual =
    [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
    ];

    /// <summary>The least distance (CIE 1976) between any two colours for any kind of sight.</summary>
    public static double LeastDistance(IReadOnlyList<string> colours) =>
        new[] { Usual, Protanopia, Deuteranopia, Tritanopia }.Min(sight =>
        {
            var seen = colours.Select(colour => Lab(Seen(Linear(colour), sight))).ToArray();
            var pairs =
                from i in Enumerable.Range(0, seen.Length)
                from j in Enumerable.Range(0, i)
                select Distance(seen[i], seen[j]);
            return pairs.Min();
        });

    /// <summary>The contrast ratio of WCAG 2, from memory.</summary>
    public static double Contrast(string one, string other)
    {
        var (a, b) = (Luminance(Linear(one)), Luminance(Linear(other)));
        return (Math.Max(a, b) + 0.05) / (Math.Min(a, b) + 0.05);
    }

    private static double[] Linear(string colour) =>
        [
            .. new[] { 1, 3, 5 }
                .Select(place => Convert.ToInt32(colour.Substring(place, 2), 16) / 255.0)
                .Select(c => c <= 0.04045 ? c / 12.92 : Math.Pow((c + 0.055) / 1.055, 2.4)),
        ];

    private static double[] Seen(double[] linear, double[][] sight) =>
        [.. sight.Select(row => Math.Clamp(row.Zip(linear, (a, b) => a * b).Sum(), 0, 1))];

    private static double Luminance(double[] c) => (0.2126 * c[0]) + (0.7152 * c[1]) + (0.0722 * c[2]);

    // CIE 1976 L*a*b* of linear sRGB under D65.
    private static double[] Lab(double[] c)
    {
        var x = Root(((0.4124 * c[0]) + (0.3576 * c[1]) + (0.1805 * c[2])) / 0.9505);
        var y = Root(Luminance(c));
        var z = Root(((0.0193 * c[0]) + (0.1192 * c[1]) + (0.9505 * c[2])) / 1.089);
        return [(116 * y) - 16, 500 * (x - y), 200 * (y - z)];
    }

    private static double Root(double t) => t > 0.008856 ? Math.Cbrt(t) : (7.787 * t) + (16.0 / 116);

    private static double Distance(double[] a, double[] b) =>
        Math.Sqrt(a.Zip(b, (p, q) => (p - q) * (p - q)).Sum());
}
