using System.Collections.Immutable;
using System.Numerics;
using System.Text;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Text;
using CsCheck;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Every finite pole is found and none is invented, on circuits of up to sixty parts drawn at
/// random.</summary>
public sealed class PoleCountTests
{
    private static readonly Gen<(int Nodes, uint[] Draws)> Drawing =
        Gen.Select(Gen.Int[2, 12], Gen.UInt.Array[20, 52]);

    /// <remarks>The order of complexity: the stores, less one for each loop of capacitors and voltage sources
    /// and each cut-set of coils and current sources (P. R. Bryant, "The order of complexity of electrical
    /// networks", Proceedings of the IEE 106 C, 1959, from memory).</remarks>
    [Fact]
    public void As_many_as_the_structure_of_a_network_without_dependent_sources_has() =>
        Drawing.OnEach(
            drawing =>
            {
                var circuit = Built(drawing.Nodes, drawing.Draws, kinds: 6);
                var poles = Poles(circuit);
                Assert.Equal(Order(circuit), poles.Count);
            },
            seed: "0000000000000", iter: 40);

    /// <remarks>Within a circle, a polynomial has as many zeros as its value turns about zero on it (the
    /// argument principle); det(s E + G) is taken from equations that the poles do not come from.</remarks>
    [Fact]
    public void As_many_within_circles_as_the_determinant_turns_on_them() =>
        Drawing.OnEach(
            drawing =>
            {
                var circuit = Built(drawing.Nodes, drawing.Draws, kinds: 12);
                var poles = Poles(circuit);
                var determinant = new Determinant(circuit);
                foreach (var radius in Gaps([.. poles.Select(p => p.Magnitude).Order()]))
                {
                    Assert.Equal(poles.Count(p => p.Magnitude < radius), determinant.TurnsAt(radius));
                }
            },
            seed: "0000000000000", iter: 20);

    private static List<Complex> Poles(Circuit circuit)
    {
        var layout = new NetworkLayout(circuit);
        ImmutableArray<bool> closed = [.. circuit.Parts.Select(p => p is Switch { StartsClosed: true })];
        var form = DescriptorReduction.Reduce(layout, NetworkEquations.Assemble(layout, closed), out _);
        var groups = PoleGroups.Of(new IntervalModel(form!, closed).Blocks);
        return
        [
            .. groups.SelectMany(g =>
                Enumerable.Repeat(g.Value, g.Multiplicity * (g.Value.Imaginary > 0 ? 2 : 1))),
        ];
    }

    /// <summary>Radii well away from every pole: the widest gaps, and one past the last.</summary>
    private static IEnumerable<double> Gaps(double[] magnitudes)
    {
        var finite = magnitudes.Where(m => m > 0).ToArray();
        return finite.Zip(finite.Skip(1), (a, b) => (Ratio: b / a, Radius: Math.Sqrt(a * b)))
            .Where(g => g.Ratio > 1.2).OrderByDescending(g => g.Ratio).Take(2).Select(g => g.Radius)
            .Append(3 * finite.LastOrDefault(1));
    }

    private static int Order(Circuit circuit)
    {
        var loops = new NodeSets(circuit.Nodes.Length);
        var count = 0;
        foreach (var part in circuit.Parts.Where(p => p is VoltageSource or Switch { StartsClosed: true }))
        {
            loops.Join(part.From, part.To);
        }

        // A capacitor that closes a loop of such adds no order.
        count += circuit.Parts.Where(p => p is Capacitor).Count(p => loops.Join(p.From, p.To));

        // A coil adds order where what is not a coil or a current source joins its ends, or other coils do.
        var rest = new NodeSets(circuit.Nodes.Length);
        foreach (var part in circuit.Parts.Where(p =>
            p is not (Inductor or CurrentSource or Switch { StartsClosed: false })))
        {
            rest.Join(part.From, part.To);
        }

        return count + circuit.Parts.Where(p => p is Inductor).Count(p => !rest.Join(p.From, p.To));
    }

    private static Circuit Built(int nodes, uint[] draws, int kinds)
    {
        var text = new StringBuilder("until 1 ms\nobserve voltage of n1\nsource Feed at n1 : 1 V\n");
        for (var k = 2; k <= nodes; k++)
        {
            text.AppendLine(draws[k % draws.Length] % 3 == 0
                ? $"inductor T{k} from n{k} to n{k - 1} : {k} mH\ncapacitor U{k} at n{k} : {k} µF"
                : $"resistor T{k} from n{k} to n{k - 1} : {10 * k} Ω");
        }

        for (var k = 0; k < draws.Length; k++)
        {
            var d = draws[k];
            var (a, b) = (1 + (int)(d % (uint)nodes), (int)(d / 100 % (uint)(nodes + 1)));
            if (a != b)
            {
                var kind = (int)(d / 10_000 % (uint)kinds);
                text.AppendLine(Part(k, $"n{a}", b == 0 ? "ground" : $"n{b}", kind, d));
            }
        }

        var circuit = TransientAnalysis.Check(
            new SourceText("drawn.cause", text.ToString()), _ => throw new InvalidOperationException());
        Assert.True(circuit.Succeeded, string.Join('\n', circuit.Diagnostics.Select(DiagnosticText.Render)));
        return circuit.Value;
    }

