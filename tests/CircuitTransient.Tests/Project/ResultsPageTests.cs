using System.Text.Json.Nodes;
using System.Text.RegularExpressions;
using CircuitTransient.Tests.Cli;

namespace CircuitTransient.Tests.Project;

/// <summary>The page about commands and results names all that the program knows, and nothing else.</summary>
public sealed partial class ResultsPageTests : IDisposable
{
    private const string Schema = "src/CircuitTransient/Reports/results.schema.json";

    private static readonly string Page = Repository.Read("docs/results.md");

    private readonly CommandLine commandLine = new();

    public static TheoryData<string> Documents =>
        [.. Definitions.Where(definition => Fields(definition.Value!).Any()).Select(d => d.Key)];

    private static JsonObject Definitions => JsonNode.Parse(Repository.Read(Schema))!["$defs"]!.AsObject();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void Every_command_has_its_section_with_each_of_its_options_as_help_shows_it()
    {
        var commands = Command().Matches(commandLine.Run("--help").Output)
            .Select(command => command.Groups["name"].Value)
            .ToArray();

        Assert.True(commands.Length >= 8, string.Join(' ', commands));
        Assert.Equal(commands.Order(), Headings("Commands").Order());
        Assert.All(commands, command =>
        {
            var help = commandLine.Run(command, "--help").Output;
            var known = Option().Matches(help).Select(o => o.Groups["option"].Value.Replace("<", "")
                .Replace(">", ""));
            Assert.Equal(known.Except(["--help", "--version"]).Order(), Rows(command).Order());
        });
    }

    [Theory]
    [MemberData(nameof(Documents))]
    public void Every_field_of_the_results_has_its_row(string definition) =>
        Assert.Equal(Fields(Definitions[definition]!).Order(), Rows(definition).Order());

    [Fact]
    public void Every_exit_status_has_its_row() =>
        Assert.Equal(
            typeof(CircuitTransient.Cli.ExitStatus).GetFields().Where(field => field.IsLiteral)
                .Select(field => $"{field.GetRawConstantValue()}").Order(),
            Status().Matches(Page).Select(row => row.Groups["status"].Value).Order());

    [Fact]
    public void Every_schema_is_linked() =>
        Assert.All(
            Repository.Files.Where(path => path.EndsWith(".schema.json", StringComparison.Ordinal)),
            path => Assert.Contains($"](../{path})", Page));

    [Theory]
    [InlineData("README.md")]
    [InlineData("docs/language.md")]
    [InlineData("docs/results.md")]
    public void Every_link_leads_somewhere(string page)
    {
        var folder = Path.GetDirectoryName(page)!;
        var links = Link().Matches(Repository.Read(page)).ToArray();

        Assert.NotEmpty(links);
        Assert.All(links, link =>
        {
            var (file, place) = (link.Groups["file"].Value, link.Groups["place"].Value);
            var target = file.Length == 0 ? page : Path.Combine(folder, file);
            Assert.True(File.Exists(Path.Combine(Repository.Root, target)), link.Value);
            Assert.True(place.Length == 0 || Anchors(Repository.Read(target)).Contains(place), link.Value);
        });
    }

    /// <summary>The fields of a definition, those inside it behind a point.</summary>
    private static IEnumerable<string> Fields(JsonNode definition, string before = "") =>
        from field in definition["properties"]?.AsObject() ?? []
        from name in Fields(field.Value!["items"] ?? field.Value, $"{before}{field.Key}.")
            .Prepend(before + field.Key)
        select name;

    /// <summary>What stands first in each row of the table under a heading.</summary>
    private static IEnumerable<string> Rows(string heading) =>
        Row().Matches(Section($"### {heading}")).Select(row => row.Groups["first"].Value);

    private static IEnumerable<string> Headings(string chapter) =>
        Heading().Matches(Section($"## {chapter}")).Select(heading => heading.Groups["name"].Value);

    private static string Section(string heading)
    {
        var start = Page.IndexOf($"\n{heading}\n", StringComparison.Ordinal);
        Assert.True(start >= 0, $"no heading `{heading}`");
        var level = heading[..heading.IndexOf(' ', StringComparison.Ordinal)];
        var body = start + heading.Length + 2;
        var end = new[] { "\n## ", $"\n{level} " }
            .Select(next => Page.IndexOf(next, body, StringComparison.Ordinal))
            .Where(place => place >= 0).DefaultIfEmpty(Page.Length).Min();
        return Page[body..end];
    }

    private static IEnumerable<string> Anchors(string page) =>
        from heading in AnyHeading().Matches(page)
        select Dropped().Replace(heading.Groups["name"].Value.ToLowerInvariant(), "").Replace(' ', '-');

    [GeneratedRegex(@"^  (?<name>[a-z]+) <", RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Command();

    [GeneratedRegex(@"^  (-h, )?(?<option>--[\w-]+( <\w+>)?)",
        RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Option();

    [GeneratedRegex(@"^\| `(?<first>[^`]+)` \|", RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Row();

    [GeneratedRegex(@"^\| (?<status>\d+) \|", RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Status();

    [GeneratedRegex(@"^### (?<name>.+)$", RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Heading();

    [GeneratedRegex(@"^#+ (?<name>.+)$", RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex AnyHeading();

    [GeneratedRegex(@"[^\w\- ]", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Dropped();

    [GeneratedRegex(@"\]\((?<file>[\w./-]*)(#(?<place>[\w-]+))?\)", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Link();
}
