using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using MathNet.Numerics.LinearAlgebra;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Finds what records determine where they leave single values open: products of small whole powers
/// of the values, a capacitance taken together with the known ones beside it.</summary>
internal static class DeterminedProducts
{
    private const int HighestPower = 2;
    private const int MostValues = 6; // more make too many products to look through
    private const double WellDetermined = 0.05; // relative
    private const double MuchBetter = 0.25; // than the best of the values it is made of

    // Products are judged as if every value were known to a factor of two: over larger distances a product of
    // powers is no longer what stays.
    private static readonly double Known = Math.Log(2);

    /// <summary>The simplest ones that are determined far better than their factors, none that follows from
    /// those before.</summary>
    /// <param name="circuit">The circuit as the file has it.</param>
    /// <param name="values">The fitted values.</param>
    /// <param name="system">The linearised system at the fit.</param>
    /// <param name="variance">The variance of a residual.</param>
    /// <param name="own">How many unknowns stand before the values.</param>
    public static ImmutableArray<DeterminedProduct> Find(
        Circuit circuit, ImmutableArray<FittedValue> values, RowTriangle system, double variance, int own)
    {
        if (values.Length > MostValues || Held(system, variance, own) is not { } covariance)
        {
            return [];
        }

        var factors = values.Select(v => FactorOf(circuit, values, v)).ToArray();
        var found = new List<(int[] Powers, double Error)>();
        foreach (var powers in PowersOf(values.Length))
        {
            var vector = Vector<double>.Build.Dense(values.Length, i => powers[i] * factors[i].Weight);
            var error = Math.Sqrt(Math.Max(0, vector * covariance * vector));
            var best = Enumerable.Range(0, values.Length).Where(i => powers[i] != 0)
                .Min(i => Math.Sqrt(covariance[i, i]));
            if (error <= WellDetermined && error <= MuchBetter * best)
            {
                found.Add((powers, error));
            }
        }

        var chosen = new List<(int[] Powers, double Error)>();
        foreach (var candidate in found.OrderBy(f => f.Powers.Sum(Math.Abs)).ThenBy(f => f.Error))
        {
            var rows = chosen.Append(candidate).Select(c => Array.ConvertAll(c.Powers, p => (double)p));
            if (Matrix<double>.Build.DenseOfRows(rows).Rank() == chosen.Count + 1)
            {
                chosen.Add(candidate);
            }
        }

        return
        [
            .. chosen.Select(c => new DeterminedProduct(
                Words(factors, c.Powers),
                factors.Select((f, i) => Math.Pow(f.Value, c.Powers[i])).Aggregate((a, b) => a * b),
                c.Error)),
        ];
    }

    private static Matrix<double>? Held(RowTriangle system, double variance, int own)
    {
        var n = system.Columns;
        var held = new RowTriangle(n);
        var row = new double[n];
        var weight = 1 / Math.Sqrt(Math.Max(variance, double.Epsilon));
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                row[j] = weight * system[i, j];
            }

            held.Add(row, 0);
        }

        for (var i = own; i < n; i++)
        {
            Array.Clear(row);
            row[i] = 1 / Known;
            held.Add(row, 0);
        }

        return TriangleSolver.InverseProduct(held.Reduced()) is { } inverse
            ? Matrix<double>.Build.Dense(n - own, n - own, (i, j) => inverse[own + i, own + j])
            : null;
    }

    /// <summary>A value as it stands in a product: a capacitance between two nodes counts with the known ones
    /// between the same two.</summary>
    private static Factor FactorOf(Circuit circuit, ImmutableArray<FittedValue> values, FittedValue value)
    {
        var alone = new Factor(value.Name, Math.Abs(value.Value), 1);
        if (circuit.Parts.FirstOrDefault(p => p.Name == value.Name) is not Capacitor own)
        {
            return alone;
        }

        var beside = circuit.Parts.OfType<Capacitor>().Where(c => !values.Any(v => v.Name == c.Name)
            && ((c.From == own.From && c.To == own.To) || (c.From == own.To && c.To == own.From))).ToArray();
        var total = value.Value + beside.Sum(c => c.Capacitance.Nominal);
        return beside.Length is 0 or > 3 ? alone
            : new Factor(
                $"({string.Join(" + ", beside.Select(c => c.Name).Prepend(value.Name))})", total,
                value.Value / total);
    }

    /// <summary>Every vector of whole powers with two or three that are not zero, the first
    /// positive.</summary>
    private static IEnumerable<int[]> PowersOf(int count)
    {
        var powers = new int[count];
        Array.Fill(powers, -HighestPower);
        while (true)
        {
            var used = powers.Count(p => p != 0);
            if (used is 2 or 3 && powers.First(p => p != 0) > 0 && powers.Any(p => Math.Abs(p) == 1))
            {
                yield return (int[])powers.Clone();
            }

            var i = 0;
            while (i < count && ++powers[i] > HighestPower)
            {
                powers[i++] = -HighestPower;
            }

            if (i == count)
            {
                yield break;
            }
        }
    }

    private static string Words(Factor[] factors, int[] powers)
    {
        string Product(int sign) => string.Join('·', factors.Index()
            .Where(f => Math.Sign(powers[f.Index]) == sign)
            .Select(f => Math.Abs(powers[f.Index]) == 1 ? f.Item.Name : $"{f.Item.Name}²"));

        var below = Product(-1);
        return below.Length == 0 ? Product(1)
            : $"{Product(1)}/{(below.Contains('·', StringComparison.Ordinal) ? $"({below})" : below)}";
    }

    /// <param name="Name">How it is written.</param>
    /// <param name="Value">In SI.</param>
    /// <param name="Weight">How its logarithm goes with that of the value.</param>
    private sealed record Factor(string Name, double Value, double Weight);
}
