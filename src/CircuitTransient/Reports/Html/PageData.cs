using System.Text;
using System.Text.Json;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports.Html;

/// <summary>What the page's script works on: the samples of every waveform by causes, and what is judged by
/// them, as JSON.</summary>
internal sealed partial class PageData
{
    private const int MostValues = 500_000; // samples of all terms: 2.7 MB in base 64
    private const int FewestSamples = 120;

    private readonly TransientResult result;
    private readonly List<PageWave> waves = [];
    private readonly Dictionary<FollowedWave, int> places = new(ReferenceEqualityComparer.Instance);
    private readonly Utf8JsonWriter json;

    private PageData(TransientResult result, Utf8JsonWriter json) =>
        (this.result, this.json) = (result, json);

    /// <summary>The data of a result, without a less-than sign or a character outside ASCII.</summary>
    public static string Write(TransientResult result)
    {
        using var stream = new MemoryStream();
        using var writer = new Utf8JsonWriter(stream);
        new PageData(result, writer).WriteAll();
        writer.Flush();
        return Encoding.UTF8.GetString(stream.ToArray());
    }

    private void WriteAll()
    {
        json.WriteStartObject();
        json.WriteNumber("until", result.Until);
        json.WriteBoolean("checksHold", result.ChecksHold);
        WriteCauses();
        WriteEvents();
        WriteBreakdowns();
        WriteObservations();
        WriteRequirements();
        WriteRatings();
        WriteLinearLimits();
        WriteWaves();
        json.WriteEndObject();
    }

    private void WriteCauses()
    {
        json.WriteStartArray("causes");
        foreach (var cause in result.Causes)
        {
            json.WriteStringValue(cause.Name);
        }

        json.WriteEndArray();
    }

    private void WriteEvents()
    {
        json.WriteStartArray("events");
        foreach (var together in result.Events.GroupBy(e => e.Time))
        {
            json.WriteStartObject();
            json.WriteNumber("time", together.Key);
            json.WriteString("name", string.Join(" and ", together.Select(InstantWords.Name)));
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteBreakdowns()
    {
        json.WriteStartArray("breakdowns");
        foreach (var breakdown in result.OtherBreakdowns)
        {
            json.WriteStartObject();
            json.WriteString("words", breakdown.Words);
            json.WriteNumber("from", breakdown.From);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteObservations()
    {
        json.WriteStartArray("observations");
        foreach (var observed in result.Observations)
        {
            var declared = result.Circuit.Observations.FirstOrDefault(o => o.Name == observed.Name);
            var (from, to) = WindowOf(declared?.Window);
            json.WriteStartObject();
            json.WriteString("name", observed.Name);
            json.WriteString("unit", observed.Unit);
            json.WriteNumber("from", from);
            json.WriteNumber("to", to);
            json.WriteNumber("wave", Add(PageWave.Of(result, observed, declared)));
            WriteTimed("max", observed.Max.Value, observed.Max.Time);
            WriteTimed("min", observed.Min.Value, observed.Min.Time);
            WriteContributions(observed);
            WriteLimits(observed);
            WriteCloseUp(observed);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteContributions(ObservationResult observed)
    {
        json.WriteStartArray("without");
        foreach (var contribution in observed.Contributions)
        {
            json.WriteStartObject();
            WriteTimed("ownMax", contribution.OwnMax?.Value, contribution.OwnMax?.Time ?? 0);
            WriteTimed("ownMin", contribution.OwnMin?.Value, contribution.OwnMin?.Time ?? 0);
            WriteTimed("max", contribution.MaxWithout?.Value, contribution.MaxWithout?.Time ?? 0);
            WriteTimed("min", contribution.MinWithout?.Value, contribution.MinWithout?.Time ?? 0);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteLimits(ObservationResult observed)
    {
        json.WriteStartArray("limits");
        foreach (var limit in PlotLimit.On(result, observed))
        {
            json.WriteStartObject();
            json.WriteNumber("value", limit.Value);
            json.WriteNumber("from", limit.From);
            json.WriteNumber("to", limit.To);
            json.WriteString("words", limit.Words);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteCloseUp(ObservationResult observed)
    {
        if (PlotWindow.Enlarged(result, observed) is { } window)
        {
            json.WriteStartObject("closeUp");
            json.WriteNumber("from", window.From);
            json.WriteNumber("to", window.To);
            json.WriteNumber("origin", window.Origin);
            json.WriteString("originName", window.OriginName);
            json.WriteString("words", window.Words());
            json.WriteEndObject();
        }
    }

    private (double From, double To) WindowOf(Window? window)
    {
        var from = window?.From is { } start ? DeclaredInstant.Seconds(result, start) : 0;
        var to = window?.To is { } end ? DeclaredInstant.Seconds(result, end) : result.Until;
        return (Math.Max(0, from ?? 0), Math.Min(result.Until, to ?? result.Until));
    }

    private void WriteTimed(string name, double? value, double time)
    {
        if (value is { } number && double.IsFinite(number) && double.IsFinite(time))
        {
            json.WriteStartArray(name);
            json.WriteNumberValue(number);
            json.WriteNumberValue(time);
            json.WriteEndArray();
        }
    }

    private int Add(PageWave wave)
    {
        waves.Add(wave);
        return waves.Count - 1;
    }
}
