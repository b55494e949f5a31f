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
    public void Every_central_version_is_of_a_package_that_is_used() =>
        Assert.Empty(
            Repository.Xml("Directory.Packages.props").Descendants("PackageVersion")
                .Select(v => (string?)v.Attribute("Include"))
                .Except(Projects.Append("Directory.Build.props")
                    .SelectMany(path => Repository.Xml(path).Descendants("PackageReference"))
                    .Select(reference => (string?)reference.Attribute("Include"))));

    [Fact]
    public void A_package_that_is_only_downloaded_takes_its_version_from_there_too()
    {
        var downloads = Repository.Files.Where(path => path.EndsWith(".targets", StringComparison.Ordinal))
            .SelectMany(path => Repository.Xml(path).Descendants("PackageDownload"))
            .ToList();

        Assert.NotEmpty(downloads);
        Assert.All(downloads, download =>
        {
            var property = Property().Match((string)download.Attribute("Version")!).Groups["name"].Value;
            var version = Assert.Single(Repository.Xml("Directory.Packages.props").Descendants(property));
            Assert.Matches(ExactVersion(), version.Value);
        });
    }

    [Fact]
    public void Every_package_that_is_shipped_is_in_the_notices()
    {
        var notices = Repository.Read("THIRD-PARTY-NOTICES.md");
        var shipped = Projects.Where(path => path.StartsWith("src/", StringComparison.Ordinal))
            .SelectMany(path => Repository.Xml(path).Descendants("PackageReference"))
            .Where(reference => reference.Attribute("PrivateAssets") is null)
            .Select(reference => (string)reference.Attribute("Include")!)
            .ToList();

        Assert.NotEmpty(shipped);
        Assert.All(shipped, package => Assert.Contains($"| {package} |", notices));
    }

    [Fact]
    public void Every_project_has_its_lock_file() =>
        Assert.Empty(Projects
            .Select(path => $"{Path.GetDirectoryName(path)!.Replace('\\', '/')}/packages.lock.json")
            .Except(Repository.Files));

    [GeneratedRegex(@"^\[\$\((?<name>\w+)\)\]$", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Property();

    [GeneratedRegex(@"^\d+\.\d+\.\d+(-[\w.]+)?$", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex ExactVersion();
}
