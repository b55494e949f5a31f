using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>A cause that is solved alone: pieces of one source, or what one
/// part stores at the start.</summary>
/// <param name="Name">The user's own part name, with what of it.</param>
/// <param name="Source">Index of the source; −1 for a stored quantity.</param>
/// <param name="Pieces">The pieces of the source's wave that belong to it.</param>
/// <param name="Store">Index of the part that stores; −1 for a source.</param>
/// <param name="Stored">What it stores at t = 0⁻: volts or amperes.</param>
public sealed record Cause(
    string Name, int Source, ImmutableArray<WavePiece> Pieces, int Store, double Stored)
{
    /// <summary>Whether it is one edge of its source.</summary>
    public bool IsEdge { get; init; }

    /// <summary>The pulse whose rise or fall it is; null for what is none.</summary>
    public string? Pulse { get; init; }
}

/// <summary>The causes of a study, in the order of the parts.</summary>
public sealed record CauseList(ImmutableArray<Cause> Causes)
{
    /// <summary>The most causes that edges may make: each is followed from edge to edge and to
    /// every observation, so time and memory grow with the square of their number (300: some 5 s
    /// and 0.4 GB for two observations).</summary>
    public const int MostEdges = 300;

    /// <summary>From the start: every source, and every stored quantity that is not zero.</summary>
    public static CauseList FromStart(Circuit circuit)
    {
        var causes = ImmutableArray.CreateBuilder<Cause>();
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            switch (circuit.Parts[i])
            {
                case VoltageSource { Wave: var wave }:
                    causes.Add(new Cause(circuit.Parts[i].Name, i, wave.Pieces, -1, 0));
                    break;
                case CurrentSource { Wave: var wave }:
                    causes.Add(new Cause(circuit.Parts[i].Name, i, wave.Pieces, -1, 0));
                    break;
                case Capacitor { InitialVoltage: { } v } c when IsListed(circuit, v):
                    causes.Add(new Cause($"{c.Name} initial charge", -1, [], i, v.Nominal));
                    break;
                case Inductor { InitialCurrent: { } current } l when IsListed(circuit, current):
                    causes.Add(new Cause($"{l.Name} initial current", -1, [], i, current.Nominal));
                    break;
            }
        }

        return new(causes.ToImmutable());
    }

    /// <summary>By edge: the edges of every source that begin within the study, and what is stored as from
    /// the start. A source of one edge that has always been on keeps its plain name.</summary>
    /// <returns>The causes; or which source has too many edges to be told apart.</returns>
    public static Outcome<CauseList> ByEdge(Circuit circuit)
    {
        var causes = ImmutableArray.CreateBuilder<Cause>();
        foreach (var cause in FromStart(circuit).Causes)
        {
            if (WaveOf(circuit, cause.Source) is not { } wave)
            {
                causes.Add(cause);
                continue;
            }

            var edges = WaveEdge.Of(wave).Where(e => e.Start == 0 || !(e.Start >= circuit.Until)).ToArray();
            if (causes.Count + edges.Length > MostEdges)
            {
                return new(null, [TooMany(circuit, cause, edges.Length)]);
            }

            var isPlain = edges is [{ Pieces: [{ IsPerpetual: true }] }];
            causes.AddRange(edges.Select(e => new Cause(
                isPlain ? cause.Name : $"{cause.Name} {e.Label}", cause.Source, e.Pieces, -1, 0)
            {
                IsEdge = true,
                Pulse = e.Pieces[0].Pulse,
            }));
        }

        return new(new(causes.ToImmutable()), []);
    }

    private static Diagnostic TooMany(Circuit circuit, Cause cause, int edges) => Diagnostic.Error(
        circuit.Source, circuit.Parts[cause.Source].Span,
        $"`{cause.Name}` has {edges} edges within the study; at most {MostEdges} are told apart in all",
        "end the study with `until` soon after the peak that is asked about, or break it down by origin");

    private static Wave? WaveOf(Circuit circuit, int source) =>
        (source < 0 ? null : circuit.Parts[source]) switch
        {
            VoltageSource s => s.Wave,
            CurrentSource s => s.Wave,
            _ => null,
        };

    /// <summary>The pieces of a source's wave with its scale.</summary>
    internal static DoubleDouble ScaleOf(Circuit circuit, int source) => circuit.Parts[source] switch
    {
        VoltageSource s => s.Wave.Scale.Nominal,
        CurrentSource s => s.Wave.Scale.Nominal,
        _ => DoubleDouble.One,
    };

    private static bool IsListed(Circuit circuit, Quantity stored) =>
        stored.Nominal != 0 || HasTolerance(circuit, stored.Formula);

    private static bool HasTolerance(Circuit circuit, Formula? formula) => formula switch
    {
        ParameterFormula p => circuit.Parameters[p.Index].Tolerance is not null,
        BinaryFormula b => HasTolerance(circuit, b.Left) || HasTolerance(circuit, b.Right),
        CallFormula c => HasTolerance(circuit, c.Argument),
        _ => false,
    };
}
