using System.Text.RegularExpressions;
using ArchUnitNET.Domain;
using ArchUnitNET.Loader;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Project;

/// <summary>The one direction of the library: a stage may use the stages before it and none after.</summary>
public partial class FlowTests
{
    private static readonly string[] Stages =
    [
        "Text", "Numerics", "Syntax", "Circuits", "Equations", "Solutions", "Measurements",
        "Studies", "Reports",
    ];

    [Fact]
    public void Every_folder_of_the_library_is_a_stage()
    {
        var folders = Repository.Files.Select(StageOfPath).OfType<string>().Distinct();

        Assert.Empty(folders.Except(Stages));
    }

    [Fact]
    public void No_compiled_type_depends_on_a_later_stage()
    {
        var architecture = new ArchLoader().LoadAssemblies(typeof(SourceText).Assembly).Build();
        var dependencies = architecture.Types.SelectMany(type => type.Dependencies).ToList();

        Assert.Contains(dependencies, d => StageOf(d.Origin) == "Circuits" && StageOf(d.Target) == "Text");
        Assert.Empty(dependencies
            .Where(d => IsBefore(StageOf(d.Origin), StageOf(d.Target)))
            .Select(d => $"{d.Origin.FullName} uses {d.Target.FullName}")
            .Distinct());
    }

    [Fact]
    public void No_using_line_names_a_later_stage()
    {
        var uses =
            from path in Repository.Files
            let stage = StageOfPath(path)
            where stage is not null
            from line in Repository.Lines(path)
            from Match match in UsedStage().Matches(line)
            select (Path: path, Stage: stage, Used: match.Groups["stage"].Value);
        var found = uses.ToList();

        Assert.Contains(found, use => use.Stage == "Circuits" && use.Used == "Text");
        Assert.Empty(found
            .Where(use => IsBefore(use.Stage, use.Used))
            .Select(use => $"{use.Path} uses {use.Used}"));
    }

    private static bool IsBefore(string? stage, string? other)
    {
        var (place, otherPlace) = (Array.IndexOf(Stages, stage), Array.IndexOf(Stages, other));
        return place >= 0 && otherPlace > place;
    }

    private static string? StageOf(IType type) =>
        type.Namespace?.FullName.Split('.') is ["CircuitTransient", var stage, ..] ? stage : null;

    private static string? StageOfPath(string path) =>
        Path.GetExtension(path) == ".cs"
        && path.Split('/') is ["src", "CircuitTransient", var stage, _, ..] ? stage : null;

    [GeneratedRegex(@"^using (static )?(\w+ = )?CircuitTransient\.(?<stage>\w+)",
        RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex UsedStage();
}
