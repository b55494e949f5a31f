using System.Collections.Immutable;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>The summary of an overlay for the terminal, verdict first.</summary>
public static class OverlaySummary
{
    private static readonly TextColumn Left = new();
    private static readonly TextColumn Right = new(IsRight: true);
    private static readonly TextColumn Prose = new(IsProse: true);

    /// <summary>The summary.</summary>
    /// <param name="result">The overlay.</param>
    /// <param name="files">Where the files are; may be empty.</param>
    /// <param name="colour">Whether headings are bold.</param>
    public static string Write(OverlayResult result, ImmutableArray<string> files, bool colour = false)
    {
        var text = new SummaryText(colour);
        var circuit = result.Circuit;
        text.Title(circuit.Title is { } title ? $"{title} ({circuit.Source.Name})" : circuit.Source.Name);
        text.Paragraph(OverlayWords.Verdict(result), indent: 0);
        if (result.Fit is { } fit)
        {
            WriteFit(text, fit);
        }

        foreach (var record in result.Records)
        {
            WriteRecord(text, record);
        }

        text.End(files);
        return text.ToString();
    }

    private static void WriteFit(SummaryText text, FitResult fit)
    {
        text.Heading("Fitted values, with standard errors");
        text.Table([Left, Right, Left, Right, Prose], fit.Values.Select(v => v.IsResolved
            ? ImmutableArray.Create(
                v.Name, OverlayWords.Value(v.Value, v.Unit, 5), OverlayWords.Error(v.RelativeError),
                OverlayWords.Change((v.Value / v.Nominal) - 1),
                $"to the file's {OverlayWords.Value(v.Nominal, v.Unit, 4)}")
            : ImmutableArray.Create(
                v.Name, "no value", OverlayWords.Error(v.RelativeError), "",
                $"the file's {OverlayWords.Value(v.Nominal, v.Unit, 4)} is as good as others")));
        if (!fit.Determined.IsEmpty)
        {
            text.Paragraph("What is determined, as long as each value is known to a factor of two:");
            text.Table([Left, Right, Left], fit.Determined.Select(d => ImmutableArray.Create(
                d.Words, EngineeringNumber.Format(d.Value, "", 5), OverlayWords.Error(d.RelativeError))),
                indent: 4);
            text.Paragraph("Take another record that moves these values differently, such as with a known "
                + "part added, and fit both at once (`--with \"RECORD: …\"`).");
        }

        if (fit.Values.Length > 1)
        {
            text.Paragraph("Correlation: " + string.Join(", ", Pairs(fit)));
        }

        text.Paragraph($"Offset, gain and level of each record were estimated beside them, unless given; "
            + $"condition {EngineeringNumber.Format(fit.Condition, "", 2)}, {fit.Steps} linearisations.");
    }

    private static IEnumerable<string> Pairs(FitResult fit)
    {
        for (var i = 0; i < fit.Values.Length; i++)
        {
            for (var j = i + 1; j < fit.Values.Length; j++)
            {
                yield return $"{fit.Values[i].Name} with {fit.Values[j].Name} "
                    + Signed(fit.Correlation[i][j]);
            }
        }
    }

    // A correlation near one is told by what it lacks to it.
    private static string Signed(double correlation) =>
        Math.Abs(correlation) < 0.99
            ? correlation.ToString("0.00")
            : (correlation < 0 ? "-" : "") + (Math.Abs(correlation) >= 1 - 1e-12 ? "1"
                : Math.Abs(correlation).ToString(
                    "F" + (1 + (int)Math.Ceiling(-Math.Log10(1 - Math.Abs(correlation))))));

    private static void WriteRecord(SummaryText text, RecordComparison record)
    {
        text.Heading($"{record.File} over {record.Observation}: {OverlayWords.Verdict(record)}");
        foreach (var added in record.Added)
        {
            text.Paragraph($"taken with {added}");
        }

        var (unit, left) = (record.Unit, record.Differences);
        var rows = new List<ImmutableArray<string>>
        {
            ImmutableArray.Create("offset", OverlayWords.Estimated(record.Alignment.Offset, "s"),
                "record time less study time"),
            ImmutableArray.Create("gain", OverlayWords.Estimated(record.Alignment.Gain, ""),
                "record over model"),
            ImmutableArray.Create("level", OverlayWords.Estimated(record.Alignment.Level, unit),
                "of the record where the model is zero"),
            ImmutableArray.Create("difference", $"{OverlayWords.Value(left.Rms, unit, 4)} rms",
                $"noise {OverlayWords.Value(record.Noise.Value, unit, 3)} rms by {record.Noise.Source}"),
            ImmutableArray.Create("greatest", OverlayWords.Value(left.Greatest, unit, 4),
                $"at {OverlayWords.Value(left.GreatestAt, "s", 4)} of the study"),
            Peak("highest", record.Highest, unit),
            Peak("lowest", record.Lowest, unit),
        };
        if (record.Ring is { } ring)
        {
            rows.Add(ImmutableArray.Create("ring", OverlayWords.Mode(ring.Record),
                $"the model's {OverlayWords.Value(ring.ModelFrequency, "Hz", 4)}, damping ratio "
                + $"{EngineeringNumber.Format(ring.ModelDamping, "", 3)}: "
                + $"{OverlayWords.Change(ring.Difference)}"));
        }

        text.Table([Left, Left, Prose], rows);
        text.Paragraph(left.AreWhite
            ? "What is left is noise: it has no memory of its own."
            : $"What is left is not only noise: {OverlayWords.Value(left.CorrelationLag, "s", 3)} apart its "
                + $"values are correlated by {left.Correlation.ToString("0.00")}.");
        WriteUnexplained(text, record);
        text.Paragraph($"{record.ComparedCount} of {record.RowCount} samples compared; "
            + string.Join("; ", Counts(record).Concat(record.Remarks)) + ".");
    }

    private static IEnumerable<string> Counts(RecordComparison record)
    {
        if (record.OutsideCount > 0)
        {
            yield return $"{record.OutsideCount} before or after the study";
        }
    }

    private static ImmutableArray<string> Peak(string name, PeakPair pair, string unit) =>
        ImmutableArray.Create(
            name,
            $"{OverlayWords.Value(pair.Record, unit, 4)} at {OverlayWords.Value(pair.RecordAt, "s", 4)}",
            $"the model's {OverlayWords.Value(pair.Model, unit, 4)} at "
            + $"{OverlayWords.Value(pair.ModelAt, "s", 4)}: {(pair.Difference > 0 ? "+" : "")}"
            + OverlayWords.Value(pair.Difference, unit, 3));

    private static void WriteUnexplained(SummaryText text, RecordComparison record)
    {
        foreach (var missing in record.Unexplained)
        {
            var nearest = missing.Nearest is { } model
                ? $"; the model's nearest is {OverlayWords.Value(model, "Hz", 4)}"
                : "; the model does not ring";
            text.Paragraph(
                $"In the record and not in the model: {OverlayWords.Mode(missing.Mode)}{nearest}.");
            if (missing.Strays.IsEmpty)
            {
                text.Paragraph("No single capacitance or inductance added to the circuit was found that "
                    + "explains it.", indent: 4);
                continue;
            }

            text.Paragraph("A single part added to the circuit that would explain it, the likeliest first:",
                indent: 4);
            text.Table([Left, Left], missing.Strays.Select(s => ImmutableArray.Create(
                s.Words, $"leaves {OverlayWords.Ratio(s.Ratio)} × the noise")), indent: 6);
        }
    }
}
