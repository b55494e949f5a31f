namespace CircuitTransient.Circuits;

/// <summary>The difference of two exponentials Peak·k·(e^(−t/τ1) − e^(−t/τ2)) of given front and half-value
/// times.</summary>
/// <param name="Tail">τ1, the longer time constant, in seconds.</param>
/// <param name="Front">τ2, the shorter one, in seconds.</param>
/// <param name="Factor">k, which makes the crest 1.</param>
public sealed record DoubleExponential(double Tail, double Front, double Factor)
{
    // a front a thousand million times shorter than the tail is a step
    internal const double LongestRatio = 1e9;

    /// <summary>Solves for the time constants, or gives null where no double exponential has that
    /// ratio.</summary>
    /// <param name="front">Front time in seconds: (t90 − t30)/0.6 of a voltage (IEC 60060-1, seen quoted),
    /// 1.25 (t90 − t10) of a current (IEC 62475, from memory).</param>
    /// <param name="halfValue">Time from the virtual origin to half the crest on the tail, in
    /// seconds.</param>
    /// <param name="isVoltage">Whether the wave is a voltage.</param>
    public static DoubleExponential? Solve(double front, double halfValue, bool isVoltage)
    {
        var wanted = halfValue / front;
        if (!(wanted > LeastRatio(isVoltage)) || wanted > LongestRatio)
        {
            return null;
        }

        // y = ln(τ1/τ2): the ratio of the times grows with it, so halving always closes in.
        double low = 1e-8, high = Math.Log(10 * LongestRatio);
        for (var i = 0; i < 200; i++)
        {
            var middle = low + ((high - low) / 2);
            if (middle <= low || middle >= high)
            {
                break;
            }

            (low, high) = new Shape(middle).Ratio(isVoltage) < wanted ? (middle, high) : (low, middle);
        }

        var shape = new Shape(low);
        var unit = front / shape.FrontTime(isVoltage);
        return new DoubleExponential(unit * Math.Exp(low), unit, 1 / shape.CrestDifference);
    }

    /// <summary>The least ratio of half-value time to front time: that of the limit t·e^(−t).</summary>
    public static double LeastRatio(bool isVoltage) => new Shape(1e-8).Ratio(isVoltage);

    /// <summary>The shape with τ2 = 1 and τ1 = e^y. Written with sinh, whose value stays exact where the two
    /// exponentials nearly cancel: e^(−ρt) − e^(−t) = 2 e^(−mt) sinh(δt), m = (1+ρ)/2, δ = (1−ρ)/2, ρ =
    /// 1/τ1.</summary>
    internal readonly struct Shape
    {
        private readonly double ratio;
        private readonly double mean;
        private readonly double half;
        private readonly double crestTime;
        private readonly double crest;

        public Shape(double y)
        {
            ratio = Math.Exp(-y);
            mean = (1 + ratio) / 2;
            half = ratio * Math.Exp(y / 2) * Math.Sinh(y / 2); // (1 − ρ)/2 without cancellation
            crestTime = y / (2 * half);
            crest = Level(crestTime);
        }

        /// <summary>The difference of the two exponentials at its crest.</summary>
        public double CrestDifference => crest;

        public double FrontTime(bool isVoltage) => isVoltage
            ? (OnFront(0.9) - OnFront(0.3)) / 0.6
            : 1.25 * (OnFront(0.9) - OnFront(0.1));

        public double Ratio(bool isVoltage)
        {
            var front = FrontTime(isVoltage);
            var origin = isVoltage ? OnFront(0.3) - (0.3 * front) : OnFront(0.1) - (0.1 * front);
            return (OnTail(0.5) - origin) / front;
        }

        /// <summary>Where the front passes a fraction of the crest.</summary>
        public double OnFront(double fraction) => Crossing(0, crestTime, fraction);

        /// <summary>Where the tail passes a fraction of the crest.</summary>
        public double OnTail(double fraction)
        {
            var far = 2 * crestTime;
            while (Level(far) > fraction * crest)
            {
                far *= 2;
            }

            return Crossing(far, crestTime, fraction);
        }

        private double Level(double t)
        {
            // 2 e^(−mt) sinh(δt), without overflow at large t where sinh is half an exponential.
            var x = half * t;
            return x < 20 ? 2 * Math.Exp(-mean * t) * Math.Sinh(x) : Math.Exp(-ratio * t);
        }

        private double Crossing(double below, double above, double fraction)
        {
            for (var i = 0; i < 200; i++)
            {
                var middle = below + ((above - below) / 2);
                if (middle == below || middle == above)
                {
                    break;
                }

                (below, above) = Level(middle) < fraction * crest ? (middle, above) : (below, middle);
            }

            return below;
        }
    }
}
