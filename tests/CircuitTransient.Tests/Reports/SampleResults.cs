using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports;

/// <summary>Results made by formula, so that reports can be tested without an engine: a capacitor is charged
/// through a resistor and then rings against a choke.</summary>
internal static class SampleResults
{
    private static readonly TextSpan Nowhere = new(0, 0);

    /// <summary>A long study with a short inrush: a requirement broken and every list filled.</summary>
    public static TransientResult Inrush(
        string bus = "voltage of bus",
        string current = "current through Ls",
        string feed = "Supply",
        string charge = "Cbus initial charge",
        string contactor = "Kmain",
        string title = "Pre-charge and bypass")
    {
        var times = Times();
        var voltage = Observed(bus, "V", times, [feed, charge], [FeedVoltage, ChargeVoltage]);
        var inrush = Observed(current, "A", times, [feed, charge], [FeedCurrent, ChargeCurrent]);
        var since = new SinceEvent(
            $"{contactor} closes",
            1.8,
            [new("Supply", 4577), new($"Cbus charge when {contactor} closes", inrush.Max.Value - 4577)]);
        inrush = inrush with
        {
            After = new(since, null),
            Samples = [new(1e-3, 0, [0, 0]), new(2.5e-3, -0.0, [1.5, null])],
        };
        var circuit = CircuitOf(
            title, [(bus, "V", new VoltageBetween(3, 0)), (current, "A", new CurrentThrough(2))], current);
        var peak = inrush.Max;
        return Empty(circuit, 14) with
        {
            Causes = [new(feed, CauseKind.Source), new(charge, CauseKind.Stored)],
            Intervals =
            [
                new(0, 0.2, [], [new(-2.2e-3, 0, 1)], [], 0),
                new(0.2, 1.8, ["Kpre closes"], [new(-2.18, 0, 1), new(-3.1e5, 0, 2)], [], 0),
                new(1.8, 14, [$"{contactor} closes"], [new(0, 0, 1), new(-84.9, 992, 1)],
                    [new(1.8, "Resr", 1.2e-6, null, "a contact resistance makes it finite"),
                     new(6, "Ls", null, 0.02, null)], 2.5e-4),
            ],
            Events =
            [
                new(0.2, "Kpre", true, 792, 0, 0, 9.65, null),
                new(1.8, contactor, true, 26.36, 0, 0, null, "bounces are not modelled"),
            ],
            SampleTimes = times,
            Observations = [voltage, inrush],
            Figures = [new("rise time of voltage of bus", "s", 1.006, "10 to 90 % of the final value")],
            Requirements =
            [
                new($"voltage across Cbus at most 1.1 kV", null, "V", 19, true, new(952.2, 1.803), 147.8),
                new($"{current} at most 100 A from 1.8 s to 6 s", "making capacity", "A", 18, false,
                    new(peak.Value, peak.Time), 100 - peak.Value),
            ],
            Parts =
            [
                new("Rpre", "resistor", new(792, 0.2), new(9.65, 0.2), new(7640, 0.2), null, null, 1760, 21.5,
                    [new(2600, "J", 1760, 0.677, true)], null),
                new("Cbus", "capacitor", new(952.2, 1.803), new(null, 1.8), null, null, null, 2400, null,
                    [new(1100, "V", 952.2, 0.8656, true), new(20, "A", null, null, false)],
                    new(900, "V", 952.2, false, "the figure may be too low")),
                new("Ls", "inductor", null, new(129.5, 1.8015), null, null, null, 0, 63.6, [], null),
            ],
            SelfChecks =
            [
                new("sum of the causes against one solve", 3.1e-13, 1e-8, true),
                new("Kirchhoff's laws and the laws of the parts", 2e-14, 1e-9, true),
            ],
            NotJudged = [new("numerical inversion", "its own error estimate is 3e-5")],
            Warnings =
            [
                new(7, "node `x` is touched by one part only"),
                new(0, "a peak lies at the end of the study"),
            ],
            Cautions =
            [
                new(CautionSeverity.Note, "Cbus holds 2.4 kJ", "common practice, no source"),
                new(CautionSeverity.Danger, "Cbus stands at 930.6 V at the end of the study",
                    "common threshold, verify in IEC 60204-1"),
            ],
        };
    }

    /// <summary>Names that no format may trip over.</summary>
    public static TransientResult Awkward() => Inrush(
        bus: "bus, \"plus\" & <script>alert('1')</script>",
        current: "זרם הגל 電流 🚡 in a label that goes on and on and on, far past the edge of any terminal",
        feed: "=Feed,\"quoted\"",
        charge: "\u001b[31mred\u202e",
        contactor: "K—'main'",
        title: "</title><b>& \"x\"");

