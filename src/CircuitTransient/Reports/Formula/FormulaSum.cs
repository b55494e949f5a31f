using System.Collections.Immutable;
using CircuitTransient.Measurements.ClosedForms;

namespace CircuitTransient.Reports.Formula;

/// <summary>A sum as it is printed: its terms, and what those left out may come to.</summary>
/// <param name="Terms">The terms printed.</param>
/// <param name="Printed">The same terms as computed.</param>
/// <param name="LeftOut">Bound of the sum of the terms left out; zero where none is.</param>
internal sealed record FormulaSum(
    ImmutableArray<FormulaTerm> Terms, ImmutableArray<ClosedTerm> Printed, double LeftOut)
{
    /// <summary>Chooses the terms worth printing and how.</summary>
    /// <param name="sum">The closed form.</param>
    /// <param name="stretch">The stretch it belongs to.</param>
    /// <param name="unit">Unit of the quantity.</param>
    /// <param name="digits">Significant digits of its largest part.</param>
    public static FormulaSum Of(ClosedSum sum, ClosedStretch stretch, string unit, int digits)
    {
        var relevant = stretch.Total!.Scale;
        if (relevant <= 1e-9 * stretch.ByCause.Select(c => c.Scale).DefaultIfEmpty(0).Max())
        {
            relevant = stretch.ByCause.Max(c => c.Scale); // the causes cancel: what is left is rounding
        }

        var allowed = 0.5 * Math.Pow(10, -digits) * relevant;
        double left = 0;
        var small = new HashSet<ClosedTerm>(ReferenceEqualityComparer.Instance);
        foreach (var term in sum.Terms.OrderBy(t => t.Bound))
        {
            if (left + term.Bound > allowed)
            {
                break;
            }

            left += term.Bound;
            small.Add(term);
        }

        ImmutableArray<ClosedTerm> printed = [.. sum.Terms.Where(t => !small.Contains(t))];
        var writing = new FormulaWriting(unit, digits, sum.Scale, stretch.Until - stretch.From);
        return new FormulaSum(writing.Terms(printed), printed, left);
    }
}
