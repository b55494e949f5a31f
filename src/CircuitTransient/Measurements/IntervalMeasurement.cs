using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Reports the intervals between switchings: poles, impulses, energy lost in them.</summary>
internal sealed class IntervalMeasurement(TransientSolution solution, StoredEnergy energy)
{
    /// <summary>One interval.</summary>
    public IntervalResult Measure(SolvedInterval interval)
    {
        var impulses = ImmutableArray.CreateBuilder<ImpulseResult>();
        double lost = 0;
        for (var s = interval.FirstSegment; s < interval.FirstSegment + interval.SegmentCount; s++)
        {
            var before = impulses.Count;
            foreach (var momentary in s == interval.FirstSegment ? interval.Momentary : [])
            {
                AddImpulses(impulses, momentary);
            }

            AddImpulses(impulses, solution.Segments[s]);
            if (impulses.Count > before)
            {
                lost += energy.LostAtStartOf(s);
            }
        }

        return new IntervalResult(
            interval.From,
            interval.Until,
            [.. interval.StartsWith.Select(Words)],
            [.. PoleGroups.Of(interval.Model.Blocks)
                .Select(p => new Pole(p.Value.Real, p.Value.Imaginary, p.Multiplicity))],
            impulses.ToImmutable(),
            lost);
    }

    /// <summary>A switching in words: <c>Kmain closes</c>.</summary>
    public string Words(Occurrence occurrence) =>
        $"{solution.Circuit.Parts[occurrence.Event.Part].Name} {(occurrence.Closes ? "closes" : "opens")}";

    private void AddImpulses(ImmutableArray<ImpulseResult>.Builder impulses, Segment segment)
    {
        var found = Enumerable.Range(0, solution.Circuit.Parts.Length)
            .Select(i => (Part: solution.Circuit.Parts[i], Charge: Impulse(segment, new CurrentThrough(i)),
                Flux: Impulse(segment, new VoltageAcross(i))))
            .Where(f => f.Charge is not null || f.Flux is not null).ToArray();
        var isExplained = found.Any(f =>
            f.Charge is not null && ImpulseRemedy.For(f.Part, isCharge: true) is not null);
        foreach (var (part, charge, flux) in found)
        {
            var isCharge = charge is not null;
            var remedy = ImpulseRemedy.For(part, isCharge)
                ?? (isExplained ? null : ImpulseRemedy.OfStore(part, isCharge));
            impulses.Add(new ImpulseResult(segment.Start, part.Name, charge, flux, remedy));
        }
    }

    private static double? Impulse(Segment segment, Measurand quantity)
    {
        if (!segment.Model.Project(quantity).Output.IsDetermined)
        {
            return null;
        }

        var impulse = segment.ImpulseAtStart(quantity);
        return impulse == 0 ? null : impulse;
    }
}
