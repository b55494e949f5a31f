using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public class CountTests
{
    [Theory]
    [InlineData(7, "7")]
    [InlineData(1024, "1,024")]
    [InlineData(12 * 2048.0, "24,576")]
    [InlineData(24 * 8388608.0, "201,326,592")]
    [InlineData(1.2676506002282294e30, "1.3e30")]
    public void A_count_is_written_in_one_way(double count, string written) =>
        Assert.Equal(written, ReportWords.Count(count));
}
