using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Measurements.ClosedForms;

namespace CircuitTransient.Reports.Formula;

/// <summary>Turns closed terms into printed ones.</summary>
/// <param name="unit">Unit of the quantity.</param>
/// <param name="digits">Significant digits of the quantity's largest part.</param>
/// <param name="scale">The quantity's largest magnitude.</param>
/// <param name="length">Length of the stretch in seconds.</param>
internal sealed class FormulaWriting(string unit, int digits, double scale, double length)
{
    private const int MostDigits = 17;

    /// <summary>The printed terms: equal rates share a polynomial, two poles side by side a pair.</summary>
    public ImmutableArray<FormulaTerm> Terms(ImmutableArray<ClosedTerm> terms)
    {
        var result = ImmutableArray.CreateBuilder<FormulaTerm>();
        var rest = terms.ToList();
        while (rest is [var first, ..])
        {
            var rates = first.Rates;
            ClosedTerm[] group = rates.All(r => r == rates[0])
                ? [.. rest.Where(t => t.Rates.All(r => r == rates[0]))]
                : [first];
            var partner = rest.Find(t => IsPair(t.Rates)
                && (ReferenceEquals(t, first) || (group.Length == 1 && t.Rates[0] == rates[0])));
            if (IsApproach(rates))
            {
                result.Add(Approach(first));
            }
            else if (partner is not null)
            {
                var single = rest.Find(t => t.Rates is [var only] && only == partner.Rates[0]);
                group = single is null ? [partner] : [single, partner];
                result.AddRange(Pair(single, partner));
            }
            else
            {
                result.AddRange(group.Length == 1 && rates.Any(r => r != rates[0])
                    ? [Divided(first)]
                    : Repeated(group));
            }

            rest.RemoveAll(group.Contains);
        }

        return result.ToImmutable();
    }

    /// <summary>A real pole beside a constant source.</summary>
    private static bool IsApproach(ImmutableArray<Complex> rates) =>
        rates is [{ Imaginary: 0, Real: not 0 }, { Imaginary: 0, Real: 0 }];

    private static bool IsPair(ImmutableArray<Complex> rates) =>
        rates.Length == 2 && rates[0] != rates[1] && !IsApproach(rates)
        && (rates.All(r => r.Imaginary == 0) || rates[0].Real == rates[1].Real || IsConjugate(rates));

    /// <summary>Conjugates to their last digits, which rounding may part.</summary>
    private static bool IsConjugate(ImmutableArray<Complex> rates) =>
        (rates[0] - Complex.Conjugate(rates[1])).Magnitude <= 1e-14 * rates[0].Magnitude;

    /// <summary>Terms of one rate: (A + B·τ + …)·e^(p τ), or one cosine for each power of τ.</summary>
    private IEnumerable<FormulaTerm> Repeated(ClosedTerm[] group)
    {
        var rate = group[0].Rates[0];
        var coefficients = group.OrderBy(t => t.Rates.Length)
            .Select(t => (Power: t.Rates.Length - 1, Value: t.Amplitude / Factorial(t.Rates.Length - 1),
                t.Bound)).ToArray();
        if (rate.Imaginary == 0)
        {
            var numbers = coefficients
                .Select(c => (c.Power, Number(c.Value.Real, c.Power, Extra(c.Bound)))).ToArray();
            return rate.Real == 0
                ? numbers.Select(n => new FormulaTerm([n], []))
                : [new FormulaTerm(
                    [.. numbers], [.. Exponential(rate.Real, coefficients.Max(c => Extra(c.Bound)))])];
        }

        return coefficients.Select(c => Oscillation(c.Value, c.Power, rate, Extra(c.Bound)));
    }

    /// <summary>Two rates m ± d: e^(m τ)·(A·cosh(d τ) + B·sinh(d τ)/d), exact however small d is; with d
    /// imaginary cosine and sine, a beat where m oscillates too.</summary>
    private IEnumerable<FormulaTerm> Pair(ClosedTerm? single, ClosedTerm difference)
    {
        var (p, q) = (difference.Rates[0], difference.Rates[1]);
        var middle = (p + q) / 2;
        var half = (p - q) / 2;
        var distance = half.Magnitude;
        var extra = Extra(Math.Max(single?.Bound ?? 0, difference.Bound));
        var even = single?.Amplitude ?? Complex.Zero;
        var odd = difference.Amplitude + (even * half);
        var isReal = p.Imaginary == 0;
        foreach (var (weight, isSine) in new[] { (even, false), (odd / distance, true) })
        {
            if (weight == Complex.Zero)
            {
                continue;
            }

            var carrier = isReal || IsConjugate(difference.Rates)
                ? new FormulaTerm([(0, Number(weight.Real, 0, extra))], [.. Exponential(middle.Real, extra)])
                : Oscillation(weight, 0, middle, extra);
            yield return carrier with { Factors = [.. carrier.Factors, Of(isSine)] };
        }

        FormulaFactor Of(bool isSine) => isReal
            ? new HyperbolicFactor(new(1 / distance, "s", Digits(extra)), isSine)
            : new OscillationFactor(
                new(distance / double.Tau, "Hz", RateDigits(distance, middle.Real, extra)), 0, 0, isSine);
    }

