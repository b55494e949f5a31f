using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.ClosedForms;

/// <summary>From a segment's coefficients to terms that can be written down.</summary>
internal static class ClosedTerms
{
    private const double MostCancelling = 100; // plain exponentials may cancel to a hundredth, no further
    private const double Rounding = 1e-15; // what is left of two terms that cancel

    /// <summary>The terms of one sum. A block of poles is written in plain exponentials where these do not
    /// cancel; else, as the engine keeps it, in divided differences, which no distance harms.</summary>
    public static ImmutableArray<ClosedTerm> Of(Segment segment, double[] coefficients)
    {
        var sums = new TermSums(segment.Length);
        var basis = segment.Basis;
        var families = basis.Modes.Select((mode, m) => (Mode: mode, Index: m))
            .GroupBy(m => m.Mode.Block).OrderBy(g => g.Key);
        foreach (var family in families)
        {
            NewtonTerm[] newton =
            [
                .. family.SelectMany(m => NewtonTerms.Of(
                    m.Mode, carrier => basis.Coefficient(coefficients, m.Index, carrier), segment.Length))
                    .Where(t => !t.Amplitude.IsZero),
            ];
            NewtonTerm[] plain = [.. newton.SelectMany(Plain)];
            var isPlain = sums.SizeWith(plain, plain) <= MostCancelling * sums.SizeWith(newton, plain);
            sums.Add(isPlain ? plain : newton);
        }

        return sums.Finish();
    }

    private static IEnumerable<NewtonTerm> Plain(NewtonTerm term)
    {
        var poles = term.Nodes[..term.PoleCount];
        return PartialFractions.Of(term.Nodes).Select(share => new NewtonTerm(
            term.Amplitude * share.Residue,
            [.. Enumerable.Repeat(share.Pole, share.Power + 1)],
            Math.Min(poles.Count(p => p == share.Pole), share.Power + 1)));
    }

    /// <summary>Terms gathered by their rates.</summary>
    private sealed class TermSums(double length)
    {
        private readonly List<(ImmutableArray<Complex> Rates, NewtonTerm Term, double Size)> terms = [];

        public void Add(IEnumerable<NewtonTerm> more)
        {
            foreach (var term in more)
            {
                Add(term);
            }
        }

        /// <summary>The size of some terms, added to those of the sum that share a rate with
        /// others.</summary>
        public double SizeWith(NewtonTerm[] more, NewtonTerm[] others)
        {
            var together = new TermSums(length);
            together.Add(terms.Select(t => t.Term).Where(t => others.Any(o => o.Nodes[0] == t.Nodes[0])));
            together.Add(more);
            return together.terms.Sum(t => t.Term.Bound(length));
        }

        private void Add(NewtonTerm term)
        {
            if (term.Nodes[0].Im.IsNegative && term.Nodes.All(p => p == term.Nodes[0]))
            {
                term = term with
                {
                    Amplitude = term.Amplitude.Conjugate,
                    Nodes = [.. term.Nodes.Select(p => p.Conjugate)],
                };
            }

            ImmutableArray<Complex> rates = [.. term.Nodes.Select(p => PoleGroups.OnAxis((Complex)p))];
            var twin = terms.FindIndex(t => t.Rates.AsSpan().SequenceEqual(rates.AsSpan()));
            if (twin < 0)
            {
                terms.Add((rates, term, term.Amplitude.Magnitude));
                return;
            }

            var (_, known, size) = terms[twin];
            terms[twin] = (rates, known with
            {
                Amplitude = known.Amplitude + term.Amplitude,
                PoleCount = (known.PoleCount, term.PoleCount) switch
                {
                    var (a, b) when a == b => a,
                    var (a, b) when a + b == rates.Length => Math.Min(a, b) == 0 ? -1 : a,
                    _ => -1,
                },
            }, size + term.Amplitude.Magnitude);
        }

        public ImmutableArray<ClosedTerm> Finish() =>
        [
            .. terms.Where(t => t.Term.Amplitude.Magnitude > Rounding * t.Size)
                .Select(t => new ClosedTerm(
                    Amplitude(t.Term), t.Rates, Origin(t.Term), t.Term.Bound(length)))
                .OrderBy(t => t.Origin == TermOrigin.Network)
                .ThenByDescending(t => t.Rates[0].Real)
                .ThenBy(t => t.Rates[0].Imaginary),
        ];

        /// <summary>With real rates only the real part shows.</summary>
        private static Complex Amplitude(NewtonTerm term) =>
            term.Nodes.All(p => p.Im.IsZero) ? (double)term.Amplitude.Re : (Complex)term.Amplitude;

        private static TermOrigin Origin(NewtonTerm term) =>
            term.PoleCount == 0 ? TermOrigin.Source
            : term.PoleCount == term.Nodes.Length ? TermOrigin.Network
            : TermOrigin.Both;
    }
}
