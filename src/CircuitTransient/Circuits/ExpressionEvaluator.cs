using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>What an expression comes to.</summary>
/// <param name="Value">In SI, with all parameters nominal.</param>
/// <param name="Formula">How it follows from parameters; null where it depends on none.</param>
/// <param name="Size">Operands and operators of the formula written out.</param>
internal readonly record struct Evaluated(double Value, Dimension Dimension, Formula? Formula = null,
    int Size = 1)
{
    public Formula AsFormula => Formula ?? new NumberFormula(Value);

    public Quantity AsQuantity => new(Value, Formula);
}

/// <summary>Works out expressions and their dimensions; null means that an error has been reported.</summary>
internal sealed class ExpressionEvaluator(Findings findings, NamedValues values)
{
    private const int DeepestNesting = 200;
    // written out; keeps doubling chains of values from running away
    private const int LargestFormula = 10_000;

    public Evaluated? Evaluate(ExpressionSyntax expression, Scope scope, int depth = 0)
    {
        if (depth > DeepestNesting)
        {
            findings.Error(expression.Span, $"this expression is nested more than {DeepestNesting} deep",
                "give a part of it a name with `value NAME : …`");
            return null;
        }

        return expression switch
        {
            NumberSyntax number => Number(number),
            NameExpressionSyntax name => Name(name, scope),
            NegationSyntax negation => Negate(negation, Evaluate(negation.Operand, scope, depth + 1)),
            BinarySyntax binary => Chain(binary, scope, depth),
            CallSyntax call => Call(call, Evaluate(call.Argument, scope, depth + 1)),
            _ => throw new System.Diagnostics.UnreachableException($"no meaning for {expression}"),
        };
    }

    private Evaluated? Number(NumberSyntax number)
    {
        if (number is { Mark: { } mark, HasUnit: false })
        {
            findings.Error(number.Span, $"the marking code `{mark}` does not say its unit here",
                "write the value with its unit, such as `4.7 kΩ`");
            return null;
        }

        return Checked(number, new Evaluated(number.Value, number.Dimension));
    }

    private Evaluated? Name(NameExpressionSyntax expression, Scope scope)
    {
        var name = expression.Name;
        if (name is { Index: null, IsQuoted: false })
        {
            if (scope.Counters.TryGetValue(name.Text, out var count))
            {
                return new Evaluated(count, Dimension.None);
            }

            if (name.Text == "pi")
            {
                return new Evaluated(Math.PI, Dimension.None);
            }
        }

        return values.Find(name, scope);
    }

    // A long sum nests to the left without the writer having nested anything: walk that side, do not recurse.
    private Evaluated? Chain(BinarySyntax binary, Scope scope, int depth)
    {
        var steps = new Stack<BinarySyntax>();
        ExpressionSyntax leftmost = binary;
        while (leftmost is BinarySyntax step)
        {
            steps.Push(step);
            leftmost = step.Left;
        }

        var result = Evaluate(leftmost, scope, depth + 1);
        foreach (var step in steps)
        {
            var right = Evaluate(step.Right, scope, depth + 1);
            result = result is { } a && right is { } b ? Join(step, a, b) : null;
        }

        return result;
    }

    private Evaluated? Join(BinarySyntax step, Evaluated a, Evaluated b)
    {
        if (DimensionOf(step, a, b) is not { } dimension)
        {
            return null;
        }

        if (step.Operator == '/' && b.Value == 0)
        {
            findings.Error(step.Right.Span,
                $"`{Text(step.Right)}` is zero, and nothing can be divided by it",
                "look for two values that cancel");
            return null;
        }

        var value = step.Operator switch
        {
            '+' => a.Value + b.Value,
            '-' => a.Value - b.Value,
            '*' => a.Value * b.Value,
            '/' => a.Value / b.Value,
            _ => Math.Pow(a.Value, b.Value),
        };
        var isFixed = a.Formula is null && b.Formula is null;
        var formula = isFixed ? null : new BinaryFormula(step.Operator, a.AsFormula, b.AsFormula);
        return Checked(step, new Evaluated(value, dimension, formula, isFixed ? 1 : a.Size + b.Size + 1));
    }

