using CircuitTransient.Reports.Studies;

namespace CircuitTransient.Tests.Reports.Studies;

public class ContourLinesTests
{
    [Fact]
    public void A_plane_is_cut_by_a_level_in_a_straight_line()
    {
        var values = new double[4, 3];
        for (var i = 0; i < 4; i++)
        {
            for (var j = 0; j < 3; j++)
            {
                values[i, j] = (2 * i) + j;
            }
        }

        var pieces = ContourLines.Of(values, 3.5).ToArray();

        Assert.NotEmpty(pieces);
        Assert.All(
            pieces.SelectMany(p => new[] { p.A, p.B }),
            at => Assert.Equal(3.5, (2 * at.X) + at.Y, 1e-12));
    }

    [Fact]
    public void A_cell_with_a_gap_has_no_line() =>
        Assert.Empty(ContourLines.Of(new[,] { { 0, 1.0 }, { 1, double.NaN } }, 0.5));
}
