using System.Diagnostics;
using System.Globalization;
using System.Text.Json;
using CircuitTransient.Cli;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Cli;

/// <summary>Tables of points beside the circuit, and circuits written out by the thousand.</summary>
public sealed class LargerCircuitTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    /// <remarks>IEC 62305-1 annex B (from memory): i = (I/k) x¹⁰/(1 + x¹⁰) e^(−t/τ₂), x = t/τ₁. Peak, charge
    /// and specific energy of the wave itself: computed by quadrature outside this program.</remarks>
    [Theory]
    [InlineData(200e3, 0.93, 19e-6, 485e-6, 200.254e3, 100.2314, 10.27533e6)]
    [InlineData(100e3, 0.986, 1.82e-6, 285e-6, 100.039e3, 28.7176, 1.44497e6)]
    [InlineData(50e3, 0.993, 0.454e-6, 143e-6, 49.988e3, 7.17720, 0.179996e6)]
    public void A_lightning_stroke_in_a_table_brings_its_peak_charge_and_specific_energy(
        double current, double k, double front, double tail, double peak, double charge, double energy)
    {
        var points = Points(front, tail)
            .Select(t => (t, Stroke(t))).ToArray();
        File.WriteAllText(
            Path.Combine(commandLine.Folder, "stroke.csv"),
            "time (s),stroke (A)\n" + string.Join('\n', points.Select(p => string.Create(
                CultureInfo.InvariantCulture, $"{p.t:R},{p.Item2:R}"))) + "\n");
        var path = commandLine.Circuit("stroke.cause", """
            source Stroke from ground to a : straight lines in file "stroke.csv"
            resistor R from a to b : 1 Ω
            capacitor C at b : 1 F
            observe current through R
            observe energy in R
            observe voltage of b
            until 20 ms
            """);

        var run = commandLine.Run("solve", "--no-files", "--json", path);

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        using var results = JsonDocument.Parse(run.Output);
        double[] max =
        [
            .. results.RootElement.GetProperty("observations").EnumerateArray()
                .Select(o => o.GetProperty("max").GetProperty("value").GetDouble()),
        ];
        Close.To(points.Max(p => p.Item2), max[0]);
        Close.To(Integral(points, (a, b) => ((a * a) + (a * b) + (b * b)) / 3), max[1]);
        Close.To(Integral(points, (a, b) => (a + b) / 2), max[2]);

        // Straight lines between the points and the wave itself part by the square of the step.
        Close.To(peak, max[0], 1e-5);
        Close.To(energy, max[1], 2e-4);
        Close.To(charge, max[2], 2e-4);

        double Stroke(double t)
        {
            var x = Math.Pow(t / front, 10);
            return current / k * x / (1 + x) * Math.Exp(-t / tail);
        }
    }

    [Theory]
    [InlineData("../stroke.csv", "`../stroke.csv` lies outside the folder of the circuit")]
    [InlineData("none.csv", "the file `none.csv` cannot be read")]
    public void A_table_elsewhere_or_missing_is_told(string table, string message)
    {
        File.WriteAllText(Path.Combine(commandLine.Folder, "stroke.csv"), "time (s),stroke (A)\n0,1\n");
        Directory.CreateDirectory(Path.Combine(commandLine.Folder, "below"));
        var path = commandLine.Circuit("below/stroke.cause", $"""
            source Stroke from ground to a : straight lines in file "{table}"
            resistor R at a : 1 Ω
            until 1 ms
            """);

        var run = commandLine.Run("check", path);

        Assert.NotEqual(ExitStatus.Success, run.Status);
        Assert.Contains($"stroke.cause:1:34: error: {message}\n", run.Error);
    }

    [Fact]
    public void A_mistake_in_a_table_is_told_with_its_line_in_the_table()
    {
        File.WriteAllText(
            Path.Combine(commandLine.Folder, "stroke.csv"), "time (µs),stroke (kA)\n0,0\n2,5\n1,3\n");
        var path = commandLine.Circuit("stroke.cause", """
            source Stroke from ground to a : straight lines in file "stroke.csv"
            resistor R at a : 1 Ω
            until 1 ms
            """);

        var run = commandLine.Run("check", path);

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Contains("stroke.csv:4:1: error: this point at 1 µs comes after one at 2 µs\n", run.Error);
    }

    [Fact]
    public void A_circuit_without_a_unique_solution_in_a_later_interval_is_found_by_checking()
    {
        var path = commandLine.Circuit("short.cause", """
            source Feed at a : 10 V
            switch S from a to ground : open, closes at 20 ms
            resistor R at a : 1 Ω
            until 1 s
            """);

        var run = commandLine.Run("check", path);

        Assert.Equal((ExitStatus.NoUniqueSolution, ""), (run.Status, run.Output));
        Assert.Contains("short.cause:1:1: error: `Feed` and `S` form a loop", run.Error);
    }

    [Fact]
    public void Two_thousand_sections_are_read_and_checked()
    {
        var source = new SourceText("line.cause", """
            source Feed at n[1] : step of 10 V
            repeat 2000 as k
              resistor R[k] from n[k] to n[k+1] : 1 Ω
              capacitor C[k] at n[k+1] : 1 nF
            end
            observe voltage of n[2001]
            until 1 ms
            """);
        var watch = Stopwatch.StartNew();

        var checkedCircuit = TransientAnalysis.Check(source, _ => throw new InvalidOperationException());

        Assert.Equal(4001, checkedCircuit.Value!.Parts.Length);
        TestContext.Current.TestOutputHelper?.WriteLine($"{watch.Elapsed.TotalMilliseconds} ms");
    }

    /// <summary>Dense where the wave bends: by equal ratios through the front and the tail.</summary>
    private static IEnumerable<double> Points(double front, double tail)
    {
        yield return 0;
        const int count = 500;
        var (first, last) = (front / 10, 30 * tail);
        for (var n = 0; n <= count; n++)
        {
            yield return first * Math.Pow(last / first, (double)n / count);
        }
    }

    private static double Integral((double Time, double Value)[] points, Func<double, double, double> mean) =>
        points.Zip(points.Skip(1), (a, b) => (b.Time - a.Time) * mean(a.Value, b.Value)).Sum();
}
