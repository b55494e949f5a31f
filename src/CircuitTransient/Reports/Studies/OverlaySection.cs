using CircuitTransient.Reports.Html;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>The section that an overlay adds to the page.</summary>
public static class OverlaySection
{
    /// <summary>The section.</summary>
    public static StudySection Of(OverlayResult result) => new("Records over the model", Markup.Of($"""
        <p>{OverlayWords.Verdict(result)}</p>
        {(result.Fit is { } fit ? Fit(fit) : default)}
        <figure>{Markup.Picture(OverlayPlot.Svg(result))}</figure>
        {Markup.Join(result.Records.Select(Record))}
        """));

    private static Markup Fit(FitResult fit) => Markup.Of($"""
        <table>
        <caption>Fitted values; offset, gain and level of each record were estimated beside them unless
        given. Condition {EngineeringNumber.Format(fit.Condition, "", 2)}.</caption>
        <thead><tr><th scope="col">Value</th><th scope="col">Fitted</th><th scope="col">Standard error</th>
        <th scope="col">In the file</th><th scope="col">Determined</th></tr></thead>
        <tbody>{Markup.Join(fit.Values.Select(v => Markup.Of($"""
            <tr><th scope="row">{Markup.Name(v.Name)}</th>
            <td>{(v.IsResolved ? OverlayWords.Value(v.Value, v.Unit, 5) : "no value")}</td>
            <td>{OverlayWords.Error(v.RelativeError)}</td>
            <td>{OverlayWords.Value(v.Nominal, v.Unit, 4)}</td><td>{(v.IsResolved ? "yes" : "no")}</td></tr>
            """)))}{Markup.Join(fit.Determined.Select(d => Markup.Of($"""
            <tr><th scope="row">{Markup.Name(d.Words)}</th>
            <td>{EngineeringNumber.Format(d.Value, "", 5)}</td><td>{OverlayWords.Error(d.RelativeError)}</td>
            <td></td><td>yes</td></tr>
            """)))}</tbody>
        </table>
        """);

    private static Markup Record(RecordComparison record) => Markup.Of($"""
        <h3>{Markup.Name(record.File)} over {Markup.Name(record.Observation)}</h3>
        <p>{OverlayWords.Verdict(record)}. {record.ComparedCount} of {record.RowCount} samples compared.
        Offset {OverlayWords.Estimated(record.Alignment.Offset, "s")}, gain
        {OverlayWords.Estimated(record.Alignment.Gain, "")}, level
        {OverlayWords.Estimated(record.Alignment.Level, record.Unit)}. Highest
        {OverlayWords.Value(record.Highest.Record, record.Unit, 4)} against
        {OverlayWords.Value(record.Highest.Model, record.Unit, 4)}, lowest
        {OverlayWords.Value(record.Lowest.Record, record.Unit, 4)} against
        {OverlayWords.Value(record.Lowest.Model, record.Unit, 4)}.
        {(record.Ring is { } ring
            ? $"Rings at {OverlayWords.Mode(ring.Record)}; the model at "
                + $"{OverlayWords.Value(ring.ModelFrequency, "Hz", 4)} "
                + $"({OverlayWords.Change(ring.Difference)})."
            : "")}</p>
        <ul>{Markup.Join(record.Added.Select(a => Markup.Of($"<li>taken with {a}</li>\n")))}
        {Markup.Join(record.Remarks.Select(r => Markup.Of($"<li>{r}</li>\n")))}
        {Markup.Join(record.Unexplained.Select(Missing))}</ul>
        """);

    private static Markup Missing(UnexplainedMode missing)
    {
        var strays = missing.Strays.Select(s =>
            $"{s.Words} (leaves {OverlayWords.Ratio(s.Ratio)} × the noise)");
        var words = missing.Strays.IsEmpty ? "no single added part was found that explains it"
            : $"would be explained by {string.Join(", or ", strays)}";
        return Markup.Of($"""
            <li>in the record and not in the model: {OverlayWords.Mode(missing.Mode)}; {words}</li>
            """);
    }
}
