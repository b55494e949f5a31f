using System.Collections.Immutable;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Part values fitted to records.</summary>
/// <param name="Values">The values, in the order asked for.</param>
/// <param name="Correlation">Of their logarithms, offsets, gains and levels estimated beside them.</param>
/// <param name="Condition">Largest over smallest singular value of the values' own scaled slopes.</param>
/// <param name="Steps">How often the circuits were solved.</param>
/// <param name="Converged">Whether a minimum was reached.</param>
/// <param name="Determined">Products of powers that the records do determine although single values are not;
/// empty where every value is determined.</param>
/// <param name="RecordCount">How many records they were fitted to.</param>
public sealed record FitResult(
    ImmutableArray<FittedValue> Values, ImmutableArray<ImmutableArray<double>> Correlation,
    double Condition, int Steps, bool Converged, ImmutableArray<DeterminedProduct> Determined,
    int RecordCount)
{
    /// <summary>The standard error, relative, from which on a value counts as not determined.</summary>
    public const double Unresolved = 0.2;

    /// <summary>Whether every value is determined by the records.</summary>
    public bool IsResolved => Converged && Values.All(v => v.IsResolved);
}

/// <summary>A fitted value.</summary>
/// <param name="Name">The user's name for it.</param>
/// <param name="Unit">Its SI unit.</param>
/// <param name="Nominal">What the file says.</param>
/// <param name="Value">What the records say.</param>
/// <param name="RelativeError">Standard error as a part of the value.</param>
public sealed record FittedValue(
    string Name, string Unit, double Nominal, double Value, double RelativeError)
{
    /// <summary>Whether the records determine it.</summary>
    public bool IsResolved => RelativeError <= FitResult.Unresolved;
}

/// <summary>A product of powers of values that the records determine.</summary>
/// <param name="Words">Such as <c>Llp·Cn</c>.</param>
/// <param name="Value">In SI.</param>
/// <param name="RelativeError">Standard error as a part of it.</param>
public sealed record DeterminedProduct(string Words, double Value, double RelativeError);
