using System.Diagnostics;

namespace CircuitTransient.Circuits;

/// <summary>Values and slopes of formulas at other values of the parameters.</summary>
public static class FormulaValue
{
    /// <summary>A quantity's value in SI.</summary>
    /// <param name="quantity">The quantity.</param>
    /// <param name="parameters">A value in SI for each of <see cref="Circuit.Parameters"/>.</param>
    public static double Of(Quantity quantity, ReadOnlySpan<double> parameters) =>
        quantity.Formula is null ? quantity.Nominal : Of(quantity.Formula, parameters);

    /// <summary>A formula's value in SI; not finite where it has none.</summary>
    public static double Of(Formula formula, ReadOnlySpan<double> parameters) => formula switch
    {
        NumberFormula number => number.Value,
        ParameterFormula parameter => parameters[parameter.Index],
        BinaryFormula binary =>
            Join(binary.Operator, Of(binary.Left, parameters), Of(binary.Right, parameters)),
        CallFormula call => Call(call.Function, Of(call.Argument, parameters)),
        _ => throw new UnreachableException($"no value of {formula}"),
    };

    /// <summary>∂(formula)/∂(parameter).</summary>
    public static double Slope(Formula? formula, int parameter, ReadOnlySpan<double> parameters)
    {
        switch (formula)
        {
            case null or NumberFormula:
                return 0;
            case ParameterFormula p:
                return p.Index == parameter ? 1 : 0;
            case CallFormula call:
                var inner = Slope(call.Argument, parameter, parameters);
                return inner == 0 ? 0
                    : inner * CallSlope(call.Function, Of(call.Argument, parameters));
            case BinaryFormula binary:
                return BinarySlope(binary, parameter, parameters);
            default:
                throw new UnreachableException($"no slope of {formula}");
        }
    }

    private static double BinarySlope(BinaryFormula binary, int parameter, ReadOnlySpan<double> parameters)
    {
        var left = Slope(binary.Left, parameter, parameters);
        var right = Slope(binary.Right, parameter, parameters);
        if (left == 0 && right == 0)
        {
            return 0;
        }

        var (a, b) = (Of(binary.Left, parameters), Of(binary.Right, parameters));
        return binary.Operator switch
        {
            '+' => left + right,
            '-' => left - right,
            '*' => (left * b) + (a * right),
            '/' => (left / b) - (a * right / (b * b)),
            '^' => (left == 0 ? 0 : left * b * Math.Pow(a, b - 1))
                + (right == 0 ? 0 : right * Math.Log(a) * Math.Pow(a, b)),
            _ => throw new UnreachableException($"no slope of {binary.Operator}"),
        };
    }

    private static double Join(char joint, double a, double b) => joint switch
    {
        '+' => a + b,
        '-' => a - b,
        '*' => a * b,
        '/' => a / b,
        '^' => Math.Pow(a, b),
        _ => throw new UnreachableException($"no value of {joint}"),
    };

    private static double Call(string function, double x) => function switch
    {
        "sqrt" => Math.Sqrt(x),
        "exp" => Math.Exp(x),
        "ln" => Math.Log(x),
        _ => throw new UnreachableException($"no value of {function}"),
    };

    private static double CallSlope(string function, double x) => function switch
    {
        "sqrt" => 0.5 / Math.Sqrt(x),
        "exp" => Math.Exp(x),
        "ln" => 1 / x,
        _ => throw new UnreachableException($"no slope of {function}"),
    };
}
