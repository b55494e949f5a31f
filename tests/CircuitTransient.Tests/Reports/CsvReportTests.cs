using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public class CsvReportTests
{
    [Fact]
    public void The_heading_names_time_each_observation_and_its_contributions()
    {
        var heading = CsvReport.Write(SampleResults.Inrush()).Split("\r\n")[0];
        Assert.Equal(
            "time (s),voltage of bus (V),voltage of bus from Supply (V)," +
            "voltage of bus from Cbus initial charge (V),current through Ls (A)," +
            "current through Ls from Supply (A),current through Ls from Cbus initial charge (A)",
            heading);
    }

    [Fact]
    public void Commas_and_quotes_in_names_are_quoted()
    {
        var heading = CsvReport.Write(SampleResults.Awkward()).Split("\r\n")[0];
        Assert.StartsWith(
            "time (s),\"bus, \"\"plus\"\" & <script>alert('1')</script> (V)\"," +
            "\"bus, \"\"plus\"\" & <script>alert('1')</script> from =Feed,\"\"quoted\"\" (V)\",",
            heading,
            StringComparison.Ordinal);
    }

    [Fact]
    public void Each_instant_has_one_row_and_a_jump_has_two()
    {
        var result = SampleResults.Inrush();
        var rows = CsvReport.Write(result).Split("\r\n");
        Assert.Equal(result.SampleTimes.Length + 2, rows.Length); // the heading, and nothing after the last
        Assert.Equal("", rows[^1]);
        Assert.Equal(2, rows.Count(row => row.StartsWith("0.2,", StringComparison.Ordinal)));
    }

    [Fact]
    public void Values_read_back_to_the_same_bits()
    {
        var result = SampleResults.Inrush();
        var row = CsvReport.Write(result).Split("\r\n")[901].Split(',');
        Assert.Equal(result.SampleTimes[900], double.Parse(row[0]));
        Assert.Equal(result.Observations[0].Total[900], double.Parse(row[1]));
        Assert.Equal(result.Observations[1].ByCause[1][900], double.Parse(row[6]));
    }

    [Fact]
    public void What_is_undetermined_is_empty()
    {
        var result = SampleResults.Bare();
        var observation = result.Observations[0] with
        {
            Total = [double.NaN, 5],
            ByCause = [[double.NaN, 5]],
        };
        Assert.Equal(
            "time (s),voltage of a (V),voltage of a from Feed (V)\r\n0,,\r\n1,5,5\r\n",
            CsvReport.Write(result with { Observations = [observation] }));
    }

    [Fact]
    public void The_joint_term_of_a_quadratic_quantity_has_a_column()
    {
        var result = SampleResults.Bare();
        var energy = SampleResults.Observed(
            "energy in C",
            "J",
            result.SampleTimes,
            ["Feed", "C initial charge", "joint"],
            [_ => 1, _ => 2, _ => -0.5]);
        Assert.Equal(
            "time (s),energy in C (J),energy in C from Feed (J),energy in C from C initial charge (J)," +
            "energy in C from joint (J)\r\n0,2.5,1,2,-0.5\r\n1,2.5,1,2,-0.5\r\n",
            CsvReport.Write(result with { Observations = [energy] }));
    }
}
