using System.Text.RegularExpressions;

namespace CircuitTransient.Tests.Project;

/// <summary>What every file of the repository keeps to.</summary>
public partial class FileTests
{
    private const int LineLimit = 300;
    private const int ColumnLimit = 110;

    private static IEnumerable<string> SourceFiles => Repository.Files.Where(IsSource);

    private static IEnumerable<string> TextFiles => Repository.Files.Where(IsText);

    [Fact]
    public void No_source_file_is_longer_than_300_lines() =>
        Assert.Empty(
            from path in SourceFiles
            let count = Repository.Lines(path).Length
            where count > LineLimit
            select $"{path}: {count} lines");

    [Fact]
    public void No_source_line_is_wider_than_110_columns() =>
        Assert.Empty(
            from path in SourceFiles
            from line in Repository.Lines(path).Index()
            where line.Item.Length > ColumnLimit
            select $"{path}:{line.Index + 1}: {line.Item.Length} columns");

    [Fact]
    public void No_type_is_named_for_a_drawer_of_odds_and_ends() =>
        Assert.Empty(
            from path in SourceFiles
            where VagueName().IsMatch(Path.GetFileNameWithoutExtension(path))
            select path);

    [Fact]
    public void No_file_carries_a_path_of_one_machine() =>
        Assert.Empty(Matches(MachinePath(), TextFiles));

    [Fact]
    public void No_file_cites_what_is_not_a_source() =>
        Assert.Empty(Matches(UncitedWord(), TextFiles));

    [Fact]
    public void No_source_file_leaves_work_undone() =>
        Assert.Empty(Matches(LeftUndone(), SourceFiles));

    private static IEnumerable<string> Matches(Regex pattern, IEnumerable<string> paths) =>
        from path in paths
        from line in Repository.Lines(path).Index()
        where pattern.IsMatch(line.Item)
        select $"{path}:{line.Index + 1}: {line.Item.Trim()}";

    private static bool IsSource(string path) => Path.GetExtension(path) == ".cs";

    private static bool IsText(string path) =>
        Path.GetExtension(path) is not (".png" or ".pdf" or ".ttf")
        && !path.EndsWith(".lock.json", StringComparison.Ordinal);

    [GeneratedRegex("(Helper|Util|Utils|Utility|Common|Manager|Base)s?$", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex VagueName();

    // Each pattern is written so that it does not find itself.
    [GeneratedRegex(@"(/ro{2}t/|/wor[k]/|/tm[p]/[a-z]|/hom[e]/[a-z]|C:\\User[s])",
        RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex MachinePath();

    [GeneratedRegex(@"\b(lectur[e]|transcrip[t]|seed documen[t]|recorded tal[k]|classroo[m]|homewor[k])",
        RegexOptions.IgnoreCase | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex UncitedWord();

    [GeneratedRegex(@"\b(TOD[O]|FIXM[E]|HAC[K]|NotImplementedExceptio[n])\b|#regio[n]",
        RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex LeftUndone();
}
