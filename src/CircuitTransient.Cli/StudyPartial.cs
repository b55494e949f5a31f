using System.Collections.Immutable;
using System.Reflection;
using System.Security.Cryptography;
using System.Text;

namespace CircuitTransient.Cli;

/// <summary>The file in which an interrupted study leaves what it has worked out: a heading with all that
/// depends on, so that only the same study takes it up, then what the study saved, then the SHA-256 of
/// both.</summary>
/// <param name="study">The study's command: <c>spread</c>, <c>scan</c>.</param>
/// <param name="holds">What is left unfinished, in the plural: <c>draws</c>, <c>points</c>.</param>
/// <param name="path">Where the file is or goes; null where no files are wanted.</param>
public sealed class StudyPartial(string study, string holds, string? path)
{
    /// <summary>The file of a study in the folder of its results.</summary>
    public static StudyPartial In(string? root, string file, string study, string holds) => new(
        study, holds, root is null ? null : Path.Combine(OutputFolder.For(root, file), $"{study}.partial"));

    /// <summary>Before any work: says what keeps a study from being resumed at all, or what one that begins
    /// anew replaces.</summary>
    /// <returns>The status to end with; null where the work begins.</returns>
    public int? Refusal(bool resumes, Streams streams)
    {
        if (resumes && (path is null || !File.Exists(path)))
        {
            streams.Complain(path is null
                ? "`--resume` needs the folder of results, and `--no-files` wants none"
                : $"there is nothing to go on with: {path} does not exist");
            return ExitStatus.Mistake;
        }

        if (!resumes && File.Exists(path))
        {
            streams.Error.WriteLine(
                $"{path} holds unfinished {holds}, which this run replaces; `--resume` would go on with "
                + "them");
        }

        return null;
    }

    /// <summary>Says why the file cannot be taken up by a study.</summary>
    /// <returns>The status to end with; null where it can.</returns>
    public int? Refusal(PartialIdentity identity, Streams streams)
    {
        try
        {
            if (Mismatch(identity) is not { } reason)
            {
                return null;
            }

            streams.Complain($"{path} cannot be taken up: {reason}; without `--resume` the study begins anew "
                + "and replaces it");
            return ExitStatus.Mistake;
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            streams.Complain($"{path} cannot be read: {FileTrouble.Reason(trouble)}");
            return ExitStatus.FileTrouble;
        }
    }

    /// <summary>Hands the study what it saved, once nothing refuses it.</summary>
    public void Load(PartialIdentity identity, Action<BinaryReader> load)
    {
        using var from = new BinaryReader(File.OpenRead(path!), Encoding.UTF8);
        foreach (var _ in Heading(identity))
        {
            from.ReadString();
        }

        load(from);
    }

    /// <summary>Writes the file, whole or not at all, and says how to go on.</summary>
    /// <param name="identity">The study.</param>
    /// <param name="save">Writes what it has worked out.</param>
    /// <param name="after">How far it came: <c>57 of 200 points</c>.</param>
    /// <param name="words">The command that was stopped, without <c>--resume</c>.</param>
    /// <param name="streams">Where to say it.</param>
    public void Leave(
        PartialIdentity identity, Action<BinaryWriter> save, string after, ImmutableArray<string> words,
        Streams streams)
    {
        try
        {
            Directory.CreateDirectory(Path.GetDirectoryName(path!)!);
            using var unfinished = new UnfinishedFile(path!, file => Write(file, identity, save));
            unfinished.Finish();
            var command = CommandText.Of([.. words, "--resume"]);
            streams.Error.WriteLine($"stopped after {after}; go on with `{command}`");
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            streams.Complain($"stopped after {after}, which cannot be kept in {path}: "
                + FileTrouble.Reason(trouble));
        }
    }

    /// <summary>Whether there is a place for it.</summary>
    public bool IsWanted => path is not null;

    /// <summary>Removes it, once the study is finished.</summary>
    public void Remove()
    {
        if (File.Exists(path))
        {
            File.Delete(path);
        }
    }

    private string? Mismatch(PartialIdentity identity)
    {
        using var file = File.OpenRead(path!);
        using var from = new BinaryReader(file, Encoding.UTF8);
        try
        {
            foreach (var (what, line) in Heading(identity))
            {
                var found = from.ReadString();
                if (found != line)
                {
                    return what.Replace("{}", found, StringComparison.Ordinal);
                }
            }
        }
        catch (Exception damage) when (damage is IOException or FormatException)
        {
            return "it is damaged";
        }

        return IsWhole(file) ? null : "it is damaged";
    }

    /// <summary>Whether the file ends with the hash of all before.</summary>
    private static bool IsWhole(FileStream file)
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        var buffer = new byte[1 << 16];
        file.Position = 0;
        for (var left = file.Length - SHA256.HashSizeInBytes; left > 0;)
        {
            var count = file.Read(buffer, 0, (int)Math.Min(left, buffer.Length));
            hash.AppendData(buffer, 0, count);
            left -= count;
        }

        var stored = new byte[SHA256.HashSizeInBytes];
        return file.Read(stored) == stored.Length && hash.GetHashAndReset().AsSpan().SequenceEqual(stored);
    }

    private void Write(Stream file, PartialIdentity identity, Action<BinaryWriter> save)
    {
        using var hash = SHA256.Create();
        using (var hashed = new CryptoStream(file, hash, CryptoStreamMode.Write, leaveOpen: true))
        using (var to = new BinaryWriter(new BufferedStream(hashed, 1 << 16), Encoding.UTF8))
        {
            foreach (var (_, line) in Heading(identity))
            {
                to.Write(line);
            }

            save(to);
        }

        file.Write(hash.Hash);
    }

    private ImmutableArray<(string What, string Line)> Heading(PartialIdentity identity)
    {
        var version = typeof(StudyPartial).Assembly
            .GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "";
        return
        [
            ($"it does not hold the unfinished {holds} of a {study}", $"circuit-transient {study} partial 2"),
            ("it was left by version {} of this program", version),
            ("it is of another circuit, or the circuit has changed since", identity.Circuit),
            ("a file that the circuit reads has changed since", identity.Beside),
            ("it was asked for {}, which goes on with it", identity.Asked),
        ];
    }
}

/// <summary>All that the results of a study depend on besides the program itself.</summary>
/// <param name="Circuit">SHA-256 of the circuit file.</param>
/// <param name="Beside">SHA-256 of every file that the circuit reads, one after another.</param>
/// <param name="Asked">What was asked for, as it is written on the command line.</param>
public sealed record PartialIdentity(string Circuit, string Beside, string Asked)
{
    /// <summary>The identity of a study of a file that was read, with all files beside it.</summary>
    public static PartialIdentity Of(CircuitFile reading, string asked) =>
        new(reading.Source!.Sha256, string.Join(' ', reading.BesideSha256), asked);
}
