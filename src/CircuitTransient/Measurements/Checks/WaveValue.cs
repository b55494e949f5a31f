using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.Checks;

/// <summary>A source's wave evaluated straight from its pieces.</summary>
internal static class WaveValue
{
    /// <summary>The value at an instant; at a step the one after it, or before it.</summary>
    public static double At(Wave wave, double time, bool before)
    {
        double sum = 0;
        foreach (var piece in wave.Pieces)
        {
            var isOn = before ? piece.Start < time && time <= piece.End : piece.Start <= time
                && time < piece.End;
            if (isOn)
            {
                var tau = time - piece.Start;
                sum += (piece.Amplitude + (piece.Slope * tau)) * Math.Exp(-piece.DecayRate * tau)
                    * Math.Cos((piece.AngularFrequency * tau) + piece.Phase);
            }
        }

        return sum * wave.Scale.Nominal;
    }
}
