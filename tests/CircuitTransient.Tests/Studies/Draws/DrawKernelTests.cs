using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Studies.Draws;

/// <summary>The fast evaluation gives what the exact engine gives, or says that it does not.</summary>
public sealed class DrawKernelTests
{
    // what draws promise is 1e-6; what is reached leaves room for another seed
    private const double Reached = 1e-10;

    public static TheoryData<string> Plants =>
        [.. Repository.Files.Where(f => f.StartsWith("netlists/", StringComparison.Ordinal)
            && f.EndsWith(".cause", StringComparison.Ordinal))];

    [Theory]
    [MemberData(nameof(Plants))]
    public void A_plant_drawn_from_its_tolerances_agrees_with_the_exact_engine(string path)
    {
        var drawn = DrawnText.Of(Repository.Read(path));

        Assert.Equal(4, drawn.AgreesOn(4, seed: 7, Reached));
    }

    [Fact]
    public void The_same_values_give_the_same_bits_whatever_was_drawn_before()
    {
        var drawn = DrawnText.Of(Repository.Read("netlists/bullwheel-bus.cause"));
        var random = new Random(3);
        var workspace = drawn.Kernel!.CreateWorkspace();
        for (var n = 0; n < 20; n++)
        {
            var draw = drawn.Draw(random);
            var (fresh, used) = (drawn.Evaluate(draw), drawn.Evaluate(draw, workspace));

            Assert.Equal(fresh.Values.Select(BitConverter.DoubleToInt64Bits),
                used.Values.Select(BitConverter.DoubleToInt64Bits));
            Assert.Equal(fresh.Times.Select(BitConverter.DoubleToInt64Bits),
                used.Times.Select(BitConverter.DoubleToInt64Bits));
        }
    }
}
