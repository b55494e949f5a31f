using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Scans;

/// <summary>Where over a scan a part stays in the range its value is good for.</summary>
/// <param name="Part">The part.</param>
/// <param name="Limit">What it is stated to be linear up to.</param>
/// <param name="Unit">The limit's unit: V or A.</param>
/// <param name="Scan">The used fraction of that range: of one scanned value with the stretches over which it
/// is kept, of two by the points alone.</param>
public sealed record LinearScan(string Part, double Limit, string Unit, FigureScan Scan);

/// <summary>The parts of a circuit whose values are good for a stated range only.</summary>
internal sealed class LinearRanges(Circuit circuit)
{
    private readonly ImmutableArray<int> parts =
        [.. Enumerable.Range(0, circuit.Parts.Length).Where(p => circuit.Parts[p].LinearUpTo is not null)];

    /// <summary>How many there are.</summary>
    public int Count => parts.Length;

    /// <summary>The fraction of each range that a solution uses; infinite where an impulse passes.</summary>
    public ImmutableArray<double> Used(TransientSolution solution)
    {
        if (parts.IsEmpty)
        {
            return [];
        }

        var curves = new CurveBuilder(solution);
        var extremes = new ObservedExtremes(new Infinities(curves));
        return [.. parts.Select(part => Used(solution, curves, extremes, part))];
    }

    /// <summary>One range along one scanned value.</summary>
    /// <param name="index">Its index.</param>
    /// <param name="samples">What is used at the points.</param>
    /// <param name="used">What is used anywhere.</param>
    public LinearScan Along(
        int index, ImmutableArray<SlopedSample> samples, Func<double, SlopedSample> used) => Of(
            index,
            new AxisScan(circuit, Figure(index), used, samples.Max(s => s.HasValue ? Math.Abs(s.Y) : 0))
                .Run(samples, _ => null));

    /// <summary>One range over two scanned values, by the points.</summary>
    public LinearScan Over(int index, ImmutableArray<ScanPoint> points)
    {
        var solved = points.Where(p => p.Found is not null).ToArray();
        var most = solved.MaxBy(p => p.LinearUsed[index]);
        var place = most is null
            ? null
            : new ScanPlace(most.At, most.LinearUsed[index], null, RangeExtremeKind.Compared);
        return Of(index, new FigureScan(
            Figure(index), place, null, [], [], [], solved.All(p => p.LinearUsed[index] <= 1)));
    }

    private LinearScan Of(int index, FigureScan scan)
    {
        var part = circuit.Parts[parts[index]];
        return new LinearScan(
            part.Name, part.LinearUpTo!.Limit, part.LinearUpTo.IsVoltage ? "V" : "A", scan);
    }

    private StudyFigure Figure(int index) => new(
        $"linear range of {circuit.Parts[parts[index]].Name}", "", StudyFigureKind.RatingUsed, parts[index]);

    private static double Used(
        TransientSolution solution, CurveBuilder curves, ObservedExtremes extremes, int part)
    {
        var limit = solution.Circuit.Parts[part].LinearUpTo!;
        Measurand quantity = limit.IsVoltage ? new VoltageAcross(part) : new CurrentThrough(part);
        if (curves.Of(quantity) is not { } total)
        {
            return double.PositiveInfinity;
        }

        var (max, min) = extremes.Of(quantity, total, (0, solution.Until));
        return Math.Max(Magnitude(max.Value), Magnitude(min.Value)) / limit.Limit;

        static double Magnitude(double? value) => Math.Abs(value ?? double.PositiveInfinity);
    }
}