    /// <summary>A study of one interval in which nothing is required, switched or stored.</summary>
    public static TransientResult Bare()
    {
        ImmutableArray<double> times = [0, 1];
        var circuit = CircuitOf(null, [("voltage of a", "V", new VoltageBetween(1, 0))], null);
        return Empty(circuit with { StartsSettled = true }, 1) with
        {
            SampleTimes = times,
            Observations = [Observed("voltage of a", "V", times, ["Feed"], [_ => 5])],
        };
    }

    /// <summary>A result with nothing in it.</summary>
    public static TransientResult Empty(Circuit circuit, double until) => new(
        circuit, until, null, [], [new(0, until, [], [], [], 0)], [], [], [], [], [], [], [], [], [], []);

    /// <summary>An observation whose contributions are given as functions of time.</summary>
    public static ObservationResult Observed(
        string name, string unit, ImmutableArray<double> times, ImmutableArray<string> causes,
        ImmutableArray<Func<double, double>> waves)
    {
        ImmutableArray<ImmutableArray<double>> byCause =
            [.. waves.Select(wave => times.Select(wave).ToImmutableArray())];
        ImmutableArray<double> total = [.. times.Select((_, i) => byCause.Sum(wave => wave[i]))];
        var atMax = total.IndexOf(total.Max());
        var atMin = total.IndexOf(total.Min());
        return new(
            name, unit, total[0], total[^1], total[^1],
            new(total[atMax], times[atMax], InstantSide.At, total[atMax]),
            new(total[atMin], times[atMin], InstantSide.At, total[atMin]),
            false,
            [.. causes.Select((cause, i) => new Contribution(
                cause, byCause[i][atMax], byCause[i][atMin], At(byCause[i], times, byCause[i].Max()),
                At(byCause[i], times, byCause[i].Min()),
                new(total[atMax] - byCause[i][atMax], times[atMax]), null))],
            null, [], total, byCause);
    }

    private static TimedValue At(ImmutableArray<double> wave, ImmutableArray<double> times, double value) =>
        new(value, times[wave.IndexOf(value)]);

    private static Circuit CircuitOf(
        string? title,
        ImmutableArray<(string Name, string Unit, Measurand Quantity)> observed,
        string? required) => new(
        new SourceText("bullwheel-bus.cause", "resistor Rpre from b to bus : 82 Ω\n"),
        title,
        [],
        ["minus", "rail", "b", "bus"],
        [
            new Resistor(82) { Name = "Rpre", From = 2, To = 3, Span = Nowhere },
            new Capacitor(5.6e-3, 140) { Name = "Cbus", From = 3, To = 0, Span = Nowhere },
            new Inductor(180e-6, null) { Name = "Ls", From = 1, To = 2, Span = Nowhere },
        ],
        [],
        [],
        [.. observed.Select(o => new Observation(o.Name, o.Unit, o.Quantity, new(null, null), Nowhere))],
        required is null
            ? []
            : [
                new("voltage across Cbus at most 1.1 kV", null, "voltage across Cbus", "V",
                    new VoltageAcross(1), new Limits(null, 1100), new(null, null), Nowhere),
                new($"{required} at most 100 A", null, required, "A", new CurrentThrough(2),
                    new Limits(null, 100), new(null, null), Nowhere),
            ],
        false,
        null);

    private static ImmutableArray<double> Times() =>
    [
        .. Enumerable.Range(0, 100).Select(i => i * 0.002), 0.2,
        .. Enumerable.Range(0, 400).Select(i => 0.2 + (i * 0.004)), 1.8,
        .. Enumerable.Range(0, 600).Select(i => 1.8 + (i * 1e-4)),
        .. Enumerable.Range(0, 201).Select(i => 1.86 + (i * (14 - 1.86) / 200)),
    ];

    private static double FeedVoltage(double t) => t switch
    {
        < 0.2 => 0,
        < 1.8 => 932 * (1 - Math.Exp(-(t - 0.2) / 0.458)),
        _ => 932 - (28.3 * Ring(t)),
    };

    private static double ChargeVoltage(double t) => t switch
    {
        < 0.2 => 140,
        < 1.8 => 140 * Math.Exp(-(t - 0.2) / 0.458),
        _ => 4.26 * Ring(t),
    };

    private static double FeedCurrent(double t) => t switch
    {
        < 0.2 => 0,
        < 1.8 => 11.36 * Math.Exp(-(t - 0.2) / 0.458),
        _ => 171.2 * Swing(t),
    };

    private static double ChargeCurrent(double t) => t switch
    {
        < 0.2 => 0,
        < 1.8 => -1.71 * Math.Exp(-(t - 0.2) / 0.458),
        _ => -23.8 * Swing(t),
    };

    private static double Ring(double t) => Math.Exp(-84.9 * (t - 1.8)) * Math.Cos(992 * (t - 1.8));

    private static double Swing(double t) => Math.Exp(-84.9 * (t - 1.8)) * Math.Sin(992 * (t - 1.8));
}
