using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Draws;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Draws;

/// <summary>A circuit's text with what varies in it, its kernel, and the exact engine beside it.</summary>
internal sealed class DrawnText
{
    private readonly double[] found;
    private readonly double[] times;

    private DrawnText(VariedCircuit varied)
    {
        Varied = varied;
        Figures = StudyFigures.Of(varied.Circuit);
        (Kernel, Reason) = DrawKernel.For(varied, Figures, TestContext.Current.CancellationToken);
        found = new double[Figures.Length];
        times = new double[Figures.Length];
    }

    public VariedCircuit Varied { get; }

    public ImmutableArray<StudyFigure> Figures { get; }

    public DrawKernel? Kernel { get; }

    public string? Reason { get; }

    /// <summary>Varies every tolerance, or what is named.</summary>
    public static DrawnText Of(string text, params StudyTarget[] targets)
    {
        var outcome = TransientAnalysis.Check(new SourceText("drawn.cause", text), NoFile);
        Assert.True(outcome.Succeeded, string.Join('\n', outcome.Diagnostics.Select(d => d.Message)));
        var varied = VariedCircuit.Of(
            outcome.Value, targets.Length == 0 ? [new EveryTolerance()] : [.. targets], NoFile);
        return new DrawnText(varied.Value!);
    }

    /// <summary>A draw within the tolerances, or within ten per cent.</summary>
    public double[] Draw(Random random) => [.. Varied.Values.Select(v => v.Tolerance is { } t
        ? t.Lowest + (random.NextDouble() * (t.Highest - t.Lowest))
        : v.Nominal * (0.9 + (0.2 * random.NextDouble())))];

    /// <summary>What the kernel gives.</summary>
    public (DrawStatus Status, double[] Values, double[] Times) Evaluate(
        double[] draw, DrawWorkspace? workspace = null)
    {
        var status = Kernel!.Evaluate(workspace ?? Kernel.CreateWorkspace(), draw, found, times);
        return (status, [.. found], [.. times]);
    }

    /// <summary>Draws, and holds every reliable figure against the exact engine's.</summary>
    /// <returns>How many draws were reliable.</returns>
    public int AgreesOn(int draws, int seed, double allowed)
    {
        Assert.True(Kernel is not null, Reason);
        var random = new Random(seed);
        var workspace = Kernel.CreateWorkspace();
        var reliable = 0;
        for (var n = 0; n < draws; n++)
        {
            var draw = Draw(random);
            var (status, values, _) = Evaluate(draw, workspace);
            if (status == DrawStatus.Reliable)
            {
                Compare(draw, values, allowed);
                reliable++;
            }
        }

        return reliable;
    }

    /// <summary>Holds figures against the exact engine's, relative to what each is measured by.</summary>
    public void Compare(double[] draw, double[] values, double allowed)
    {
        var exact = StudySolver.At(
            Varied.At(draw).Value!, Figures, TestContext.Current.CancellationToken).Value!;
        for (var i = 0; i < Figures.Length; i++)
        {
            if (Kernel!.Unserved[i] is not null)
            {
                Assert.True(double.IsNaN(values[i]), $"{Figures[i].Name} is not served");
                continue;
            }

            if (exact.Values[i] is not { } value || !double.IsFinite(value))
            {
                Assert.Equal(exact.Values[i] ?? double.NaN, values[i]);
                continue;
            }

            var error = Math.Abs(values[i] - value);
            Assert.True(error <= allowed * Size(i, exact),
                $"{Figures[i].Name}: {values[i]:R} instead of {value:R}, off by {error / Size(i, exact):E1}");
        }
    }

    private double Size(int index, StudyPoint exact)
    {
        var figure = Figures[index];
        var own = Math.Abs(exact.Values[index]!.Value);
        return figure.Kind switch
        {
            StudyFigureKind.Margin when Varied.Circuit.Requirements[figure.Index].Bound is Limits l =>
                own + Math.Max(Math.Abs(l.Lower ?? 0), Math.Abs(l.Upper ?? 0)),
            StudyFigureKind.Maximum => Math.Max(own, Math.Abs(exact.Values[index + 1] ?? 0)),
            StudyFigureKind.Minimum => Math.Max(own, Math.Abs(exact.Values[index - 1] ?? 0)),
            _ => own,
        };
    }

    private static Outcome<SourceText> NoFile(string path) =>
        throw new InvalidOperationException($"no file is named here: {path}");
}
