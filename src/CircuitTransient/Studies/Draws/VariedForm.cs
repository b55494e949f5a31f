namespace CircuitTransient.Studies.Draws;

/// <summary>The instrumented circuit with its switches in given positions, in double precision and in
/// coordinates in which the nominal circuit is modal: z′ = A z + B u + Bσ σ, z(0⁺) = Bₓ x,
/// y = C_y z + D_y u + D₁_y u′ + D_yx x + D_yσ σ, and the rows likewise. All matrices stand row by
/// row.</summary>
internal sealed class VariedForm
{
    /// <summary>How many state variables.</summary>
    public required int Order { get; init; }

    /// <summary>How many instruments.</summary>
    public required int Instruments { get; init; }

    /// <summary>How many independent sources.</summary>
    public required int Sources { get; init; }

    /// <summary>How many capacitors and inductors.</summary>
    public required int Stores { get; init; }

    /// <summary>How many rows: what the stores hold first, then what is followed.</summary>
    public required int Rows { get; init; }

    /// <summary>Order × Order.</summary>
    public required double[] A { get; init; }

    /// <summary>Order × Sources.</summary>
    public required double[] B { get; init; }

    /// <summary>Order × Instruments.</summary>
    public required double[] BInstruments { get; init; }

    /// <summary>Order × Stores.</summary>
    public required double[] BStores { get; init; }

    /// <summary>What the instruments follow.</summary>
    public required OutputMatrices Followed { get; init; }

    /// <summary>The rows.</summary>
    public required OutputMatrices Outputs { get; init; }

    /// <summary>For every row, whether it can be followed: determined and without impulsive derivatives that
    /// this form does not hold.</summary>
    public required bool[] IsServed { get; init; }
}

/// <summary>Linear outputs of a form.</summary>
/// <param name="State">Rows × Order.</param>
/// <param name="Direct">Rows × Sources, on u.</param>
/// <param name="Rates">Rows × Sources, on u′.</param>
/// <param name="Stores">Rows × Stores: the impulse that a stored quantity sets at an interval's
/// start.</param>
/// <param name="Instruments">Rows × Instruments.</param>
internal sealed record OutputMatrices(
    double[] State, double[] Direct, double[] Rates, double[] Stores, double[] Instruments);
