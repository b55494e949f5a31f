using System.Collections.Immutable;

namespace CircuitTransient.Reports;

/// <summary>Colours and lines of the pictures: legible on white, told apart by dashes when printed in
/// grey.</summary>
public static class PlotStyle
{
    /// <summary>The paper.</summary>
    public const string Paper = "#ffffff";

    /// <summary>Texts and the line of the total.</summary>
    public const string Ink = "#1c2126";

    /// <summary>Marks and bars of the reports.</summary>
    public const string Accent = "#1f5673";

    /// <summary>Texts that matter less.</summary>
    public const string Grey = "#5c656e";

    /// <summary>Lines of the grid.</summary>
    public const string Grid = "#e6e9ec";

    /// <summary>The line at zero and the marks of events.</summary>
    public const string Axis = "#9aa3ab";

    /// <summary>Limits of requirements.</summary>
    public const string Limit = "#7a3f1d";

    /// <summary>The ground of a panel.</summary>
    public const string Ground = "#fbfcfc";

    /// <summary>The band of most of many waveforms, and the bars of a histogram.</summary>
    public const string Band = "#a9c1ce";

    /// <summary>The band of all of them.</summary>
    public const string WideBand = "#dfe8ed";

    /// <summary>The total.</summary>
    public static Stroke Total { get; } = new(Ink, 2);

    // Six muted hues of our own, found by search: at least 26 apart (CIE 1976 colour difference), also
    // from the ink, for usual sight and simulated protanopia, deuteranopia and tritanopia (matrices of
    // Machado, Oliveira and Fernandes 2009, from memory); contrast on white at least 3.6. In grey their
    // dashes tell them apart.
    private static readonly ImmutableArray<Stroke> Causes =
    [
        new("#3e3ca1", 1.4),
        new("#b87b1f", 1.5, [7, 3]),
        new("#38937e", 1.5, [9, 3, 2, 3]),
        new("#963028", 1.4, [3, 2]),
        new("#9979be", 1.6, [1.5, 2.5]),
        new("#623a6e", 1.4, [12, 4]),
    ];

    /// <summary>The line of a cause by its place in the list of causes.</summary>
    public static Stroke Cause(int index) => Causes[index % Causes.Length];
}