    private static string Part(int k, string a, string b, int kind, uint draw)
    {
        var size = 1 + (draw / 7 % 100);
        return kind switch
        {
            0 => $"resistor P{k} from {a} to {b} : {size} Ω",
            1 => $"capacitor P{k} from {a} to {b} : {size} nF",
            2 => $"inductor P{k} from {a} to {b} : {size} µH",
            3 => $"source P{k} from {a} to {b} : {size} mA",
            4 => $"switch P{k} from {a} to {b} : open",
            5 => $"source P{k} from {a} to x{k} : {size} V\nresistor Q{k} from x{k} to {b} : {size} Ω",
            6 => $"dependent source P{k} from {a} to {b} : {size} mS times voltage from n1 to {b}",
            7 => $"dependent source P{k} from {a} to x{k} : {size} times voltage of {b}\n"
                + $"capacitor Q{k} from x{k} to {b} : {size} µF",
            8 => $"dependent source P{k} from {a} to {b} : {size} times current through Feed",
            9 => $"dependent source P{k} from {a} to x{k} : {size} Ω times current through Feed\n"
                + $"inductor Q{k} from x{k} to {b} : {size} mH",
            10 =>
                $"transformer P{k} primary from {a} to x{k}, secondary from {b} to y{k} : turns {size} to 7\n"
                + $"resistor Q{k} from x{k} to {b} : 3 Ω\ncapacitor S{k} from y{k} to {a} : 2 µF",
            _ => $"inductor P{k} from {a} to x{k} : 1 mH\ninductor Q{k} from {b} to y{k} : {size} mH\n"
                + $"coupling K{k} of P{k} and Q{k} : 1\n"
                + $"resistor S{k} from x{k} to {b} : 2 Ω\nresistor V{k} from y{k} to {a} : 5 Ω",
        };
    }

    /// <summary>det(s E + G) of a circuit, as the self-checks write its equations.</summary>
    private sealed class Determinant
    {
        private readonly double[,] e;
        private readonly double[,] g;
        private readonly int size;

        public Determinant(Circuit circuit)
        {
            ImmutableArray<bool> closed = [.. circuit.Parts.Select(p => p is Switch { StartsClosed: true })];
            var equations =
                DescriptorEquations.Of(circuit, StorageLayout.Of(circuit), closed, resistorsAsBranches: true);
            size = equations.Unknowns.UnknownCount;
            (e, g) = (new double[size, size], new double[size, size]);
            foreach (var element in equations.StorageElements())
            {
                e[element.Row, element.Column] += element.Value.Hi;
            }

            foreach (var element in equations.Conductances)
            {
                g[element.Row, element.Column] += element.Value.Hi;
            }
        }

        /// <summary>How often it turns about zero while s goes once round the circle.</summary>
        public int TurnsAt(double radius)
        {
            // Conjugate points have conjugate values: the upper half of the circle tells all.
            var turned = Between(radius, 0, Math.PI, Phase(radius, 0), Phase(radius, Math.PI), 0);
            Assert.InRange(Math.Abs((turned / Math.PI) - Math.Round(turned / Math.PI)), 0, 1e-3);
            return (int)Math.Round(turned / Math.PI);
        }

        private double Between(double radius, double from, double to, double first, double last, int depth)
        {
            var middle = (from + to) / 2;
            var phase = Phase(radius, middle);
            var (a, b) = (Turn(first, phase), Turn(phase, last));
            return depth >= 6 && Math.Abs(a) < 0.7 && Math.Abs(b) < 0.7
                ? a + b
                : Between(radius, from, middle, first, phase, depth + 1)
                    + Between(radius, middle, to, phase, last, depth + 1);
        }

        private static double Turn(double from, double to) => Math.IEEERemainder(to - from, 2 * Math.PI);

        private double Phase(double radius, double angle)
        {
            var s = Complex.FromPolarCoordinates(radius, angle);
            var a = new Complex[size, size];
            for (var i = 0; i < size; i++)
            {
                double largest = 0;
                for (var j = 0; j < size; j++)
                {
                    a[i, j] = (s * e[i, j]) + g[i, j];
                    largest = Math.Max(largest, a[i, j].Magnitude);
                }

                for (var j = 0; j < size; j++)
                {
                    a[i, j] /= largest;
                }
            }

            return PhaseOf(a);
        }

        private double PhaseOf(Complex[,] a)
        {
            double phase = 0;
            for (var k = 0; k < size; k++)
            {
                var pivot = Enumerable.Range(k, size - k).MaxBy(i => a[i, k].Magnitude);
                for (var j = k; pivot != k && j < size; j++)
                {
                    (a[k, j], a[pivot, j]) = (a[pivot, j], a[k, j]);
                }

                phase += a[k, k].Phase + (pivot == k ? 0 : Math.PI);
                for (var i = k + 1; i < size; i++)
                {
                    var factor = a[i, k] / a[k, k];
                    for (var j = k + 1; factor != 0 && j < size; j++)
                    {
                        a[i, j] -= factor * a[k, j];
                    }
                }
            }

            return phase;
        }
    }
}
