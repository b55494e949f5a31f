using System.Text;
using CircuitTransient.Studies.Records;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Records;

public class RecordReaderTests
{
    private const string Plain = "time (µs),node x (mV)\n0,1.5\n2,-2.5\n4,1e3\n";

    [Fact]
    public void A_table_with_units_in_its_titles_comes_in_si()
    {
        var record = Read(Plain);

        Assert.Equal([0, 2e-6, 4e-6], record.Times);
        Assert.Equal([1.5e-3, -2.5e-3, 1], record.Values);
        Assert.Equal(("node x", "V", 3), (record.Channel, record.Unit, record.RowCount));
        Assert.Equal(["2 columns parted by commas"], record.Remarks);
    }

    [Theory]
    [InlineData("time [ms];u [V]\n0,0;1,5\n0,1;2,5\n0,2;-3,5\n")]
    [InlineData("time\tu\nms\tV\n0.0\t1.5\n0.1\t2.5\n0.2\t-3.5\n")]
    [InlineData("# time (ms)  u(V)\n 0.0   1.5\n 0.1   2.5\n 0.2  -3.5\n")]
    [InlineData("\"time (ms)\",\"u (V)\"\r\n\"0.0\",\"1.5\"\r\n\"0.1\",\"2.5\"\r\n\"0.2\",\"-3.5\"\r\n")]
    [InlineData("Sampling: 3 points\nCoupling,DC\n\ntime (ms),u (V),\n0.0,1.5,\n0.1,2.5,\n0.2,-3.5,\n")]
    public void Delimiters_marks_units_and_lines_above_the_table_are_found_out(string text)
    {
        var record = Read(text);

        Assert.Equal([0, 1e-4, 2e-4], record.Times, (a, b) => Math.Abs(a - b) < 1e-18);
        Assert.Equal([1.5, 2.5, -3.5], record.Values);
        Assert.Equal("V", record.Unit);
    }

    [Fact]
    public void A_table_without_titles_has_its_time_in_the_column_that_rises_which_is_said()
    {
        var record = Read("0.0,1.5\n0.1,2.5\n0.2,-3.5\n");

        Assert.Equal([0, 0.1, 0.2], record.Times);
        Assert.Null(record.Unit);
        Assert.Contains("no column is titled as a time: the first, which rises, is taken as seconds",
            record.Remarks);
    }

    [Theory]
    [InlineData("Sample Interval,2.0E-09\nu (V)\n1\n2\n3\n")]
    [InlineData("sample interval (ns): 2\nu (V)\n1\n2\n3\n")]
    [InlineData("Sampling rate = 500 MHz\nu (V)\n1\n2\n3\n")]
    [InlineData("Sampling rate;0,5 GS/s;\nsample interval;2 ns\nindex;u (V)\n0;1\n1;2\n2;3\n")]
    public void A_stated_interval_or_rate_takes_the_place_of_a_time_column(string text)
    {
        var record = Read(text);

        Assert.Equal([0, 2e-9, 4e-9], record.Times, (a, b) => Math.Abs(a - b) < 1e-22);
        Assert.Equal([1, 2, 3], record.Values);
        Assert.Contains("no time column: one sample each 2.000 ns, as the record states", record.Remarks);
    }

    [Fact]
    public void A_unit_stated_above_the_table_is_that_of_the_values() =>
        Assert.Equal([1.25e-3, 2.5e-3],
            Read("Sample Interval,1.0e-9,s\nVertical Units,mV\n1.25\n2.5\n").Values);

    [Fact]
    public void A_given_interval_takes_the_place_of_a_time_column() =>
        Assert.Equal([0, 0.5, 1], Read("1.25\n2.25\n3.25\n", new RecordOptions(Interval: 0.5)).Times);

    [Fact]
    public void One_of_ten_columns_is_read_by_title_or_number_and_the_choice_is_said()
    {
        var titles = string.Join(',', Enumerable.Range(1, 9).Select(k => $"probe {k} (V)"));
        var text = $"time (s),{titles}\n0,1,2,3,4,5,6,7,8,9.5\n1,2,3,4,5,6,7,8,9,10.5\n";

        Assert.Equal([9.5, 10.5], Read(text, new RecordOptions("probe 9")).Values);
        Assert.Equal([4, 5], Read(text, new RecordOptions("4")).Values);
        Assert.Contains("9 channels; the first, `probe 1`, is read, another with `--channel \"probe 2\"`",
            Read(text).Remarks);
        Assert.Equal("there is no channel `prob 7` in this record → did you mean `probe 7`?",
            Refusal(text, new RecordOptions("prob 7")));
    }

    [Fact]
    public void Two_columns_of_least_and_greatest_values_are_a_pair()
    {
        var record = Read("time (s),x min (V),x max (V)\n0,1,3\n1,-2.5,0.5\n");

        Assert.Equal([2, -1], record.Values);
        Assert.Equal([1, 1.5], record.HalfWidths!);
        Assert.Contains("`x min` and `x max` are a pair: the middle of the two is compared", record.Remarks);
    }

    [Fact]
    public void Two_values_at_each_instant_are_a_pair()
    {
        var record = Read("time (s),x (V)\n0,1\n0,3\n1,-2.5\n1,0.5\n");

        Assert.Equal([0, 1], record.Times);
        Assert.Equal([2, -1], record.Values);
        Assert.Equal([1, 1.5], record.HalfWidths!);
    }

    [Fact]
    public void Rounded_instants_of_an_even_grid_are_put_back_on_it()
    {
        var rows = Enumerable.Range(0, 11).Select(k => $"{Math.Round(0.04 * k, 1):0.0},{k}.5");

        var record = Read("time (s),x (V)\n" + string.Join('\n', rows) + "\n");

        Assert.Equal(0.04, record.Times[1], 1e-15);
        Assert.Contains("6 rows repeat the instant before, the first in line 3: rounded instants of an even "
            + "grid, put back on it", record.Remarks);
    }

