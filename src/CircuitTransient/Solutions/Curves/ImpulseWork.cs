using CircuitTransient.Circuits;

namespace CircuitTransient.Solutions.Curves;

/// <summary>The energy a part takes in within an impulse: a charge times the voltage it passes, a flux times
/// the current. A source's is the one just after, as in the energy lost; any other part's the mean of before
/// and after.</summary>
internal sealed class ImpulseWork(TransientSolution solution)
{
    /// <summary>Joules at a segment's start: the impulse of one cause at the level of another.</summary>
    public double Of(int part, int segment, int impulseOf, int levelOf)
    {
        var (voltage, current) = (new VoltageAcross(part), new CurrentThrough(part));
        var at = solution.Segments[segment];
        if (at.Coefficients(voltage) is null || at.Coefficients(current) is null)
        {
            return 0;
        }

        var charge = at.ImpulseAtStart(current, impulseOf);
        var flux = at.ImpulseAtStart(voltage, impulseOf);
        return (charge == 0 ? 0 : charge * Level(voltage, part, segment, levelOf))
            + (flux == 0 ? 0 : flux * Level(current, part, segment, levelOf));
    }

    /// <summary>Joules of a share: as with products, a joint part is left when every cause's own is taken
    /// away.</summary>
    public double Of(int part, int segment, Share share, int cause)
    {
        const int total = Segment.Total;
        var whole = Of(part, segment, total, total);
        return share switch
        {
            Share.Total => whole,
            Share.Own => Of(part, segment, cause, cause),
            Share.Without => whole - Of(part, segment, total, cause) - Of(part, segment, cause, total)
                + Of(part, segment, cause, cause),
            _ => whole - Enumerable.Range(0, solution.Causes.Length).Sum(c => Of(part, segment, c, c)),
        };
    }

    private double Level(Measurand quantity, int part, int segment, int cause)
    {
        var after = (double)solution.Segments[segment].ValueAtStart(quantity, cause);
        if (solution.Circuit.Parts[part] is VoltageSource or CurrentSource or DependentSource)
        {
            return after;
        }

        var earlier = segment == 0 ? null : solution.Segments[segment - 1];
        var before =
            earlier?.Coefficients(quantity) is null ? 0 : (double)earlier.ValueAtEnd(quantity, cause);
        return (before + after) / 2;
    }
}
