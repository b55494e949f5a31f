using System.Collections;
using System.Reflection;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Syntax;

/// <summary>Reads texts for the tests of this folder and writes what was read in one line.</summary>
internal static class Reading
{
    /// <summary>The statements of a text without mistakes, one a line.</summary>
    public static string Of(string text)
    {
        var outcome = CircuitParser.Parse(new SourceText("a.cause", text));
        Assert.Equal("", DiagnosticText.Render(outcome.Diagnostics));
        return string.Join('\n', outcome.Value!.Statements.Select(s => Show(s)));
    }

    /// <summary>What is said of a text, as the user sees it.</summary>
    public static string Messages(string text) => DiagnosticText.Render(
        CircuitParser.ParseWhatCanBe(new SourceText("a.cause", text)).Diagnostics);

    /// <summary>The expression behind <c>value x :</c>.</summary>
    public static ExpressionSyntax Expression(string text)
    {
        var outcome = CircuitParser.Parse(new SourceText("a.cause", "value x : " + text));
        Assert.Equal("", DiagnosticText.Render(outcome.Diagnostics));
        return Assert.IsType<ValueStatement>(Assert.Single(outcome.Value!.Statements)).Value.Value;
    }

    /// <summary>The number behind <c>value x :</c>.</summary>
    public static NumberSyntax Number(string text) => Assert.IsType<NumberSyntax>(Expression(text));

    /// <summary>The value of a number with its sign, as a printed one is read back.</summary>
    public static double Value(string text) => Expression(text) switch
    {
        NumberSyntax number => number.Value,
        NegationSyntax { Operand: NumberSyntax number } => -number.Value,
        var other => throw new InvalidOperationException($"{other} is not a number"),
    };

    public static string Show(object? value) => value switch
    {
        null => "-",
        string text => $"'{text}'",
        bool or int or Enum => $"{value}",
        NameSyntax name => Name(name),
        NumberSyntax number => Number(number),
        NameExpressionSyntax name => Name(name.Name),
        NegationSyntax negation => $"(-{Show(negation.Operand)})",
        BinarySyntax binary => $"({Show(binary.Left)} {binary.Operator} {Show(binary.Right)})",
        CallSyntax call => $"{call.Function}({Show(call.Argument)})",
        ToleratedSyntax { Tolerance: null } plain => Show(plain.Value),
        IEnumerable many => $"[{string.Join(", ", many.Cast<object>().Select(Show))}]",
        _ => Record(value),
    };

    private static string Name(NameSyntax name)
    {
        var owner = name.Owner is null ? "" : Name(name.Owner) + "/";
        var sign = name.Index is { Offset: >= 0, Counter: not null } ? "+" : "";
        var index = name.Index is null ? "" : $"[{name.Index.Counter}{sign}{name.Index.Offset}]";
        return owner + (name.IsQuoted ? $"\"{name.Text}\"" : name.Text) + index;
    }

    private static string Number(NumberSyntax number) =>
        $"{number.Value}{(number.HasUnit ? Unit.SymbolOf(number.Dimension) : "?")}{number.Mark}";

    private static string Record(object value)
    {
        var name = value.GetType().Name.Replace("Syntax", "").Replace("Statement", "");
        var properties = value.GetType().GetProperties(BindingFlags.Public | BindingFlags.Instance)
            .Where(p => p.PropertyType != typeof(TextSpan));
        return $"{name}({string.Join(", ", properties.Select(p => Show(p.GetValue(value))))})";
    }
}
