using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>A varied form at one draw's values, taken apart into modes: with σ = Δ y fed back, S = Δ (1 −
/// D_yσ Δ)⁻¹, A = A₀ + Bσ S C_y and everything else likewise; then ζ′ = Λ ζ + W u. A conjugate pair a ± i b
/// stands as two real coordinates, of which q = ζ₁ − i ζ₂ has q′ = (a + i b) q. Sources that reach z through
/// u′ are moved to u by z̃ = z − B₁ u.</summary>
internal sealed partial class ClosedForm
{
    private readonly RealEigensystem eigen;
    private readonly double[] delta;
    private readonly double[] loop;
    private readonly double[] right;
    private readonly double[] fed;
    private readonly double[] a;
    private readonly double[] b;
    private readonly double[] b1;
    private readonly double[] bStores;
    private readonly double[] c;
    private readonly double[] inverse;
    private readonly double[] square;
    private readonly bool hasRates;

    public ClosedForm(VariedForm form)
    {
        Form = form;
        var (n, m, u, x, r) = (form.Order, form.Instruments, form.Sources, form.Stores, form.Rows);
        eigen = new RealEigensystem(n);
        delta = new double[m * m];
        loop = new double[m * m];
        right = new double[m * (n + u + u + x)];
        fed = new double[m * (n + u + u + x)];
        a = new double[n * n];
        b = new double[n * u];
        b1 = new double[n * u];
        bStores = new double[n * x];
        c = new double[r * n];
        inverse = new double[n * n];
        square = new double[n * n];
        Inputs = new double[n * u];
        Stores = new double[n * x];
        Rows = new double[r * n];
        Direct = new double[r * u];
        Rates = new double[r * u];
        Impulses = new double[r * x];
        PoleErrors = new double[n];
        Conditions = new double[n];
        hasRates = form.Followed.Rates.Any(d => d != 0);
    }

    /// <summary>The form.</summary>
    public VariedForm Form { get; }

    /// <summary>Real parts of the poles.</summary>
    public ReadOnlySpan<double> PoleReal => eigen.Real;

    /// <summary>Imaginary parts of the poles.</summary>
    public ReadOnlySpan<double> PoleImaginary => eigen.Imaginary;

    /// <summary>W: Order × Sources.</summary>
    public double[] Inputs { get; }

    /// <summary>What stored quantities set ζ to: Order × Stores.</summary>
    public double[] Stores { get; }

    /// <summary>The rows on ζ: Rows × Order.</summary>
    public double[] Rows { get; }

    /// <summary>The rows on u.</summary>
    public double[] Direct { get; }

    /// <summary>The rows on u′.</summary>
    public double[] Rates { get; }

    /// <summary>The impulses that stored quantities set in the rows.</summary>
    public double[] Impulses { get; }

    /// <summary>A bound of every pole's rounding error, 1/s.</summary>
    public double[] PoleErrors { get; }

    /// <summary>How many times rounding is amplified in every mode's share.</summary>
    public double[] Conditions { get; }

    /// <summary>Where Δ is to be put, row by row.</summary>
    public Span<double> Deviations => delta;

    /// <summary>Closes the loop and finds the modes.</summary>
    /// <returns>False where there are none to be found.</returns>
    public bool Close() => FeedBack() && eigen.Solve(a, Form.Order) && Transform();

    /// <summary>Whether any source moves a mode: what only rounding leaves of W does not.</summary>
    public bool IsDriven(int mode)
    {
        const double rounding = 1e-12; // of the sum's terms; an undriven mode is so by structure
        const double noise = 1e-14; // of the left vector's largest entry
        var (n, u) = (Form.Order, Form.Sources);
        double largest = 0;
        for (var i = 0; i < n; i++)
        {
            largest = Math.Max(largest, Math.Abs(inverse[(mode * n) + i]));
        }

        for (var s = 0; s < u; s++)
        {
            double size = 0;
            for (var i = 0; i < n; i++)
            {
                size += Math.Max(Math.Abs(inverse[(mode * n) + i]), noise * largest)
                    * Math.Abs(b[(i * u) + s]);
            }

            if (Math.Abs(Inputs[(mode * u) + s]) > rounding * size)
            {
                return true;
            }
        }

        return false;
    }