    [Fact]
    public void A_single_repeated_instant_is_kept_and_said() =>
        Assert.Contains("1 row repeats the instant before, the first in line 4: all are kept",
            Read("time (s),x (V)\n0,1.5\n1,2\n1,3\n50,4\n51,5\n").Remarks);

    [Fact]
    public void Rows_without_a_value_are_left_out_and_said()
    {
        var record = Read("time (s),x (V)\n0,1.5\n1,NaN\n2,\n3,--\n4,2.5\n");

        Assert.Equal([0, 4], record.Times);
        Assert.Contains("3 rows without a value left out, the first in line 3", record.Remarks);
    }

    [Fact]
    public void A_last_line_that_is_cut_off_is_left_out_and_said() =>
        Assert.Contains("the last line, 4, is cut off and left out",
            Read("time (s),x (V)\n0,1.5\n1,2\n2").Remarks);

    [Fact]
    public void Byte_order_marks_and_sixteen_bit_characters_are_understood()
    {
        var little = Encoding.Unicode.GetPreamble().Concat(Encoding.Unicode.GetBytes(Plain)).ToArray();
        byte[][] files =
        [
            [.. Encoding.UTF8.Preamble, .. Encoding.UTF8.GetBytes(Plain)], little,
            [.. Encoding.BigEndianUnicode.GetPreamble(), .. Encoding.BigEndianUnicode.GetBytes(Plain)],
            Encoding.Unicode.GetBytes(Plain + "6,1.5\n8,1.5\n"), Encoding.Latin1.GetBytes(Plain),
        ];

        Assert.All(files, file => Assert.Equal([0, 2e-6, 4e-6], Read(file, new RecordOptions()).Times[..3]));
        Assert.Contains("the file is written in UTF-16", Read(little, new RecordOptions()).Remarks);
    }

    [Theory]
    [InlineData("", "1: this record is empty")]
    [InlineData("no numbers\nat all\n", "1: no line of this record is a row of numbers → "
        + "give a table with a time and a value in each line")]
    [InlineData("1.5\n2.5\n", "1: the record has one column and states no sample interval → "
        + "say it: `--interval \"1 ns\"`")]
    [InlineData("3,4.5\n2,1.5\n5,0.5\n", "1: no column of the record is a time, and it states no sample "
        + "interval → say it: `--interval \"1 ns\"`")]
    [InlineData("0,1\n0,2\n0,3\n", "1: a comma here may part two columns or mark the decimals → say which: "
        + "`--decimal comma`, or `--decimal point` where commas part the columns")]
    [InlineData("time (s),x (V)\n0,1.5\n2,2\n1,3\n", "4: the time goes back in this line, from 2.000 s to "
        + "1.000 s → sort the rows, or give each sweep as a record of its own")]
    [InlineData("time (s),x (V)\n0,1.5\n1,over\n2,3\n3,4\n", "3: `over` is no number → correct the line or "
        + "delete it; a missing value is left empty or written NaN")]
    [InlineData("time (s),x (V)\n0,1.5\n1,2\n2\n3,4\n", "4: this line has 1 cell, the others have 2 → "
        + "complete the row or delete it")]
    [InlineData("time (s),x (V)\n0,1.5\n", "3: the record has fewer than two samples")]
    [InlineData("a\0b", "1: byte 2 is zero: this is not a text → export the record as a table of text")]
    public void What_cannot_be_read_is_refused_with_its_line(string text, string expected)
    {
        var outcome = RecordReader.Read("r.csv", Encoding.UTF8.GetBytes(text), new RecordOptions());

        var diagnostic = Assert.Single(outcome.Diagnostics);
        Assert.Equal(expected, $"{diagnostic.Source.LineOf(diagnostic.Span.Start)}: " + Words(diagnostic));
    }

    [Fact]
    public void Ambiguous_commas_are_settled_by_the_user_or_by_titles()
    {
        Assert.Equal([0.1, 0.2], Read("0,1\n0,2\n", new RecordOptions(Interval: 1, Mark: ',')).Values);
        Assert.Equal([7, 9], Read("1,7\n2,9\n", new RecordOptions(Mark: '.')).Values);
        Assert.Equal([7, 9], Read("time,x\n1,7\n2,9\n").Values);
    }

    [Fact]
    public void Every_number_is_the_nearest_double()
    {
        string[] numbers =
        [
            "0.1", "123456789.123456789", "-1.7976931348623157e308", "4.9e-324", "1E+22", "9007199254740993",
            "+3.25", ".5", "7.", "1234567890123456789012", "2.2250738585072011e-308",
        ];
        var text = "time (s),x (V)\n" + string.Concat(numbers.Select((n, k) => $"{k},{n}\n"));

        Assert.Equal(numbers.Select(double.Parse), Read(text).Values);
    }

    private static OscilloscopeRecord Read(string text, RecordOptions? options = null) =>
        Read(Encoding.UTF8.GetBytes(text), options ?? new RecordOptions());

    private static OscilloscopeRecord Read(byte[] bytes, RecordOptions options)
    {
        var outcome = RecordReader.Read("r.csv", bytes, options);
        Assert.Empty(outcome.Diagnostics.Select(Words));
        return outcome.Value!;
    }

    private static string Refusal(string text, RecordOptions options) => Words(Assert.Single(
        RecordReader.Read("r.csv", Encoding.UTF8.GetBytes(text), options).Diagnostics));

    private static string Words(Diagnostic diagnostic) =>
        diagnostic.Message + (diagnostic.Advice is { } advice ? $" → {advice}" : "");
}
