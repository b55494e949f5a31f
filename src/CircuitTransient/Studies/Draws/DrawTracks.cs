namespace CircuitTransient.Studies.Draws;

/// <summary>A voltage, a current or its rate of change.</summary>
/// <param name="Row">Which row of the forms.</param>
/// <param name="Order">How often the row is differentiated.</param>
internal readonly record struct FollowedFunction(int Row, int Order);

/// <summary>What a product of two functions is multiplied by.</summary>
internal enum FactorKind
{
    /// <summary>Nothing.</summary>
    One,

    /// <summary>Half a capacitor's or inductor's value.</summary>
    HalfOfStore,

    /// <summary>A mutual inductance.</summary>
    Mutual,
}

/// <summary>The factor of a product.</summary>
/// <param name="Sign">1 or −1.</param>
/// <param name="Kind">What it is.</param>
/// <param name="Index">Of the part or coupling.</param>
internal readonly record struct TrackFactor(double Sign, FactorKind Kind, int Index);

/// <summary>A function, or a product of two, of which something in a window is wanted.</summary>
/// <param name="First">Index of the function.</param>
/// <param name="Second">Index of the other factor; −1 for a function alone.</param>
/// <param name="Factor">What it is multiplied by.</param>
/// <param name="Window">Index of the window.</param>
internal abstract record DrawProduct(int First, int Second, TrackFactor Factor, int Window);

/// <summary>A product whose extremes are wanted.</summary>
internal sealed record DrawTrack(int First, int Second, TrackFactor Factor, int Window)
    : DrawProduct(First, Second, Factor, Window)
{
    /// <summary>Whether its greatest value is wanted.</summary>
    public bool WantsMaximum { get; set; }

    /// <summary>Whether its least value is wanted.</summary>
    public bool WantsMinimum { get; set; }
}

/// <summary>A product whose integral is wanted.</summary>
internal sealed record DrawIntegral(int First, int Second, TrackFactor Factor, int Window)
    : DrawProduct(First, Second, Factor, Window);

/// <summary>What was found on a track.</summary>
internal struct TrackState
{
    /// <summary>The greatest value so far.</summary>
    public double Maximum;

    /// <summary>When it stood.</summary>
    public double MaximumTime;

    /// <summary>The least value so far.</summary>
    public double Minimum;

    /// <summary>When it stood.</summary>
    public double MinimumTime;

    /// <summary>The factor at this draw.</summary>
    public double Factor;

    /// <summary>A bound of the error of its values.</summary>
    public double Error;

    /// <summary>The size of what it is made of, over the whole study.</summary>
    public double Size;

    /// <summary>When it is infinitely great; not a number where it never is.</summary>
    public double Up;

    /// <summary>When it is infinitely small.</summary>
    public double Down;

    /// <summary>The value at the walk's last instant.</summary>
    public double Value;

    /// <summary>The slope there.</summary>
    public double Slope;

    /// <summary>Whether no greater value can follow in the stretch.</summary>
    public bool IsMaximumSettled;

    /// <summary>Whether no lesser value can follow in the stretch.</summary>
    public bool IsMinimumSettled;

    /// <summary>Nothing found yet.</summary>
    public void Clear(double factor)
    {
        this = default;
        (Maximum, Minimum, Factor) = (double.NegativeInfinity, double.PositiveInfinity, factor);
        (Up, Down) = (double.NaN, double.NaN);
    }

    /// <summary>Takes a value into account.</summary>
    public void Offer(double value, double time)
    {
        if (value > Maximum)
        {
            (Maximum, MaximumTime) = (value, time);
        }

        if (value < Minimum)
        {
            (Minimum, MinimumTime) = (value, time);
        }
    }
}
