namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>The series circuit of 200 Ω, 1 mH and 100 nF at 10 V: no eigenvectors at its double
/// pole.</summary>
/// <remarks>Mathematics, computed (C); the peak is V/(L·a·e).</remarks>
public sealed class DoublePoleTests
{
    [Fact]
    public void Its_current_is_that_of_the_confluent_form()
    {
        var solved = Series(200);
        Close.To(9.048374180359596e-3, solved.Sample("current through L", 0));
        Close.To(30.32653298563167e-3, solved.Sample("current through L", 1));
        Close.To(36.78794411714423e-3, solved.Sample("current through L", 2));
        Close.To(3.368973499542734e-3, solved.Sample("current through L", 3));
    }

    [Fact]
    public void Its_current_peaks_at_the_time_constant()
    {
        var wave = Series(200)["current through L"];
        Close.To(36.78794411714423e-3, wave.Max.Value!.Value);
        Close.To(10e-6, wave.Max.Time, Close.Instant);
    }

    [Fact]
    public void Its_pole_is_shown_as_double()
    {
        var pole = Assert.Single(Series(200).Poles());
        Assert.Equal(2, pole.Multiplicity);
        Close.To(-1e5, pole.Re);
    }

    [Theory]
    [InlineData(1e-9)]
    [InlineData(-1e-9)]
    public void A_billionth_beside_it_no_digit_is_lost(double detuning)
    {
        var solved = Series(200 * (1 + detuning));
        foreach (var (i, time) in new[] { 1.0, 5, 10, 50 }.Index())
        {
            Close.To(Current(time, detuning), solved.Sample("current through L", i));
        }
    }

    // i = V/L · t · e^(−αt) · sinh(δt)/(δt) with α = a(1+d), δ² = a²(2d + d²): three terms of the series do,
    // for δt is at most 2.2e-4.
    private static double Current(double microseconds, double detuning)
    {
        var t = microseconds / 10; // in units of 1/a
        var square = ((2 * detuning) + (detuning * detuning)) * t * t;
        var quotient = 1 + (square / 6) + (square * square / 120);
        return 0.1 * t * Math.Exp(-t * (1 + detuning)) * quotient;
    }

    private static SolvedText Series(double resistance) => SolvedText.Of(
        $"""
        source E at s : step of 10 V
        resistor R from s to r : {resistance:R} Ω
        inductor L from r to c : 1 mH
        capacitor C from c to ground : 100 nF
        observe current through L
        until 100 µs
        """,
        1e-6, 5e-6, 10e-6, 50e-6);
}
