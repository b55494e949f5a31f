using System.Collections.Immutable;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Sizes;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Sizes;

/// <summary>Sizes parts of circuits given as text.</summary>
internal static class Sizing
{
    /// <summary>What is asked, in the words of the command line.</summary>
    public static SizeRequest Ask(
        ImmutableArray<string> parts, string? least = null, string? greatest = null,
        PreferredSeries? series = null, bool withSpread = false,
        ImmutableArray<string> values = default) => new(
        [
            .. parts.Select(part => Part("--part", part)),
            .. values.IsDefault ? [] : values.Select(v => Part("--value", v) with { IsNamedValue = true }),
        ],
        series,
        least is not null ? new Extremal(new SourceText("--least", least), IsGreatest: false)
            : greatest is not null ? new Extremal(new SourceText("--greatest", greatest), IsGreatest: true)
            : new MostRoom(),
        withSpread);

    /// <summary>Runs a sizing that can be run.</summary>
    public static SizeResult Run(string circuit, SizeRequest request)
    {
        var problem = SizeProblem.Of(new SourceText("circuit.cause", circuit), request, _ => new(null, []));
        Assert.True(problem.Succeeded, DiagnosticText.Render(problem.Diagnostics));
        var result = SizeStudy.Run(
            problem.Value, request, _ => new(null, []), TestContext.Current.CancellationToken);
        Assert.True(result.Succeeded, DiagnosticText.Render(result.Diagnostics));
        return result.Value;
    }

    /// <summary>Why a sizing cannot be run.</summary>
    public static string Refusal(string circuit, SizeRequest request)
    {
        var problem = SizeProblem.Of(new SourceText("circuit.cause", circuit), request, _ => new(null, []));
        Assert.False(problem.Succeeded);
        return DiagnosticText.Render(problem.Diagnostics);
    }

    private static SizedPartSyntax Part(string option, string text)
    {
        var part = SizedPartParser.Parse(new SourceText(option, text));
        Assert.True(part.Succeeded, DiagnosticText.Render(part.Diagnostics));
        return part.Value;
    }
}
