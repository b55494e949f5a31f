using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Figures;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Text;

namespace CircuitTransient.Studies;

/// <summary>Solves a circuit for a study's figures alone, with the exact engine: no waveforms, no
/// contributions, no self-checks.</summary>
public static class StudySolver
{
    /// <summary>Solves and measures.</summary>
    /// <param name="circuit">The circuit, with the values of one point.</param>
    /// <param name="figures">The figures wanted.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The figures, or why some interval has no unique solution.</returns>
    public static Outcome<StudyPoint> At(
        Circuit circuit, ImmutableArray<StudyFigure> figures, CancellationToken cancellation = default)
    {
        var solved = TransientSolver.Solve(circuit, CauseList.FromStart(circuit), cancellation);
        return solved.Succeeded
            ? new(Read(solved.Value, figures, cancellation), solved.Diagnostics)
            : new(null, solved.Diagnostics);
    }

    /// <summary>Measures a solution.</summary>
    /// <param name="solution">The solution.</param>
    /// <param name="figures">The figures wanted.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static StudyPoint Read(
        TransientSolution solution, ImmutableArray<StudyFigure> figures,
        CancellationToken cancellation = default) =>
        new FigureReader(solution).Read(figures, cancellation);

    private sealed class FigureReader
    {
        private readonly TransientSolution solution;
        private readonly CurveBuilder curves;
        private readonly WindowTimes times;
        private readonly ObservedExtremes extremes;
        private readonly FigureMeasurement reading;
        private readonly RequirementMeasurement judging;
        private readonly PartStresses stresses;
        private readonly Dictionary<int, double[,]> grams = [];
        private readonly Dictionary<int, (Extreme Max, Extreme Min)?> observed = [];
        private readonly Dictionary<int, PartResult> parts = [];

        public FigureReader(TransientSolution solution)
        {
            this.solution = solution;
            curves = new CurveBuilder(solution);
            times = new WindowTimes(solution);
            var infinities = new Infinities(curves);
            extremes = new ObservedExtremes(infinities);
            reading = new FigureMeasurement(curves, times, infinities);
            judging = new RequirementMeasurement(curves, times, infinities, reading);
            stresses = new PartStresses(curves, infinities, Gram);
        }

        public StudyPoint Read(ImmutableArray<StudyFigure> figures, CancellationToken cancellation)
        {
            var values = ImmutableArray.CreateBuilder<double?>(figures.Length);
            var instants = ImmutableArray.CreateBuilder<double?>(figures.Length);
            foreach (var figure in figures)
            {
                cancellation.ThrowIfCancellationRequested();
                var (value, time) = Read(figure);
                values.Add(value);
                instants.Add(time);
            }

            return new StudyPoint(values.MoveToImmutable(), instants.MoveToImmutable());
        }

        private (double? Value, double? Time) Read(StudyFigure figure)
        {
            switch (figure.Kind)
            {
                case StudyFigureKind.Maximum or StudyFigureKind.Minimum:
                    var both = Extremes(figure.Index);
                    var extreme = figure.Kind == StudyFigureKind.Maximum ? both?.Max : both?.Min;
                    return (extreme?.Value, extreme?.Time);
                case StudyFigureKind.Reading:
                    var observation = solution.Circuit.Observations[figure.Index];
                    var read = reading.Read((Figure)observation.Quantity, observation.Window);
                    return (read?.Value, read?.Time);
                case StudyFigureKind.Margin:
                    var verdict = judging.Judge(solution.Circuit.Requirements[figure.Index]);
                    return (verdict.Margin ?? (verdict.IsJudged ? double.NegativeInfinity : null),
                        verdict.Worst.Time);
                case StudyFigureKind.RatingUsed:
                    return Used(figure);
                default:
                    throw new System.Diagnostics.UnreachableException($"no reading of {figure.Kind}");
            }
        }

        private (Extreme Max, Extreme Min)? Extremes(int index)
        {
            if (!observed.TryGetValue(index, out var found))
            {
                var observation = solution.Circuit.Observations[index];
                var window = times.Of(observation.Window);
                var from = CurveBuilder.GatheredFrom(observation.Quantity, window?.From ?? 0);
                found = window is { } open && curves.Of(observation.Quantity, from: from) is { } total
                    ? extremes.Of(observation.Quantity, total, open)
                    : null;
                observed.Add(index, found);
            }

            return found;
        }

        private (double? Value, double? Time) Used(StudyFigure figure)
        {
            if (!parts.TryGetValue(figure.Index, out var part))
            {
                parts.Add(figure.Index, part = stresses.Measure(figure.Index));
            }

            if (figure.Rating < 0)
            {
                var linear = part.LinearUpTo!;
                return (linear.Reached / linear.Declared,
                    linear.Unit == "V" ? part.PeakVoltage?.Time : part.PeakCurrent?.Time);
            }

            var time = solution.Circuit.Parts[figure.Index].Ratings[figure.Rating].Kind switch
            {
                RatingKind.PeakVoltage => part.PeakVoltage?.Time,
                RatingKind.PeakCurrent => part.PeakCurrent?.Time,
                RatingKind.VoltageRate => part.PeakVoltageRate?.Time,
                RatingKind.CurrentRate => part.PeakCurrentRate?.Time,
                _ => null,
            };
            return (part.Ratings[figure.Rating].Used, time);
        }

        private double[,] Gram(int segment)
        {
            if (!grams.TryGetValue(segment, out var gram))
            {
                grams.Add(segment, gram = GramIntegral.Of(solution.Segments[segment]));
            }

            return gram;
        }
    }
}
