using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using MathNet.Numerics.LinearAlgebra;

namespace CircuitTransient.Studies.Overlays;

/// <summary>What a fit is worth: standard errors, correlations, and what is determined where single values
/// are not.</summary>
internal static class FitDescription
{

    /// <summary>Describes a fit.</summary>
    /// <param name="circuit">The circuit as the file has it.</param>
    /// <param name="values">What varied.</param>
    /// <param name="at">The fitted values.</param>
    /// <param name="fit">The fit.</param>
    /// <param name="own">How many unknowns stand before the values.</param>
    /// <param name="steps">How often the circuits were solved.</param>
    /// <param name="records">How many records there are.</param>
    public static FitResult Of(
        Circuit circuit, ImmutableArray<VariedValue> values, double[] at, LeastSquaresResult fit, int own,
        int steps, int records)
    {
        var n = values.Length;
        var freedom = Math.Max(1, fit.Triangle.RowCount - fit.X.Length);
        var variance = fit.Triangle.Remainder / freedom;
        var covariance = Matrix<double>.Build.Dense(n, n);
        var inverse = TriangleSolver.HeldInverseProduct(fit.Triangle);
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                covariance[i, j] = variance * inverse[own + i, own + j];
            }
        }

        var errors = Enumerable.Range(0, n).Select(i => Math.Sqrt(covariance[i, i])).ToArray();
        var sizes = covariance.Evd(Symmetricity.Symmetric).EigenValues.Select(v => v.Real).ToArray();
        var fitted = values.Select((v, i) => new FittedValue(v.Name, v.Unit, v.Nominal, at[i], errors[i]))
            .ToImmutableArray();
        return new FitResult(
            fitted,
            [.. Enumerable.Range(0, n).Select(i => Enumerable.Range(0, n)
                .Select(j => i == j ? 1 : covariance[i, j] / (errors[i] * errors[j])).ToImmutableArray())],
            Math.Sqrt(sizes.Max() / Math.Max(sizes.Min(), double.Epsilon)), steps, fit.Converged,
            fitted.All(v => v.IsResolved) ? []
                : DeterminedProducts.Find(circuit, fitted, fit.Triangle, variance, own), records);
    }
}
