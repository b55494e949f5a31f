namespace CircuitTransient.Tests.Syntax;

/// <summary>Parts as read.</summary>
public class PartSyntaxTests
{
    [Theory]
    [InlineData(
        "resistor Rpre from b to bus : 82 Ω ±10 %, rated 2.6 kJ",
        "SimplePart(Resistor, Rpre, Terminals(b, bus), Tolerated(82Ω, Tolerance((-0.1), 0.1, False, "
        + "False)), [Rated(2600J)])")]
    [InlineData(
        "capacitor Cbus from q to minus : 5.6 mF ±20 %, charged to 140 V, rated 1.1 kV, "
        + "linear up to 1 kV",
        "SimplePart(Capacitor, Cbus, Terminals(q, minus), Tolerated(0.0056F, Tolerance((-0.2), 0.2, "
        + "False, False)), [ChargedTo(140V), Rated(1100V), LinearUpTo(1000V)])")]
    [InlineData(
        "inductor Ls from rail to a : 180 µH +-15 %, carrying 2 A +/-5 % normal, rated 200 A",
        "SimplePart(Inductor, Ls, Terminals(rail, a), Tolerated(0.00018H, Tolerance((-0.15), 0.15, "
        + "False, False)), [Carrying(Tolerated(2A, Tolerance((-0.05), 0.05, False, True))), "
        + "Rated(200A)])")]
    [InlineData(
        "coupling M1 of Lp and Ls : 0.98",
        "Coupling(M1, Lp, Ls, 0.98?)")]
    [InlineData(
        "coupling M1 of Lp and Ls : 3 mH -10 % +20 %",
        "Coupling(M1, Lp, Ls, Tolerated(0.003H, Tolerance((-0.1), 0.2, False, False)))")]
    [InlineData(
        "transformer T1 primary from p to minus, secondary from s to t : turns 10 to 1",
        "Transformer(T1, Terminals(p, minus), Terminals(s, t), 10?, 1?, [])")]
    [InlineData(
        "dependent source Amp from out to minus : 10 times voltage from a to b",
        "DependentSource(Amp, Terminals(out, minus), 10?, NodeVoltage(a, b), [])")]
    [InlineData(
        "dependent source Sense from c to d : 50 Ω times current through R3",
        "DependentSource(Sense, Terminals(c, d), 50Ω, PartQuantity(CurrentThrough, R3), [])")]
    [InlineData(
        "switch Kmain from b to bus : open, closes at 1.8 s, opens at 6 s",
        "Switch(Kmain, Terminals(b, bus), False, [SwitchEvent(True, AtInstant(TimeValue(1.8s)), -), "
        + "SwitchEvent(False, AtInstant(TimeValue(6s)), -)])")]
    [InlineData(
        "switch Q1 from src to line : closed, closed resistance 20 µΩ, "
        + "opens at 10 ms at next current zero",
        "Switch(Q1, Terminals(src, line), True, [ClosedResistance(2E-05Ω), SwitchEvent(False, "
        + "AtInstant(TimeValue(0.01s)), Cut(-))])")]
    [InlineData(
        "switch Q2 from s to l : closed, open resistance 10 MΩ, "
        + "opens at 10 ms once its current is at most 4 A",
        "Switch(Q2, Terminals(s, l), True, [OpenResistance(10000000Ω), SwitchEvent(False, "
        + "AtInstant(TimeValue(0.01s)), Cut(4A))])")]
    [InlineData(
        "switch K from a to b : open, closes at 50 ms after Kmain opens, opens when K2 closes",
        "Switch(K, Terminals(a, b), False, [SwitchEvent(True, AtInstant(TimeAfter(0.05s, Kmain, "
        + "False)), -), SwitchEvent(False, AtInstant(TimeAfter(-, K2, True)), -)])")]
    [InlineData(
        "switch K from a to b : open, closes when voltage of bus rises above 840 V, "
        + "opens when current through F1 falls below 1 A in magnitude after 5 ms",
        "Switch(K, Terminals(a, b), False, [SwitchEvent(True, WhenCrosses(NodeVoltage(bus, -), True, "
        + "840V, False, -), -), SwitchEvent(False, WhenCrosses(PartQuantity(CurrentThrough, F1), "
        + "False, 1A, True, TimeValue(0.005s)), -)])")]
    [InlineData(
        "switch K from a to b : open, "
        + "closes when current through F1 falls below 1 A after 2 ms after K2 opens",
        "Switch(K, Terminals(a, b), False, [SwitchEvent(True, "
        + "WhenCrosses(PartQuantity(CurrentThrough, F1), False, 1A, False, TimeAfter(0.002s, K2, "
        + "False)), -)])")]
    [InlineData(
        "resistor R from 0 to 1 : 4k7",
        "SimplePart(Resistor, R, Terminals(0, 1), 4700?4k7, [])")]
    [InlineData(
        "resistor R from 0 to \"DC+\" : R047 ±1 %",
        "SimplePart(Resistor, R, Terminals(0, \"DC+\"), Tolerated(0.047?R047, Tolerance((-0.01), 0.01, "
        + "False, False)), [])")]
    [InlineData(
        "capacitor C at \"a b\" : 47p",
        "SimplePart(Capacitor, C, Terminals(\"a b\", -), 4.7E-11?47p, [])")]
    [InlineData(
        "resistor R from Stage1/x to \"S 2\"/y : 1 kΩ",
        "SimplePart(Resistor, R, Terminals(Stage1/x, \"S 2\"/y), 1000Ω, [])")]
    public void A_part_is_read_with_all_its_clauses(string text, string expected) =>
        Assert.Equal(expected, Reading.Of(text));
}
