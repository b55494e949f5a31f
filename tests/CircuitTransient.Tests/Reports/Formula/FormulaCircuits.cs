using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Reports.Formula;

/// <summary>Circuits whose closed forms must give their waveforms back: the plants, random networks, and
/// every nearness of poles to each other and to what drives them.</summary>
internal static class FormulaCircuits
{
    public static TheoryData<string, string> All =>
    [
        .. Plants.Select(p => (p, Repository.Read($"netlists/{p}.cause"))),
        .. Enumerable.Range(1, 4).Select(seed => ($"random {seed}", RandomNetwork.Draw(seed).Text())),
        .. Nearness.Select(d => ($"two poles {d} apart", Loop(200 * (1 + d)))),
        .. Nearness.Select(d => ($"two poles {-d} apart", Loop(200 * (1 - d)))),
        .. Nearness.Select(d => ($"three poles {d} apart", Stages(3, d))),
        .. Nearness.Select(d => ($"a pole {d} from a decay", Decay(1e-3 * (1 + d)))),
        .. Nearness.Select(d => ($"a tuned circuit {d} from its source", Tuned(1e3 * (1 + d)))),
        ("a ramp much shorter than the time constant", Slow("ramp of 5 V from 1 ms to 1.01 ms", "20 ms")),
        ("a study much shorter than the time constant", Slow("5 V", "1 ms")),
        ("a pulse train", Slow("pulse train of 5 V width 1 ms every 2 ms from 0 s count 4", "20 ms")),
        ("an integrator",
            "source J at a : ramp of 2 A from 1 ms to 3 ms\ncapacitor C at a : 1 mF\nuntil 5 ms"),
    ];

    public static string Loop(double resistance) =>
        $"""
        source E at s : step of 10 V
        resistor R from s to r : {resistance:R} Ω
        inductor L from r to c : 1 mH
        capacitor C from c to ground : 100 nF
        observe current through L
        until 50 µs
        """;

    private static readonly string[] Plants =
        ["bullwheel-bus", "cabin-dock", "caliper-deck", "bank-gallery", "intake-bay", "load-pin"];

    private static readonly double[] Nearness = [0, 1e-1, 1e-2, 1e-4, 1e-6, 1e-9, 1e-14];

    private static string Stages(int stages, double separation) => string.Join('\n',
    [
        "source E at b0 : step of 1 V",
        .. Enumerable.Range(1, stages).Select(k =>
            $"""
            resistor R{k} from b{k - 1} to n{k} : {1 + (k * separation):R} Ω
            capacitor C{k} from n{k} to ground : 1 F
            dependent source B{k} from b{k} to ground : 1 times voltage of n{k}
            """),
        $"resistor End from b{stages} to ground : 1 Ω",
        $"observe voltage of n{stages}",
        "until 5 s",
    ]);

    private static string Decay(double constant) =>
        $"""
        source E at a : decay of 5 V in {constant:R} s + sine of 1 V at 300 Hz
        resistor R from a to b : 1 kΩ
        capacitor C from b to ground : 1 µF
        observe voltage of b
        until 900 µs
        """;

    private static string Tuned(double frequency) =>
        $"""
        source E at a : sine of 1 V at {frequency:R} Hz
        inductor L from a to b : 25.330295910584442 mH
        capacitor C from b to ground : 1 µF
        observe voltage of b
        until 5 ms
        """;

    private static string Slow(string wave, string until) =>
        $"""
        source E at a : {wave}
        resistor R from a to b : 1 MΩ
        capacitor C from b to ground : 1 µF
        observe voltage of b
        observe current through R
        until {until}
        """;
}