    private Dimension? DimensionOf(BinarySyntax step, Evaluated a, Evaluated b)
    {
        switch (step.Operator)
        {
            case '*':
                return a.Dimension * b.Dimension;
            case '/':
                return a.Dimension / b.Dimension;
            case '^':
                return PowerDimension(step, a, b);
            default:
                if (a.Dimension == b.Dimension)
                {
                    return a.Dimension;
                }

                var joined = step.Operator == '+' ? "added to" : "subtracted from";
                var (first, second) = step.Operator == '+' ? (a, b) : (b, a);
                findings.Error(step.Span,
                    $"{Measure.Of(first.Dimension).Phrase} cannot be {joined} "
                        + $"{Measure.Of(second.Dimension).Phrase}",
                    $"`{Text(step.Left)}` is {Measure.Of(a.Dimension).Phrase}, "
                    + $"`{Text(step.Right)}` {Measure.Of(b.Dimension).Phrase}");
                return null;
        }
    }

    private Dimension? PowerDimension(BinarySyntax step, Evaluated a, Evaluated b)
    {
        if (b.Dimension != Dimension.None)
        {
            findings.Error(step.Right.Span,
                $"an exponent is a pure number, not {Measure.Of(b.Dimension).Phrase}",
                "divide it by a value of the same unit");
            return null;
        }

        if (a.Dimension == Dimension.None)
        {
            return Dimension.None;
        }

        if (b.Formula is null && Math.Abs(b.Value) <= 12 && b.Value == Math.Round(b.Value))
        {
            var n = (int)b.Value;
            return new Dimension(a.Dimension.Volt * n, a.Dimension.Ampere * n, a.Dimension.Second * n);
        }

        findings.Error(step.Right.Span,
            $"{Measure.Of(a.Dimension).Phrase} takes a whole number as its exponent",
            "for a root write `sqrt(…)`");
        return null;
    }

    private Evaluated? Negate(NegationSyntax negation, Evaluated? operand) => operand is not { } a
        ? null
        : Checked(negation, a with
        {
            Value = -a.Value,
            Formula = a.Formula is null ? null : new BinaryFormula('-', new NumberFormula(0), a.Formula),
            Size = a.Size + (a.Formula is null ? 0 : 2),
        });

    private Evaluated? Call(CallSyntax call, Evaluated? argument)
    {
        if (argument is not { } a || CallDimension(call, a) is not { } dimension)
        {
            return null;
        }

        var isOutside = call.Function == "ln" ? a.Value <= 0 : call.Function == "sqrt" && a.Value < 0;
        if (isOutside)
        {
            findings.Error(call.Span,
                $"`{call.Function}` of {Amount.Of(a.Value, Measure.Of(a.Dimension).Unit)} is not a number",
                call.Function == "ln" ? "a logarithm is taken of a positive number"
                    : "a root is taken of zero or more");
            return null;
        }

        var value = call.Function switch
        {
            "sqrt" => Math.Sqrt(a.Value),
            "exp" => Math.Exp(a.Value),
            "ln" => Math.Log(a.Value),
            _ => throw new System.Diagnostics.UnreachableException($"no function {call.Function}"),
        };
        var formula = a.Formula is null ? null : new CallFormula(call.Function, a.Formula);
        return Checked(call, new Evaluated(value, dimension, formula, formula is null ? 1 : a.Size + 1));
    }

    private Dimension? CallDimension(CallSyntax call, Evaluated a)
    {
        var d = a.Dimension;
        if (call.Function == "sqrt" && int.IsEvenInteger(d.Volt) && int.IsEvenInteger(d.Ampere)
            && int.IsEvenInteger(d.Second))
        {
            return new Dimension(d.Volt / 2, d.Ampere / 2, d.Second / 2);
        }

        if (d == Dimension.None)
        {
            return d;
        }

        findings.Error(call.Argument.Span, $"`{call.Function}` of {Measure.Of(d).Phrase} has no meaning",
            call.Function == "sqrt"
                ? "the unit under a root must be a square, as in `sqrt(Lcable/Cin)`"
                : $"divide by {Measure.Of(d).Phrase} first, so that a pure number is left");
        return null;
    }

    private Evaluated? Checked(ExpressionSyntax expression, Evaluated result)
    {
        if (!double.IsFinite(result.Value))
        {
            findings.Error(expression.Span, $"`{Text(expression)}` is not a finite number",
                "keep values below 1e308 in their SI unit");
            return null;
        }

        if (result.Size > LargestFormula)
        {
            findings.Error(expression.Span,
                $"with its named values written out `{Text(expression)}` grows past {LargestFormula} terms",
                "give the value as a number");
            return null;
        }

        return result;
    }

    private string Text(ExpressionSyntax expression) => findings.Source[expression.Span];
}
