using System.Collections.Immutable;
using System.Reflection;
using System.Security.Cryptography;
using System.Text;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Cli;

/// <summary>The file in which an interrupted study of tolerances leaves its draws, with everything they
/// depend on, so that only the same study takes them up.</summary>
public static class SpreadPartial
{
    /// <summary>Its name in the folder of results.</summary>
    public const string Name = "spread.partial";

    private const string Format = "circuit-transient spread partial 1";

    /// <summary>The whole file.</summary>
    public static byte[] Write(SpreadStudy study, string sha256, SpreadOptions options)
    {
        using var memory = new MemoryStream();
        using (var to = new BinaryWriter(memory, Encoding.UTF8))
        {
            foreach (var (_, line) in Heading(study, sha256, options))
            {
                to.Write(line);
            }

            study.SaveDraws(to);
        }

        return memory.ToArray();
    }

    /// <summary>Takes up the draws of a file.</summary>
    /// <returns>Null, or why it cannot be taken up.</returns>
    public static string? Load(byte[] content, SpreadStudy study, string sha256, SpreadOptions options)
    {
        using var from = new BinaryReader(new MemoryStream(content), Encoding.UTF8);
        try
        {
            foreach (var (what, line) in Heading(study, sha256, options))
            {
                var found = from.ReadString();
                if (found != line)
                {
                    return what.Replace("{}", found);
                }
            }

            study.LoadDraws(from);
            return from.BaseStream.Position == content.Length ? null : "it is damaged";
        }
        catch (Exception trouble) when (trouble is EndOfStreamException or FormatException
            or ArgumentException or OverflowException or IndexOutOfRangeException)
        {
            return "it is damaged";
        }
    }

    private static ImmutableArray<(string What, string Line)> Heading(
        SpreadStudy study, string sha256, SpreadOptions options)
    {
        var inputs = SHA256.HashData(Encoding.UTF8.GetBytes(string.Join('\n', study.Inputs)));
        var version = typeof(SpreadPartial).Assembly
            .GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "";
        return
        [
            ("it is not the unfinished draws of a spread", Format),
            ("it was left by version {} of this program", version),
            ("it is of another circuit, or the circuit has changed since", sha256),
            ("it was asked for {}, which goes on with it", $"--draws {options.Draws} --seed {options.Seed}"),
            ("a file that the circuit reads has changed since", Convert.ToHexStringLower(inputs)),
        ];
    }
}
