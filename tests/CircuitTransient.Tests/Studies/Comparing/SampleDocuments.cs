using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Studies.Comparing;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Comparing;

/// <summary>Results documents of circuits that are solved for it.</summary>
internal static class SampleDocuments
{
    /// <summary>A step into an RC: the level, the limit and the part's name can be chosen.</summary>
    public static string Text(
        double ohms = 1000, string limit = "9 V", string name = "R1", string more = "") =>
        string.Create(System.Globalization.CultureInfo.InvariantCulture,
            $"""
            source    Feed at a : step of 10 V
            resistor  {name} from a to b : {ohms} Ω, rated 30 mA
            capacitor C1 from b to ground : 1 µF, charged to 1 V
            observe voltage of b
            require voltage of b at most {limit}
            until 2 ms
            {more}
            """);

    /// <summary>The document's text of a circuit's text.</summary>
    public static string Json(string text, string file = "rc.cause")
    {
        var source = new SourceText(file, text);
        var solved = TransientAnalysis.Run(source, AnalysisOptions.Default, _ => new(null, []));
        return JsonReport.Write(Assert.IsType<Solved>(solved).Result);
    }

    /// <summary>The document of a circuit's text.</summary>
    public static ResultsDocument Of(string text) => Read(Json(text));

    /// <summary>The document read from its text.</summary>
    public static ResultsDocument Read(string json)
    {
        var read = ResultsReader.Read(new SourceText("a.json", json));
        Assert.Empty(read.Diagnostics);
        return Assert.Single(read.Value!.Documents);
    }
}
