namespace CircuitTransient.Measurements;

/// <summary>Finds the worst value of a requirement among the extremes of an observation.</summary>
public static class JudgedExtreme
{
    private const double Rounding = 1e-9; // what figures are exact to; instants by the study's length

    /// <summary>Whether the worst value is the observation's maximum (else its minimum), at that instant;
    /// null where it is neither.</summary>
    /// <param name="observed">The observation of the quantity.</param>
    /// <param name="worst">The requirement's worst value.</param>
    /// <param name="sign">−1 where the observation is the negative of the required quantity.</param>
    /// <param name="until">The end of the study, in seconds.</param>
    public static bool? IsMax(ObservationResult observed, TimedValue worst, int sign, double until)
    {
        return Is(observed.Max) ? true : Is(observed.Min) ? false : null;

        bool Is(Extreme extreme) => (worst.Value, extreme.Value) is ({ } value, { } found)
            && Math.Abs(found - (sign * value)) <= Rounding * Math.Abs(value)
            && Math.Abs(extreme.Time - worst.Time) <= Rounding * until;
    }
}
