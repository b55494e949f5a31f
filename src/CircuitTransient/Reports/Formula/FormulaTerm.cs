using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Reports.Formula;

/// <summary>A number to be printed.</summary>
/// <param name="Value">In SI.</param>
/// <param name="Unit">Its unit without prefix.</param>
/// <param name="Digits">Significant digits.</param>
internal readonly record struct FormulaNumber(double Value, string Unit, int Digits);

/// <summary>A term ready to be printed: coefficients of τ⁰, τ¹, … times factors.</summary>
/// <param name="Powers">Each coefficient with its power of τ.</param>
/// <param name="Factors">What the polynomial is multiplied by.</param>
internal sealed record FormulaTerm(
    ImmutableArray<(int Power, FormulaNumber Coefficient)> Powers, ImmutableArray<FormulaFactor> Factors);

/// <summary>A function of τ in a term.</summary>
internal abstract record FormulaFactor;

/// <summary>e^(-τ/T), or e^(τ/T) where it grows.</summary>
internal sealed record ExponentialFactor(FormulaNumber TimeConstant, bool Grows) : FormulaFactor;

/// <summary>(1 - e^(-τ/T)), or (e^(τ/T) - 1) where it grows: near an integral.</summary>
internal sealed record ApproachFactor(FormulaNumber TimeConstant, bool Grows) : FormulaFactor;

/// <summary>cos(2π·f·τ + φ), or the sine.</summary>
/// <param name="Frequency">f in hertz.</param>
/// <param name="Degrees">φ, as it is printed.</param>
/// <param name="Decimals">Decimals of φ.</param>
/// <param name="IsSine">Whether it is a sine.</param>
internal sealed record OscillationFactor(
    FormulaNumber Frequency, double Degrees, int Decimals, bool IsSine = false) : FormulaFactor;

/// <summary>cosh(τ/T) or sinh(τ/T).</summary>
internal sealed record HyperbolicFactor(FormulaNumber TimeConstant, bool IsSine) : FormulaFactor;

/// <summary>Re(e^(jφ)·D[p₁, p₂, …]), D the divided difference of e^(p τ) over the rates.</summary>
/// <param name="Degrees">φ.</param>
/// <param name="Decimals">Decimals of φ.</param>
/// <param name="Rates">In 1/s and rad/s.</param>
/// <param name="Digits">Significant digits of the rates.</param>
internal sealed record DividedFactor(
    double Degrees, int Decimals, ImmutableArray<Complex> Rates, int Digits) : FormulaFactor;
