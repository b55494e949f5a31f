using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies.Records;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A record and what the user says about the bench it was taken on.</summary>
/// <param name="Record">The record.</param>
/// <param name="Shows">The quantity it shows; null where that follows from its title or unit.</param>
/// <param name="With">Parts that were added for it, as statements.</param>
/// <param name="ScopeInput">The instrument's input, <c>10 MΩ parallel 12 pF</c>; null for an ideal
/// one.</param>
/// <param name="Generator">The resistance of a source, <c>50 Ω</c> or <c>Edge: 50 Ω</c>; null for
/// none.</param>
/// <param name="Given">What of the alignment is given.</param>
public sealed record RecordRequest(
    OscilloscopeRecord Record, string? Shows, ImmutableArray<string> With, string? ScopeInput,
    string? Generator, AlignmentGiven Given);

/// <summary>Places records on the circuit they were taken on.</summary>
public static class RecordPlacement
{
    /// <summary>Finds what a record shows, and the circuit with the bench's own parts.</summary>
    public static Outcome<PlacedRecord> Place(
        Circuit circuit, RecordRequest request, Func<string, Outcome<SourceText>> readBeside)
    {
        var bench = new BenchText(circuit.Source);
        foreach (var part in request.With)
        {
            bench = bench.With("--with", part, part);
        }

        var remark = (string?)null;
        string name;
        if (request.Shows is { } shows)
        {
            var isKnown = circuit.Observations.Any(o => o.Name == shows);
            bench = isKnown ? bench : bench.With("--as", shows, $"observe {shows}");
            name = shows;
        }
        else if (Guess(circuit, request.Record, out remark) is { } guessed)
        {
            name = guessed.Name;
        }
        else
        {
            return new(null, [Unnamed(circuit, request.Record)]);
        }

        if (request.Generator is { } generator)
        {
            var behind = GeneratorPlacement.Put(circuit, bench, generator);
            if (!behind.Succeeded)
            {
                return new(null, behind.Diagnostics);
            }

            bench = behind.Value;
        }

        return bench.Check(readBeside).Then(placed => WithInput(placed, bench, request, name, readBeside))
            .Then(placed => Finish(placed, request, name, remark));
    }

    private static Outcome<Circuit> WithInput(
        Circuit circuit, BenchText bench, RecordRequest request, string name,
        Func<string, Outcome<SourceText>> readBeside)
    {
        if (request.ScopeInput is not { } input)
        {
            return new(circuit, []);
        }

        var text = new SourceText("--scope-input", input);
        (int From, int To)? nodes = Shown(circuit, name).Quantity switch
        {
            VoltageBetween v => (v.From, v.To),
            VoltageAcross v => (circuit.Parts[v.Part].From, circuit.Parts[v.Part].To),
            _ => null,
        };
        if (nodes is not var (from, to))
        {
            return new(null, [Diagnostic.Error(text, new TextSpan(0, input.Length),
                $"an input stands across two nodes; `{name}` is no voltage",
                "put the sensor of a current into the circuit as a part: `--with \"RECORD: resistor …\"`")]);
        }

        var (a, b) = (BenchText.Name(circuit.Nodes[from]), BenchText.Name(circuit.Nodes[to]));
        foreach (var piece in input.Split("parallel", StringSplitOptions.TrimEntries))
        {
            var kind = piece.EndsWith('F') ? "capacitor" : "resistor";
            bench = bench.With("--scope-input", piece,
                $"{kind} \"scope input {(kind == "capacitor" ? "C" : "R")}\" from {a} to {b} : {piece}");
        }

        return bench.Check(readBeside);
    }

    private static Outcome<PlacedRecord> Finish(
        Circuit placed, RecordRequest request, string name, string? remark)
    {
        var shown = Shown(placed, name);
        var record = request.Record;
        if (shown.Quantity is not (VoltageBetween or VoltageAcross or CurrentThrough or RateOfChange))
        {
            return new(null, [Mistake(record, $"a record shows a voltage or a current; `{name}` is neither",
                "name another with `--as \"voltage of x\"`")]);
        }

        if (record.Unit is { } unit && unit != shown.Unit)
        {
            return new(null, [Mistake(record,
                $"the record is in {unit}, `{name}` is in {shown.Unit}",
                "name what the record shows with `--as`, or another column with `--channel`")]);
        }

        ImmutableArray<string> added =
        [
            .. request.With,
            .. request.ScopeInput is { } input ? [$"oscilloscope input {input}"] : (string[])[],
            .. request.Generator is { } generator ? [$"generator {generator}"] : (string[])[],
        ];
        ImmutableArray<string> remarks =
        [
            .. remark is null ? (string[])[] : [remark],
            .. record.Unit is null ? [$"no unit is given: taken as {shown.Unit}"] : (string[])[],
        ];
        return new(new PlacedRecord(record, shown, placed, added, request.Given) { Remarks = remarks }, []);
    }

    /// <summary>The observation of that name; where the text named a quantity anew, the last one.</summary>
    private static Observation Shown(Circuit circuit, string name) =>
        circuit.Observations.FirstOrDefault(o => o.Name == name) ?? circuit.Observations[^1];

    /// <summary>What a record shows by its title, or by being the only one with its unit.</summary>
    private static Observation? Guess(Circuit circuit, OscilloscopeRecord record, out string? remark)
    {
        remark = null;
        var waves = circuit.Observations.Where(o => o.Quantity is not Figure
            && (record.Unit is null || o.Unit == record.Unit)).ToArray();
        if (waves.FirstOrDefault(o => o.Name == record.Channel) is { } titled)
        {
            return titled;
        }

        if (waves.Length != 1)
        {
            return null;
        }

        remark = $"laid over `{waves[0].Name}`, the only observation"
            + (record.Unit is { } unit ? $" in {unit}" : "");
        return waves[0];
    }

    private static Diagnostic Unnamed(Circuit circuit, OscilloscopeRecord record)
    {
        var waves = circuit.Observations.Where(o => o.Quantity is not Figure)
            .Select(o => $"`{o.Name}`").Take(10).ToArray();
        return Mistake(record, "it is not known what this record shows",
            $"say it with `--as`: {string.Join(", ", waves)}, or any other voltage or current");
    }

    private static Diagnostic Mistake(OscilloscopeRecord record, string message, string advice) =>
        Diagnostic.Error(new SourceText(record.Name, ""), new TextSpan(0, 0), message, advice);
}
