using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Studies.Records;
using CircuitTransient.Tests.Studies.Overlays;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Fits of records with known noise against the Cramér-Rao bound: the covariance s² (JᵀJ)⁻¹ at the
/// true values, which no unbiased estimate undercuts (Cramér 1946, Rao 1945, from memory).</summary>
public class FitStatisticsTests
{
    [Fact]
    public void Fitted_rings_scatter_by_the_bound_within_a_tenth_and_their_errors_cover_what_they_say()
    {
        const int seeds = 800; // a standard deviation is known to 2.5 per cent then
        const double noise = 0.05;
        double[] truth = [1, 3, 40, 0.5]; // amplitude, decay, angular frequency, phase
        var times = Enumerable.Range(0, 200).Select(k => k / 200.0).ToArray();
        var bound = TriangleSolver.InverseProduct(
            Linearise(times, Array.ConvertAll(times, t => Ring(truth, t).Value), truth))!;
        var squares = new double[truth.Length];
        var covered = new int[truth.Length];
        for (var seed = 1; seed <= seeds; seed++)
        {
            var random = new SeededNoise((ulong)seed);
            var values = Array.ConvertAll(times, t => Ring(truth, t).Value + (noise * random.Next()));
            var fit = LeastSquares.Minimise(
                [1.2, 2, 39, 0.3], x => Linearise(times, values, x), radius: 1, tolerance: 1e-12)!;
            var inverse = TriangleSolver.InverseProduct(fit.Triangle)!;
            var variance = fit.Cost / (times.Length - truth.Length);
            for (var j = 0; j < truth.Length; j++)
            {
                var error = fit.X[j] - truth[j];
                squares[j] += error * error;
                covered[j] += Math.Abs(error) <= 1.96 * Math.Sqrt(variance * inverse[j, j]) ? 1 : 0;
            }
        }

        for (var j = 0; j < truth.Length; j++)
        {
            Assert.InRange(Math.Sqrt(squares[j] / seeds) / (noise * Math.Sqrt(bound[j, j])), 0.9, 1.1);
            // 95 % of a normal scatter lies within 1.96 standard errors; four deviations of that count.
            Assert.InRange(covered[j] / (double)seeds, 0.95 - 0.031, 0.95 + 0.031);
        }
    }

    [Fact]
    public void Values_fitted_to_records_of_a_circuit_scatter_as_their_standard_errors_say()
    {
        const int seeds = 40;
        const string text = """
            source Edge at s : step of 10 V at 1 µs
            resistor R1 from s to a : 12 Ω
            inductor L1 from a to x : 10 µH
            capacitor C1 from x to ground : 1 nF
            observe voltage of x
            until 6 µs
            """;
        const double noise = 0.2;
        var (circuit, record) = Exact(text, 150);
        var squares = new double[2];
        for (var seed = 1; seed <= seeds; seed++)
        {
            var random = new SeededNoise((ulong)seed);
            var values = Array.ConvertAll(record.Values, v => 0.1 + (1.02 * v) + (noise * random.Next()));
            var fit = Fit(circuit, record with { Values = values });
            Assert.True(fit.Converged);
            foreach (var (j, value) in fit.Values.Index())
            {
                var error = Math.Log(value.Value / value.Nominal) / value.RelativeError;
                squares[j] += error * error;
            }
        }

        // A sum of squares of forty normal deviates, each of variance 2: 40 ± 4·√80.
        Assert.All(squares, sum => Assert.InRange(sum / seeds, 1 - 0.9, 1 + 0.9));
    }

    private static FitResult Fit(Circuit circuit, OscilloscopeRecord record)
    {
        var targets = FitTargets.Read(circuit, new SourceText("--fit", "L1, R1")).Value!;
        var placed = RecordPlacement.Place(
            circuit, new RecordRequest(record, null, [], null, null, new AlignmentGiven()), NoFile).Value!;
        return FitStudy.Run(circuit, [placed], targets, NoFile).Value!.Fit!;
    }

    private static (Circuit Circuit, OscilloscopeRecord Record) Exact(string text, int count)
    {
        var circuit = TransientAnalysis.Check(new SourceText("ring.cause", text), NoFile).Value!;
        var times = Enumerable.Range(0, count).Select(k => k * circuit.Until!.Value / count).ToArray();
        var model = ModelCurve.Solve(circuit, circuit.Observations[0], CancellationToken.None).Value!;
        var values = new double[count];
        model.Evaluate(times, values, null);
        return (circuit, new OscilloscopeRecord(
            "ring.csv", "", "voltage of x", ["voltage of x"], "V", times, values, null, count, []));
    }

    private static Outcome<SourceText> NoFile(string name) => new(null, []);

    private static RowTriangle Linearise(double[] times, double[] values, double[] x)
    {
        var triangle = new RowTriangle(x.Length);
        for (var k = 0; k < times.Length; k++)
        {
            var (value, slopes) = Ring(x, times[k]);
            triangle.Add(slopes, value - values[k]);
        }

        return triangle.Reduced();
    }

    private static (double Value, double[] Slopes) Ring(double[] x, double t)
    {
        var size = Math.Exp(-x[1] * t);
        var (sin, cos) = Math.SinCos((x[2] * t) + x[3]);
        return (x[0] * size * cos,
            [size * cos, -t * x[0] * size * cos, -t * x[0] * size * sin, -x[0] * size * sin]);
    }
}
