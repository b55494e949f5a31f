using CircuitTransient.Measurements;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Measurements;

/// <summary>The demonstration that starts settled: one capacitor step onto another.</summary>
/// <remarks>The figures were computed twice by other methods (state space and matrix exponential, sampled);
/// they are held to the digits given.</remarks>
public sealed class BankGalleryTests
{
    private static readonly SolvedText Solved =
        SolvedText.Of(Repository.Read("netlists/bank-gallery.cause"));

    private static ObservationResult Inrush => Solved["current through KB"];

    [Fact]
    public void The_inrush_is_that_of_the_second_crest()
    {
        Close.AsPrinted(7.076, Inrush.Max.Value!.Value / 1e3, 3);
        Close.AsPrinted(298, Inrush.Max.Time * 1e6, 0);
        Close.AsPrinted(12.02, Solved.Max("voltage across CB") / 1e3, 2);
    }

    [Fact]
    public void From_the_start_the_grid_and_the_trapped_charge_make_it()
    {
        Assert.Equal(["Grid", "CB initial charge"], Inrush.Contributions.Select(c => c.Cause));
        Close.AsPrinted(5.107, Inrush.Contributions[0].AtMax!.Value / 1e3, 3);
        Close.AsPrinted(1.969, Inrush.Contributions[1].AtMax!.Value / 1e3, 3);
    }

    [Fact]
    public void Since_the_closing_the_neighbour_makes_most_of_it()
    {
        var since = Inrush.After!.AtMax!;
        Assert.Equal("KB closes", since.Event);
        Close.AsPrinted(4.652, Value(since, "CA charge when KB closes") / 1e3, 3);
        Close.AsPrinted(1.969, Value(since, "CB charge when KB closes") / 1e3, 3);
        var rest = since.Parts.Sum(p => p.Value!.Value) - Value(since, "CA charge when KB closes")
            - Value(since, "CB charge when KB closes");
        // The grid from then on, with the few amperes that the coils carry: 0.454 kA and 0.0015 kA.
        Close.Within(0.002, 0.454, rest / 1e3);
    }

    [Fact]
    public void The_joule_integral_has_a_joint_part()
    {
        var heat = Solved["I²t through KB"];
        Close.AsPrinted(71.86, heat.Max.Value!.Value / 1e3, 2);
        Close.AsPrinted(37.46, heat.Contributions[0].AtMax!.Value / 1e3, 2);
        Close.AsPrinted(5.55, heat.Contributions[1].AtMax!.Value / 1e3, 2);
        Close.AsPrinted(28.84, heat.Contributions[2].AtMax!.Value / 1e3, 2);
    }

    private static double Value(SinceEvent since, string cause) =>
        since.Parts.Single(p => p.Cause == cause).Value!.Value;
}
