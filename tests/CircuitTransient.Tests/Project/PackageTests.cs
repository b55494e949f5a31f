using System.Text.RegularExpressions;

namespace CircuitTransient.Tests.Project;

/// <summary>Every package stands with one exact version in one place.</summary>
public partial class PackageTests
{
    private static IEnumerable<string> Projects =>
        Repository.Files.Where(f => Path.GetExtension(f) == ".csproj");

    [Fact]
    public void No_project_states_a_version_of_its_own() =>
        Assert.Empty(
            from path in Projects.Append("Directory.Build.props")
            from reference in Repository.Xml(path).Descendants("PackageReference")
            where reference.Attributes().Any(a => a.Name.LocalName is "Version" or "VersionOverride")
            select $"{path}: {reference}");

    [Fact]
    public void Every_central_version_is_exact()
    {
        var versions = Repository.Xml("Directory.Packages.props").Descendants("PackageVersion").ToList();

        Assert.NotEmpty(versions);
        Assert.All(versions, v => Assert.Matches(ExactVersion(), (string?)v.Attribute("Version")));
    }

    [Fact]
    public void Every_project_has_its_lock_file() =>
        Assert.Empty(Projects
            .Select(path => $"{Path.GetDirectoryName(path)!.Replace('\\', '/')}/packages.lock.json")
            .Except(Repository.Files));

    [GeneratedRegex(@"^\d+\.\d+\.\d+(-[\w.]+)?$", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex ExactVersion();
}