    private FormulaTerm Approach(ClosedTerm term)
    {
        var rate = term.Rates[0].Real;
        var extra = Extra(term.Bound);
        return new(
            [(0, Number(term.Amplitude.Real / Math.Abs(rate), 0, extra))],
            [new ApproachFactor(new(1 / Math.Abs(rate), "s", Digits(extra)), rate > 0)]);
    }

    private FormulaTerm Divided(ClosedTerm term)
    {
        var extra = Extra(term.Bound);
        var isReal = term.Rates.All(r => r.Imaginary == 0);
        var degrees = isReal ? 0 : double.RadiansToDegrees(term.Amplitude.Phase);
        var amplitude = isReal ? term.Amplitude.Real : term.Amplitude.Magnitude;
        if (Math.Abs(degrees) > 90)
        {
            (degrees, amplitude) = (degrees > 0 ? degrees - 180 : degrees + 180, -amplitude);
        }

        var decimals = Math.Clamp(digits + extra - 2, 0, 15);
        var fastest = term.Rates.MaxBy(r => Math.Abs(r.Imaginary));
        return new(
            [(0, Number(amplitude, term.Rates.Length - 1, extra))],
            [new DividedFactor(Math.Round(degrees, decimals), decimals, term.Rates,
                RateDigits(fastest.Imaginary, fastest.Real, extra))]);
    }

    private FormulaTerm Oscillation(Complex amplitude, int power, Complex rate, int extra)
    {
        var decimals = Math.Clamp(digits + extra - 2, 0, 15); // half a unit is some 10^-digits of a radian
        var degrees = double.RadiansToDegrees(amplitude.Phase);
        var size = amplitude.Magnitude;
        var isSine = Math.Abs(degrees) is > 45 and < 135;
        if (isSine)
        {
            size = degrees > 0 ? -size : size; // cos(x + 90°) = -sin x
            degrees -= degrees > 0 ? 90 : -90;
        }
        else if (Math.Abs(degrees) >= 135)
        {
            size = -size;
            degrees -= degrees > 0 ? 180 : -180;
        }

        var frequency = new FormulaNumber(
            rate.Imaginary / double.Tau, "Hz", RateDigits(rate.Imaginary, rate.Real, extra));
        return new(
            [(power, Number(size, power, extra))],
            [
                .. Exponential(rate.Real, extra),
                new OscillationFactor(frequency, Math.Round(degrees, decimals), decimals, isSine),
            ]);
    }

    private IEnumerable<FormulaFactor> Exponential(double rate, int extra) => rate == 0
        ? []
        : [new ExponentialFactor(
            new(1 / Math.Abs(rate), "s", Digits(extra + (rate > 0 ? Excess(rate * length) : 0))), rate > 0)];

    private FormulaNumber Number(double value, int power, int extra)
    {
        var isRate = unit.EndsWith("/s", StringComparison.Ordinal);
        var seconds = power + (isRate ? 1 : 0);
        var quantity = isRate ? unit[..^2] : unit;
        return new(value, seconds switch
        {
            0 => quantity,
            1 => quantity + "/s",
            _ => $"{quantity}/s{FormulaText.Superscript(seconds)}",
        }, Digits(extra));
    }

    /// <summary>Digits of a frequency, so that the phase stays right while the term lasts.</summary>
    private int RateDigits(double angular, double real, int extra)
    {
        var lasting = real < 0 ? Math.Min(length, 1 / -real) : length;
        return Digits(extra + Excess(Math.Abs(angular) * lasting));
    }

    /// <summary>Digits a term needs beyond the usual because it cancels against another.</summary>
    private int Extra(double bound) => scale > 0 ? Excess(bound / scale) : 0;

    private int Digits(int extra) => Math.Min(MostDigits, digits + extra);

    private static int Excess(double ratio) =>
        ratio > 2 ? (int)Math.Ceiling(Math.Log10(Math.Min(ratio, 1e15) / 2)) : 0;

    private static double Factorial(int n) => n <= 1 ? 1 : n * Factorial(n - 1);
}