    private bool FeedBack()
    {
        var (n, m, u, x, r) = (Form.Order, Form.Instruments, Form.Sources, Form.Stores, Form.Rows);
        var width = n + u + u + x;
        for (var i = 0; i < m; i++)
        {
            for (var j = 0; j < m; j++)
            {
                double sum = i == j ? 1 : 0;
                for (var k = 0; k < m; k++)
                {
                    sum -= Form.Followed.Instruments[(i * m) + k] * delta[(k * m) + j];
                }

                loop[(i * m) + j] = sum;
            }

            var row = right.AsSpan(i * width, width);
            Form.Followed.State.AsSpan(i * n, n).CopyTo(row);
            Form.Followed.Direct.AsSpan(i * u, u).CopyTo(row[n..]);
            Form.Followed.Rates.AsSpan(i * u, u).CopyTo(row[(n + u)..]);
            Form.Followed.Stores.AsSpan(i * x, x).CopyTo(row[(n + u + u)..]);
        }

        if (!RealElimination.Solve(loop, m, right, width))
        {
            return false;
        }

        Multiply(delta, right, m, m, width, fed);
        Add(Form.A, Form.BInstruments, n, 0, n, a);
        Add(Form.B, Form.BInstruments, n, n, u, b);
        Add(Form.BStores, Form.BInstruments, n, n + u + u, x, bStores);
        Add(Form.Outputs.State, Form.Outputs.Instruments, r, 0, n, c);
        Add(Form.Outputs.Direct, Form.Outputs.Instruments, r, n, u, Direct);
        Add(Form.Outputs.Rates, Form.Outputs.Instruments, r, n + u, u, Rates);
        Add(Form.Outputs.Stores, Form.Outputs.Instruments, r, n + u + u, x, Impulses);
        if (hasRates)
        {
            b1.AsSpan().Clear();
            Add(b1, Form.BInstruments, n, n + u, u, b1);
            MultiplyAdd(a, b1, n, n, u, b);
            MultiplyAdd(c, b1, r, n, u, Direct);
        }

        return true;
    }

    /// <summary>result = matrix + instruments · (a part of the columns of S …).</summary>
    private void Add(double[] matrix, double[] instruments, int rows, int first, int columns, double[] result)
    {
        var m = Form.Instruments;
        var width = Form.Order + Form.Sources + Form.Sources + Form.Stores;
        for (var i = 0; i < rows; i++)
        {
            var row = result.AsSpan(i * columns, columns);
            matrix.AsSpan(i * columns, columns).CopyTo(row);
            for (var k = 0; k < m; k++)
            {
                var f = instruments[(i * m) + k];
                if (f == 0)
                {
                    continue;
                }

                var added = fed.AsSpan((k * width) + first, columns);
                for (var j = 0; j < row.Length; j++)
                {
                    row[j] += f * added[j];
                }
            }
        }
    }

    private bool Transform()
    {
        var (n, u, x, r) = (Form.Order, Form.Sources, Form.Stores, Form.Rows);
        inverse.AsSpan().Clear();
        for (var i = 0; i < n; i++)
        {
            inverse[(i * n) + i] = 1;
        }

        eigen.Vectors.CopyTo(square);
        if (!RealElimination.Solve(square, n, inverse, n))
        {
            return false;
        }

        Multiply(inverse, b, n, n, u, Inputs);
        Multiply(inverse, bStores, n, n, x, Stores);
        eigen.Vectors.CopyTo(square);
        Multiply(c, square, r, n, n, Rows);
        BoundErrors();
        return true;
    }

    /// <summary>|P⁻¹| |A| |P| on the diagonal, in rounding, bounds what rounding of A does to each pole; the
    /// lengths of its left and right vector what rounding does to its share.</summary>
    private void BoundErrors()
    {
        const double rounding = 4 * 1.1e-16; // a handful of operations an entry
        var n = Form.Order;
        var vectors = eigen.Vectors;
        for (var k = 0; k < n; k++)
        {
            double sum = 0, left = 0;
            for (var i = 0; i < n; i++)
            {
                double row = 0;
                for (var j = 0; j < n; j++)
                {
                    row += Math.Abs(a[(i * n) + j] * vectors[(j * n) + k]);
                }

                sum += Math.Abs(inverse[(k * n) + i]) * row;
                left += inverse[(k * n) + i] * inverse[(k * n) + i];
            }

            PoleErrors[k] = rounding * sum;
            Conditions[k] = Math.Sqrt(left);
        }
    }

    /// <summary>C = A B.</summary>
    private static void Multiply(
        ReadOnlySpan<double> left, ReadOnlySpan<double> factor, int rows, int inner, int columns,
        Span<double> product)
    {
        product[..(rows * columns)].Clear();
        MultiplyAdd(left, factor, rows, inner, columns, product);
    }

    private static void MultiplyAdd(
        ReadOnlySpan<double> left, ReadOnlySpan<double> factor, int rows, int inner, int columns,
        Span<double> product)
    {
        for (var i = 0; i < rows; i++)
        {
            var row = product.Slice(i * columns, columns);
            for (var k = 0; k < inner; k++)
            {
                var f = left[(i * inner) + k];
                if (f == 0)
                {
                    continue;
                }

                var added = factor.Slice(k * columns, columns);
                for (var j = 0; j < row.Length; j++)
                {
                    row[j] += f * added[j];
                }
            }
        }
    }
}
