using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Sensitivities;
using CircuitTransient.Tests.Circuits;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Sensitivities;

/// <summary>A circuit text derived with respect to some values, and the same derivatives by differences of
/// whole solutions.</summary>
internal sealed class Derived
{
    private readonly double[] nominal;

    private Derived(VariedCircuit varied)
    {
        Varied = varied;
        nominal = [.. varied.Values.Select(v => v.Nominal)];
        var outcome = SensitivityAnalysis.Of(varied, nominal, TestContext.Current.CancellationToken);
        Assert.True(outcome.Succeeded, DiagnosticText.Render(outcome.Diagnostics));
        Analysis = outcome.Value;
    }

    /// <summary>The circuit.</summary>
    public VariedCircuit Varied { get; }

    /// <summary>Its derivatives.</summary>
    public SensitivityAnalysis Analysis { get; }

    /// <summary>Derives a text.</summary>
    public static Derived Of(string text, params ImmutableArray<StudyTarget> targets)
    {
        var outcome = VariedCircuit.Of(Checking.Circuit(text), targets, _ => new(null, []));
        Assert.True(outcome.Succeeded, DiagnosticText.Render(outcome.Diagnostics));
        return new Derived(outcome.Value);
    }

    /// <summary>The figure with that name, derived.</summary>
    public FigureSlopes Figure(string name) =>
        Analysis.Of(StudyFigures.Of(Varied.Circuit).Single(f => f.Name == name))!;

    /// <summary>Relative sensitivities of a figure, by the values' names.</summary>
    public Dictionary<string, double> Relative(FigureSlopes figure) => Varied.Values
        .Select((v, k) => (v.Name, Slope: figure.Slopes[k]!.Value * nominal[k] / figure.Value))
        .ToDictionary(p => p.Name, p => p.Slope);

    /// <summary>The worst disagreement of derivatives at fixed instants with differences, relative to the
    /// largest derivative of the same quantity with respect to the same value; a derivative of less than 1 %
    /// per 100 % is judged as that, since differences lose it in rounding.</summary>
    public double WorstAgainstDifferences(IReadOnlyList<Measurand> quantities, double[] times)
    {
        double worst = 0;
        for (var v = 0; v < nominal.Length; v++)
        {
            var size = nominal[v] == 0 ? 1 : Math.Abs(nominal[v]);
            var values = Read(new CurveBuilder(Analysis.Solution));
            var differences = Differences(v, Read);
            for (var q = 0; q < quantities.Count; q++)
            {
                var own = differences.AsSpan(q * times.Length, times.Length).ToArray();
                double[] exact = [.. times.Select(t => Analysis.ValueSlopes(quantities[q], t)[v]!.Value)];
                var scale = own.Concat(exact).Max(Math.Abs)
                    + (1e-2 * values.AsSpan(q * times.Length, times.Length).ToArray().Max(Math.Abs) / size);
                for (var k = 0; k < times.Length && scale > 0; k++)
                {
                    worst = Math.Max(worst, Math.Abs(own[k] - exact[k]) / scale);
                }
            }
        }

        return worst;

        double[] Read(CurveBuilder curves) =>
            [.. quantities.SelectMany(q => times.Select(t => curves.Of(q)!.ValueAt(curves.Solution, t)))];
    }

    /// <summary>Asserts that figures' derivatives agree with differences of whole studies.</summary>
    /// <param name="names">The figures.</param>
    /// <param name="step">Relative step of the differences.</param>
    /// <param name="rounding">Of a figure over a value: what differences lose.</param>
    public void AssertFiguresAgree(IReadOnlyList<string> names, double step, double rounding)
    {
        ImmutableArray<StudyFigure> figures =
            [.. names.Select(n => StudyFigures.Of(Varied.Circuit).Single(f => f.Name == n))];
        FigureSlopes[] slopes = [.. figures.Select(f => Analysis.Of(f)!)];
        var stop = TestContext.Current.CancellationToken;
        for (var v = 0; v < nominal.Length; v++)
        {
            var expected = Richardson(v, step, values =>
                [.. StudySolver.At(Varied.At(values).Value!, figures, stop).Value!.Values
                    .Select(x => x!.Value)]);
            for (var k = 0; k < figures.Length; k++)
            {
                var size = Math.Abs(slopes[k].Value / (nominal[v] == 0 ? 1 : nominal[v]));
                Close.Within(
                    (1e-7 * Math.Abs(expected[k])) + (rounding * size) + 1e-15, expected[k],
                    slopes[k].Slopes[v]!.Value);
            }
        }
    }

    private double[] Differences(int v, Func<CurveBuilder, double[]> read) =>
        Richardson(v, 0.5e-4, values => read(Solved(values)));

    /// <summary>Three central differences, their errors of second and fourth order taken out.</summary>
    private double[] Richardson(int v, double relative, Func<double[], double[]> read)
    {
        var (a, b, c) = (Central(4 * relative), Central(2 * relative), Central(relative));
        return [.. a.Select((x, k) => (x - (20 * b[k]) + (64 * c[k])) / 45)];

        double[] Central(double size)
        {
            var step = size * (nominal[v] == 0 ? 1 : nominal[v]);
            double[] up = [.. nominal], down = [.. nominal];
            (up[v], down[v]) = (nominal[v] + step, nominal[v] - step);
            return [.. read(up).Zip(read(down), (x, y) => (x - y) / (up[v] - down[v]))];
        }
    }

    private CurveBuilder Solved(double[] values)
    {
        var circuit = Varied.At(values).Value!;
        var outcome = TransientSolver.Solve(
            circuit, CauseList.FromStart(circuit), TestContext.Current.CancellationToken);
        Assert.True(outcome.Succeeded, DiagnosticText.Render(outcome.Diagnostics));
        return new CurveBuilder(outcome.Value);
    }
}
