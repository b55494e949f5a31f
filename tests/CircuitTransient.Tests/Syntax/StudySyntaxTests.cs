namespace CircuitTransient.Tests.Syntax;

/// <summary>What is asked of a circuit, as read.</summary>
public class StudySyntaxTests
{
    [Theory]
    [InlineData(
        "observe voltage of bus",
        "Observe(NodeVoltage(bus, -), -, Window(-, -))")]
    [InlineData(
        "observe voltage from bus to x as \"across the choke\"",
        "Observe(NodeVoltage(bus, x), 'across the choke', Window(-, -))")]
    [InlineData(
        "observe current through Ls as \"bypass inrush\" from 1.8 s to 6 s",
        "Observe(PartQuantity(CurrentThrough, Ls), 'bypass inrush', Window(TimeValue(1.8s), "
        + "TimeValue(6s)))")]
    [InlineData(
        "observe power delivered by Feed from when Kmain closes to 5 ms after Kmain closes",
        "Observe(PartQuantity(PowerDelivered, Feed), -, Window(TimeAfter(-, Kmain, True), "
        + "TimeAfter(0.005s, Kmain, True)))")]
    [InlineData(
        "observe I²t through Stage1/R[3]",
        "Observe(PartQuantity(JouleIntegral, Stage1/R[3]), -, Window(-, -))")]
    [InlineData(
        "observe I^2t through F1",
        "Observe(PartQuantity(JouleIntegral, F1), -, Window(-, -))")]
    [InlineData(
        "observe rate of change of voltage across Kmain",
        "Observe(Rate(PartQuantity(VoltageAcross, Kmain)), -, Window(-, -))")]
    [InlineData(
        "observe energy delivered by Feed",
        "Observe(PartQuantity(EnergyDelivered, Feed), -, Window(-, -))")]
    [InlineData(
        "require voltage of bus at most 1.1 kV because \"capacitor rating\"",
        "Require(NodeVoltage(bus, -), Limits(-, 1100V, False), Window(-, -), 'capacitor rating')")]
    [InlineData(
        "require current through Ls between -5 A and 200 A from 0 s to 2 s because \"making capacity\"",
        "Require(PartQuantity(CurrentThrough, Ls), Limits((-5A), 200A, False), Window(TimeValue(0s), "
        + "TimeValue(2s)), 'making capacity')")]
    [InlineData(
        "require voltage of bus at most 60 V from 5 s after Kmain opens",
        "Require(NodeVoltage(bus, -), Limits(-, 60V, False), Window(TimeAfter(5s, Kmain, False), -), "
        + "-)")]
    [InlineData(
        "require rate of change of voltage across Kmain at most 500 V/µs",
        "Require(Rate(PartQuantity(VoltageAcross, Kmain)), Limits(-, 500000000V/s, False), Window(-, "
        + "-), -)")]
    [InlineData(
        "require settling of voltage of bus to 540 V within 2 % by 600 ms",
        "Require(NodeVoltage(bus, -), Settling(540V, 0.02, TimeValue(0.6s)), Window(-, -), -)")]
    [InlineData(
        "require voltage of 3 at least 5 V in magnitude",
        "Require(NodeVoltage(3, -), Limits(5V, -, True), Window(-, -), -)")]
    [InlineData(
        "observe rise time of voltage of b",
        "Observe(Figure(RiseTime, NodeVoltage(b, -), -), -, Window(-, -))")]
    [InlineData(
        "observe front time of voltage of b",
        "Observe(Figure(FrontTime, NodeVoltage(b, -), -), -, Window(-, -))")]
    [InlineData(
        "observe time to half-value of current through L",
        "Observe(Figure(TimeToHalfValue, PartQuantity(CurrentThrough, L), -), -, Window(-, -))")]
    [InlineData(
        "observe overshoot of voltage of b",
        "Observe(Figure(Overshoot, NodeVoltage(b, -), -), -, Window(-, -))")]
    [InlineData(
        "observe settling time of voltage of b within 2 %",
        "Observe(Figure(SettlingTime, NodeVoltage(b, -), 0.02), -, Window(-, -))")]
    [InlineData(
        "observe ring frequency of voltage of b",
        "Observe(Figure(RingFrequency, NodeVoltage(b, -), -), -, Window(-, -))")]
    [InlineData(
        "observe time of peak of rate of change of voltage of b",
        "Observe(Figure(TimeOfPeak, Rate(NodeVoltage(b, -)), -), -, Window(-, -))")]
    [InlineData(
        "require time after which voltage of bus stays below 60 V at most 5 s",
        "Require(Figure(TimeStaysBelow, NodeVoltage(bus, -), 60V), Limits(-, 5s, False), Window(-, "
        + "-), -)")]
    [InlineData(
        "start as stated",
        "Start(False)")]
    [InlineData(
        "start settled",
        "Start(True)")]
    [InlineData(
        "until 14 s + 2 * T",
        "Until((14s + (2? * T)))")]
    [InlineData(
        "circuit \"Bullwheel bus: # no comment\"",
        "Title('Bullwheel bus: # no comment')")]
    [InlineData(
        "note \"x\"",
        "Note('x')")]
    [InlineData(
        "reference is minus",
        "Reference(minus)")]
    public void What_is_asked_is_read_with_its_window(string text, string expected) =>
        Assert.Equal(expected, Reading.Of(text));
}
