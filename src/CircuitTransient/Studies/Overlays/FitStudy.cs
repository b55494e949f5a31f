using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Fits part values to records and lays the records over the circuit with the fitted
/// values.</summary>
public static class FitStudy
{
    private const int MostSamples = 20_000; // of each record
    private const double Unexplained = 2; // mean square over that of the noise: another start is tried
    private const int MostValues = 12;

    /// <summary>Fits.</summary>
    /// <param name="circuit">The circuit as the file has it.</param>
    /// <param name="records">The records, each with the circuit it was taken on.</param>
    /// <param name="targets">What is to be fitted.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static Outcome<OverlayResult> Run(
        Circuit circuit, ImmutableArray<PlacedRecord> records, TargetList targets,
        Func<string, Outcome<SourceText>> readBeside, CancellationToken cancellation = default)
    {
        var nominal = VariedCircuit.Of(circuit, targets.Targets, readBeside);
        if (!nominal.Succeeded)
        {
            return new(null, nominal.Diagnostics);
        }

        if (Refusal(nominal.Value, targets) is { } refusal)
        {
            return new(null, [refusal]);
        }

        var prepared = Prepare(records, targets, readBeside, cancellation);
        if (!prepared.Succeeded)
        {
            return new(null, prepared.Diagnostics);
        }

        var values = nominal.Value.Values;
        var start = values.Select(v => v.Nominal).ToArray();
        if (Best(prepared.Value, start, values, cancellation) is not var (fit, system))
        {
            return new(null, [Diagnostic.Error(targets.Written,
                new TextSpan(0, targets.Written.Content.Length),
                "the records and the circuit do not come together near the file's values",
                "start nearer: change the values in the file, or give the offset with `--offset`")]);
        }

        var at = system.Values(fit.X);
        var result = FitDescription.Of(
            circuit, values, at, fit, system.OwnCount, system.Steps, records.Length);
        var placed = prepared.Value.Select(r => r.Varied.At(at).Then(fitted =>
            new Outcome<PlacedRecord>(r.Placed with { Circuit = fitted }, []))).ToArray();
        return Array.Find(placed, p => !p.Succeeded) is { } failed
            ? new(null, failed.Diagnostics)
            : OverlayStudy.Compare(circuit, [.. placed.Select(p => p.Value!)], cancellation)
                .Then(compared => new Outcome<OverlayResult>(compared with { Fit = result }, []));
    }

    private static Diagnostic? Refusal(VariedCircuit varied, TargetList targets)
    {
        var all = new TextSpan(0, targets.Written.Content.Length);
        return varied.Values.FirstOrDefault(v => v.Nominal == 0) is { } zero
                ? Diagnostic.Error(targets.Written, all, $"`{zero.Name}` is zero and cannot be scaled",
                    "give it a first value in the file")
            : varied.Values.Length > MostValues
                ? Diagnostic.Error(targets.Written, all,
                    $"{varied.Values.Length} values are more than can be fitted at once",
                    $"name at most {MostValues}")
            : null;
    }

    /// <summary>Each record's samples and noise, and its circuit that varies.</summary>
    private static Outcome<List<FittedRecord>> Prepare(
        ImmutableArray<PlacedRecord> records, TargetList targets,
        Func<string, Outcome<SourceText>> readBeside, CancellationToken cancellation)
    {
        var prepared = new List<FittedRecord>();
        foreach (var placed in records)
        {
            var varied = VariedCircuit.Of(placed.Circuit, targets.Targets, readBeside);
            var model = ModelCurve.Solve(placed.Circuit, placed.Observation, cancellation);
            if (!varied.Succeeded || !model.Succeeded)
            {
                return new(null, [.. varied.Diagnostics, .. model.Diagnostics]);
            }

            if (new RecordComparer(placed, model.Value).Align(out _, out var mistake) is not var (samples, _))
            {
                return new(null, [mistake!]);
            }

            var noise = RecordNoise.FromDifferences(placed.Record.Times, placed.Record.Values).Value;
            var floor = RecordNoise.StepOf(placed.Record.Values) / Math.Sqrt(12);
            prepared.Add(new FittedRecord(
                placed, varied.Value, samples.Thinned(MostSamples),
                Positive(Math.Max(noise, floor), samples)));
        }

        return new(prepared, []);
    }

    private static double Positive(double noise, RecordSamples samples) =>
        noise > 0 ? noise : 1e-9 * Math.Max(1e-30, samples.Values.Max(Math.Abs));

    /// <summary>The best of a few starts: the file's values, and those with coils and capacitances scaled so
    /// that the first record's ring would be met.</summary>
    private static (LeastSquaresResult Fit, FitSystem System)? Best(
        List<FittedRecord> records, double[] nominal, ImmutableArray<VariedValue> values,
        CancellationToken cancellation)
    {
        (LeastSquaresResult Fit, FitSystem System)? best = null;
        foreach (var start in Starts(records, values, cancellation))
        {
            var fit = new ValueFit(records, nominal, cancellation);
            if (fit.Run(start) is not { } found)
            {
                continue;
            }

            best = best is null || found.Cost < best.Value.Fit.Cost ? (found, fit.System) : best;
            if (best.Value.Fit.Cost < Unexplained * best.Value.Fit.Triangle.RowCount)
            {
                break;
            }
        }

        return best;
    }

    private static IEnumerable<double[]> Starts(
        List<FittedRecord> records, ImmutableArray<VariedValue> values, CancellationToken cancellation)
    {
        yield return new double[values.Length];
        var storing = values.Select(v => v.Unit is "H" or "F").ToArray();
        var first = records[0];
        var model = ModelCurve.Solve(first.Placed.Circuit, first.Placed.Observation, cancellation);
        if (!storing.Contains(true) || !model.Succeeded
            || new RecordAlignment(model.Value, first.Placed.Given).Find(first.Samples) is not { } aligned
            || new RingAnalysis(model.Value, aligned, first.Noise).Strongest is not { } ring)
        {
            yield break;
        }

        // ω² goes with 1/LC: one fitted kind takes the whole factor, two share it.
        var kinds = values.Where((_, i) => storing[i]).Select(v => v.Unit).Distinct().Count();
        var shift = -2 * Math.Log(ring.Record.Frequency / ring.ModelFrequency) / kinds;
        yield return [.. storing.Select(s => s ? shift : 0.0)];
    }
}
