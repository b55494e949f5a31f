using System.Buffers.Binary;
using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports.Html;

/// <content>The samples of the waveforms.</content>
internal sealed partial class PageData
{
    private void WriteWaves()
    {
        var terms = Math.Max(1, waves.Sum(w => w.Count));
        var limit = Math.Max(FewestSamples, MostValues / terms);
        json.WriteBase64String("times", Bytes(result.SampleTimes));
        json.WriteStartArray("waves");
        foreach (var wave in waves)
        {
            var chosen = result.SampleTimes.Length > limit ? Thinned(wave, limit) : default;
            json.WriteStartObject();
            json.WriteBoolean("quadratic", wave.IsQuadratic);
            if (wave.Factor is { } factor)
            {
                json.WriteNumber("factor", factor);
            }

            if (!chosen.IsDefault)
            {
                json.WriteBase64String("index", Bytes(chosen));
            }

            json.WriteStartArray("terms");
            foreach (var term in wave.Terms)
            {
                WriteTerm(term, chosen);
            }

            json.WriteEndArray();
            WriteOthers(wave, chosen);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private void WriteTerm(PageTerm term, ImmutableArray<int> chosen)
    {
        json.WriteStartObject();
        if (term.Cause is { } cause)
        {
            json.WriteNumber("cause", cause);
        }

        if (term.WithCause is { } other)
        {
            json.WriteNumber("with", other);
        }

        WriteSamples(term.Samples, chosen);
        json.WriteEndObject();
    }

    private void WriteSamples(ImmutableArray<double> samples, ImmutableArray<int> chosen) =>
        json.WriteBase64String("samples", SingleBytes(
            chosen.IsDefault ? samples : [.. chosen.Select(i => samples[i])]));

    private void WriteOthers(PageWave wave, ImmutableArray<int> chosen)
    {
        json.WriteStartArray("others");
        foreach (var (breakdown, terms) in wave.Others)
        {
            json.WriteStartObject();
            json.WriteNumber("breakdown", breakdown);
            json.WriteStartArray("terms");
            foreach (var term in terms)
            {
                json.WriteStartObject();
                json.WriteString("name", term.Name);
                json.WriteStartArray("weights");
                foreach (var (cause, weight) in term.Weights)
                {
                    json.WriteStartArray();
                    json.WriteNumberValue(cause);
                    json.WriteNumberValue(weight);
                    json.WriteEndArray();
                }

                json.WriteEndArray();
                WriteSamples(term.Samples, chosen);
                json.WriteEndObject();
            }

            json.WriteEndArray();
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private ImmutableArray<int> Thinned(PageWave wave, int limit)
    {
        var peaks = wave.Peaks.ToHashSet();
        var kept = Enumerable.Range(0, result.SampleTimes.Length)
            .Where(i => peaks.Contains(result.SampleTimes[i])).ToHashSet();
        // Before its event a waveform is not there; for the choice it is zero.
        var others = wave.Others.SelectMany(o => o.Terms)
            .Select(t => t.Samples.Select(v => double.IsNaN(v) ? 0 : v).ToImmutableArray());
        return SampleThinning.Choose(
            result.SampleTimes, [.. wave.Terms.Select(t => t.Samples), .. others], kept, limit);
    }

    private static byte[] Bytes(ImmutableArray<double> values)
    {
        var bytes = new byte[8 * values.Length];
        for (var i = 0; i < values.Length; i++)
        {
            BinaryPrimitives.WriteDoubleLittleEndian(bytes.AsSpan(8 * i), values[i]);
        }

        return bytes;
    }

    private static byte[] Bytes(ImmutableArray<int> values)
    {
        var bytes = new byte[4 * values.Length];
        for (var i = 0; i < values.Length; i++)
        {
            BinaryPrimitives.WriteInt32LittleEndian(bytes.AsSpan(4 * i), values[i]);
        }

        return bytes;
    }

    private static byte[] SingleBytes(ImmutableArray<double> values)
    {
        var bytes = new byte[4 * values.Length];
        for (var i = 0; i < values.Length; i++)
        {
            BinaryPrimitives.WriteSingleLittleEndian(bytes.AsSpan(4 * i), (float)values[i]);
        }

        return bytes;
    }
}
