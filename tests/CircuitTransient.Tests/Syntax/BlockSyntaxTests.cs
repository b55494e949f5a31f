namespace CircuitTransient.Tests.Syntax;

/// <summary>Named values, repetitions and assemblies as read.</summary>
public class BlockSyntaxTests
{
    [Theory]
    [InlineData(
        "value Rdamp : 2.2 Ω ±1 %",
        "Value(Rdamp, Tolerated(2.2Ω, Tolerance((-0.01), 0.01, False, False)))")]
    [InlineData(
        "value Z : sqrt(Lcable/Cin) * 2^-3^2 - -pi",
        "Value(Z, ((sqrt((Lcable / Cin)) * (2? ^ (-(3? ^ 2?)))) - (-pi)))")]
    [InlineData(
        "value Q : ((1 + 2) * 3 Ω)",
        "Value(Q, ((1? + 2?) * 3Ω))")]
    [InlineData(
        "repeat 40 as k\nresistor R[k] from n[k] to n[k+1] : k * 1 Ω\nend",
        "Repeat(40?, 'k', [SimplePart(Resistor, R[k+0], Terminals(n[k+0], n[k+1]), (k * 1Ω), [])])")]
    [InlineData(
        "assembly filter with terminals in, out, 3\nresistor R1 from in to out : 1 Ω\nend",
        "Assembly(filter, [in, out, 3], [SimplePart(Resistor, R1, Terminals(in, out), 1Ω, [])])")]
    [InlineData(
        "place filter as Stage1 with in = a, out = b[k], ret = Stage2/x, Rdamp = 3 Ω ±1 %",
        "Place(filter, Stage1, [Assignment(in, a, a), Assignment(out, b[k+0], b[k+0]), "
        + "Assignment(ret, Stage2/x, (Stage2 / x)), Assignment(Rdamp, -, Tolerated(3Ω, "
        + "Tolerance((-0.01), 0.01, False, False)))])")]
    public void Values_and_blocks_are_read_as_written(string text, string expected) =>
        Assert.Equal(expected, Reading.Of(text));
}
