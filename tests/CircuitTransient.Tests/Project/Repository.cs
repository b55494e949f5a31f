using System.Xml.Linq;

namespace CircuitTransient.Tests.Project;

/// <summary>The files of this repository, as the tests about the project itself read them.</summary>
internal static class Repository
{
    private static readonly string[] Generated = ["bin", "obj", "output", "TestResults", ".git", ".vs"];

    /// <summary>The folder that holds the solution.</summary>
    public static string Root { get; } = FindRoot();

    /// <summary>Every file people wrote, by its path from the root, with forward slashes.</summary>
    public static IReadOnlyList<string> Files { get; } =
        [.. Walk(new DirectoryInfo(Root)).Select(Relative).Order(StringComparer.Ordinal)];

    /// <summary>The text of a file.</summary>
    public static string Read(string path) => File.ReadAllText(Path.Combine(Root, path));

    /// <summary>The lines of a file.</summary>
    public static string[] Lines(string path) => File.ReadAllLines(Path.Combine(Root, path));

    /// <summary>An MSBuild file as XML.</summary>
    public static XDocument Xml(string path) => XDocument.Load(Path.Combine(Root, path));

    private static IEnumerable<FileInfo> Walk(DirectoryInfo folder) =>
        folder.EnumerateFiles().Where(f => f.Name != ".git").Concat(
            folder.EnumerateDirectories().Where(d => !Generated.Contains(d.Name)).SelectMany(Walk));

    private static string Relative(FileInfo file) =>
        Path.GetRelativePath(Root, file.FullName).Replace('\\', '/');

    private static string FindRoot()
    {
        var folder = AppContext.BaseDirectory;
        while (!File.Exists(Path.Combine(folder, "CircuitTransient.sln")))
        {
            folder = Path.GetDirectoryName(folder)
                ?? throw new InvalidOperationException("the tests run outside their repository");
        }

        return folder;
    }
}
