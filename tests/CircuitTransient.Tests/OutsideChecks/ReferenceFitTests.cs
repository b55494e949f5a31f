using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.OutsideChecks;

public class ReferenceFitTests
{
    // The certified figures have eleven digits; the data, not the method, limit what double precision
    // reaches: the sets are as ill-conditioned as NIST found them (Lanczos3 most, 1e4 in its columns).
    private const double CertifiedDigits = 1e-9;

    public static TheoryData<string, int> Starts()
    {
        var data = new TheoryData<string, int>();
        foreach (var set in All.Keys)
        {
            data.Add(set, 0);
            data.Add(set, 1);
        }

        return data;
    }

    [Theory]
    [MemberData(nameof(Starts))]
    public void The_certified_values_and_deviations_are_reached_from_both_starts(string name, int start)
    {
        var set = All[name];

        var fit = LeastSquares.Minimise(set.Starts[start], b => Linearise(set, b))!;

        Assert.True(fit.Converged);
        Assert.Equal(1, fit.Cost / set.SquareSum, CertifiedDigits);
        var inverse = TriangleSolver.InverseProduct(fit.Triangle)!;
        var variance = fit.Cost / (set.X.Length - set.Certified.Length);
        for (var j = 0; j < set.Certified.Length; j++)
        {
            Assert.Equal(1, fit.X[j] / set.Certified[j], CertifiedDigits);
            Assert.Equal(1, Math.Sqrt(variance * inverse[j, j]) / set.Deviations[j], CertifiedDigits);
        }
    }

    private static Dictionary<string, ReferenceFit> All { get; } =
        new[]
        {
            ReferenceFits.Misra1a, ReferenceFits.Lanczos3, ReferenceFits.Mgh09, ReferenceFits.Mgh10,
            ReferenceFits.Thurber,
        }.ToDictionary(set => set.Name, StringComparer.Ordinal);

    private static RowTriangle Linearise(ReferenceFit set, double[] b)
    {
        var triangle = new RowTriangle(b.Length);
        for (var i = 0; i < set.X.Length; i++)
        {
            var (value, slopes) = set.Model(set.X[i], b);
            triangle.Add(slopes, value - set.Y[i]);
        }

        return triangle.Reduced();
    }
}
