using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Waves whose points stand in a file of their own.</summary>
public class WaveFileTests
{
    private const string Plant =
        """
        source Feed at a : straight lines in file "surge.csv"
        resistor R1 at a : 1 kΩ
        """;

    [Fact]
    public void Points_are_read_with_the_units_of_their_header()
    {
        var pieces = Checking.Circuit(Plant, "time (µs),level (kV)\n0,0\n1,5\r\n3,1\n")
            .Part<VoltageSource>("Feed").Wave.Pieces;

        Assert.Equal([0, 1e-6, 3e-6], pieces.Select(p => p.Start));
        Assert.Equal([0.0, 5000, 1000], pieces.Select(p => p.Amplitude));
        Assert.Equal(5e9, pieces[0].Slope, 1e-5);
    }

    [Fact]
    public void A_current_makes_a_current_source() =>
        Assert.Single(Checking.Circuit(Plant, "time (s),level (A)\n0,1").Part<CurrentSource>("Feed")
            .Wave.Pieces);

    [Theory]
    [InlineData("time,level\n0,0",
        "surge.csv:1:1: error: the first line does not name a time and a voltage or current "
        + "with their units\n  time,level\n  ^^^^^^^^^^\n  → write `time (s),level (V)`")]
    [InlineData("time (s),level (V)\n0,0\n1,\n",
        "surge.csv:3:1: error: a time or a value is missing in this line\n"
        + "  1,\n  ^^\n  → fill the gap or delete the line")]
    [InlineData("time (s),level (V)\n0,0\n1,five\n",
        "surge.csv:3:1: error: this line does not hold two numbers\n"
        + "  1,five\n  ^^^^^^\n  → write numbers with a decimal point, parted by a comma")]
    [InlineData("time (s),level (V)\n2,0\n1,5\n",
        "surge.csv:3:1: error: this point at 1 s comes after one at 2 s\n"
        + "  1,5\n  ^^^\n  → put the points in the order of time")]
    [InlineData("time (s),level (V)\n1,0\n1,5\n1,6\n", "surge.csv:4:1: error: three points stand at 1 s\n"
        + "  1,6\n  ^^^\n  → two points at one instant make a jump; a third means nothing")]
    [InlineData("time (s),level (V)\n-1,0\n",
        "surge.csv:2:1: error: this point lies 1 s before the start of the study\n"
        + "  -1,0\n  ^^^^\n  → the study starts at 0 s; shift the points")]
    [InlineData("time (s),level (V)\n", "surge.csv:1:1: error: this file has no points\n"
        + "  time (s),level (V)\n  ^^^^^^^^^^^^^^^^^^\n  → add lines such as `0,0` and `1e-3,5`")]
    public void A_mistake_is_told_in_its_own_file(string table, string message) =>
        Assert.Equal(message, Checking.Messages(Plant, table));

    [Fact]
    public void A_file_that_cannot_be_read_is_named() =>
        Assert.Equal(
            """
            plant.cause:1:20: error: the file `surge.csv` cannot be read
              source Feed at a : straight lines in file "surge.csv"
                                 ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → it is looked for in the folder of the circuit
            """,
            Checking.Messages(Plant));

    [Theory]
    [InlineData("../surge.csv")]
    [InlineData("a/../../surge.csv")]
    [InlineData("/etc/surge.csv")]
    [InlineData("C:/surge.csv")]
    [InlineData("..\\surge.csv")]
    [InlineData("~/surge.csv")]
    public void A_path_out_of_the_folder_is_refused(string path)
    {
        var messages =
            Checking.Messages(Plant.Replace("surge.csv", path, StringComparison.Ordinal),
                "time (s),level (V)\n0,0");

        Assert.StartsWith($"plant.cause:1:20: error: `{path}` lies outside the folder of the circuit\n",
            messages,
            StringComparison.Ordinal);
    }

    [Fact]
    public void A_path_below_the_folder_is_read() =>
        Assert.Empty(Checking.Messages(
            Plant.Replace("surge.csv", "waves/surge.csv", StringComparison.Ordinal),
                "time (s),level (V)\n0,0\n1,1"));
}
