using System.Globalization;
using System.Text;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Overlays;

/// <summary>Makes the two synthetic records of the load-pin bench that stand in <c>netlists/</c>: the exact
/// answer, seen through an instrument with noise, gain, an offset and eight bits.</summary>
public static class LoadPinRecords
{
    private const double Noise = 0.11; // V rms
    private const double Gain = 1.012;
    private const double Level = 0.06; // V
    private const double Lowest = -10; // V, of a span of 40 V
    private const double Code = 40.0 / 256; // V, of 8 bits

    /// <summary>The bare bench; its edge is at 40 ns, as in the circuit.</summary>
    public static string Bare() => Make("", 0, 71);

    /// <summary>With 220 pF added at x; its edge is at 43.3 ns.</summary>
    public static string Loaded() => Make("capacitor Cadd from x to pad : 220 pF\n", 3.3e-9, 220);

    private static string Make(string added, double delay, ulong seed)
    {
        const int count = 700; // each 1 ns
        var path = Path.Combine(Project.Repository.Root, "netlists", "load-pin.cause");
        var source = new SourceText("load-pin.cause", File.ReadAllText(path) + added);
        var instants = Enumerable.Range(0, count).Select(k => Math.Max(0, (k * 1e-9) - delay));
        var result = ((Solved)TransientAnalysis.Run(
            source, new AnalysisOptions([.. instants]), _ => new Outcome<SourceText>(null, []))).Result;
        var noise = new SeededNoise(seed);
        var text = new StringBuilder("time (ns),voltage of x (V)\n");
        foreach (var (k, sample) in result.Observations[0].Samples.Index())
        {
            var seen = Level + (Gain * sample.Value!.Value) + (Noise * noise.Next());
            var code = Math.Clamp(Math.Round((seen - Lowest) / Code), 0, 255);
            var value = Lowest + (code * Code);
            text.Append(CultureInfo.InvariantCulture, $"{k},{value:0.#####}\n");
        }

        return text.ToString();
    }
}
