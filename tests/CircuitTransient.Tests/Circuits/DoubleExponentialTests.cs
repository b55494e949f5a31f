using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Time constants of double exponentials from their front and half-value times.</summary>
public class DoubleExponentialTests
{
    // Computed with 40 digits (mpmath 1.3.0) for a front of 1.2 µs and a half-value time of 50 µs by
    // IEC 60060-1, printed to nine.
    [Fact]
    public void The_standard_lightning_impulse_has_its_known_time_constants()
    {
        var wave = DoubleExponential.Solve(1.2e-6, 50e-6, isVoltage: true)!;

        Assert.Equal(68.2169716e-6, wave.Tail, 5e-14);
        Assert.Equal(0.4050343e-6, wave.Front, 5e-14);
        Assert.Equal(1.0372522, wave.Factor, 5e-8);
    }

    // The rounded form 68.22/0.407 µs (IEEE C62.41, from memory) measures 1.19876222 and 49.9995702 µs,
    // computed with 40 digits (mpmath 1.3.0); the way back must give the same constants, to the digits of
    // those times.
    [Fact]
    public void Measured_times_of_a_known_wave_lead_back_to_it()
    {
        var wave = DoubleExponential.Solve(1.19876222e-6, 49.9995702e-6, isVoltage: true)!;

        Assert.Equal(68.22e-6, wave.Tail, 1e-12);
        Assert.Equal(1 / ((1 / 0.407e-6) + (1 / 68.22e-6)), wave.Front, 1e-14);
    }

    [Theory]
    [InlineData(1.2e-6, 50e-6, true)]
    [InlineData(250e-6, 2500e-6, true)]
    [InlineData(1, 3.5, true)]
    [InlineData(1, 1e6, true)]
    [InlineData(10e-6, 350e-6, false)]
    [InlineData(1, 3.9, false)]
    public void The_wave_has_the_times_asked_for(double front, double halfValue, bool isVoltage)
    {
        var wave = DoubleExponential.Solve(front, halfValue, isVoltage)!;
        double Level(double t) => wave.Factor * (Math.Exp(-t / wave.Tail) - Math.Exp(-t / wave.Front));
        var crestTime = Math.Log(wave.Tail / wave.Front) * wave.Tail * wave.Front / (wave.Tail - wave.Front);
        double Crossing(double below, double above, double level)
        {
            for (var i = 0; i < 200; i++)
            {
                var middle = (below + above) / 2;
                (below, above) = Level(middle) < level ? (middle, above) : (below, middle);
            }

            return below;
        }

        var (low, share) = isVoltage ? (0.3, 0.6) : (0.1, 0.8);
        var first = Crossing(0, crestTime, low);
        var measured = (Crossing(0, crestTime, 0.9) - first) / share;
        var origin = first - (low * measured);
        var half = Crossing(crestTime + (100 * wave.Tail), crestTime, 0.5) - origin;

        // The plain difference of exponentials measured here cancels by up to the factor, hence its share.
        var allowed = 1e-13 * Math.Max(1, wave.Factor);
        Assert.Equal(1, Level(crestTime), allowed);
        Assert.Equal(1, measured / front, 10 * allowed);
        Assert.Equal(1, half / halfValue, 10 * allowed);
    }

    // Wu 2014, doi 10.1109/TEMC.2013.2296573 (seen quoted): the width between half values is at least 4.29
    // times the rise from 10 to 90 %; the limit t·e^(−t) computed with 40 digits (mpmath 1.3.0) gives
    // 2.44638603703/0.570120042987.
    [Fact]
    public void The_limit_is_the_critically_damped_wave()
    {
        var limit = new DoubleExponential.Shape(1e-8);

        var rise = limit.OnFront(0.9) - limit.OnFront(0.1);
        var width = limit.OnTail(0.5) - limit.OnFront(0.5);

        Assert.Equal(0.570120042987, rise, 1e-8);
        Assert.Equal(2.44638603703, width, 3e-8);
        Assert.Equal(4.29100163575, width / rise, 1e-10);
    }

    [Fact]
    public void A_ratio_below_the_limit_has_no_wave()
    {
        Assert.Null(DoubleExponential.Solve(8e-6, 20e-6, isVoltage: true));
        Assert.Null(DoubleExponential.Solve(1, DoubleExponential.LeastRatio(true), isVoltage: true));
        Assert.NotNull(
            DoubleExponential.Solve(1, DoubleExponential.LeastRatio(true) * 1.0001, isVoltage: true));
    }
}
