using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The sources as a linear system that runs by itself, w′ = S w, so that the circuit with its
/// sources has no input left. For each source and each pair of decay rate and angular frequency among its
/// pieces there are the states a, for e^(−dτ) cos ωτ; b beside it where ω is not zero; and the same again,
/// as their slopes, where a piece has a slope. A source's value is the sum of its a.</summary>
/// <param name="Groups">The groups, sources in the order of their parts.</param>
/// <param name="StateCount">Number of states.</param>
internal sealed record InputModel(ImmutableArray<InputGroup> Groups, int StateCount)
{
    /// <summary>The model of a circuit's sources.</summary>
    public static InputModel Of(Circuit circuit)
    {
        var groups = ImmutableArray.CreateBuilder<InputGroup>();
        var count = 0;
        for (var part = 0; part < circuit.Parts.Length; part++)
        {
            if (WaveOf(circuit.Parts[part]) is not { } wave)
            {
                continue;
            }

            foreach (var group in wave.Pieces.GroupBy(piece => (piece.DecayRate, piece.AngularFrequency)))
            {
                var hasSlope = group.Any(piece => piece.Slope != 0);
                var (decayRate, angularFrequency) = group.Key;
                groups.Add(new InputGroup(part, decayRate, angularFrequency, hasSlope, count));
                count += groups[^1].StateCount;
            }
        }

        return new InputModel(groups.ToImmutable(), count);
    }

    /// <summary>The wave of an independent source; null for any other part.</summary>
    public static Wave? WaveOf(Part part) => part switch
    {
        VoltageSource source => source.Wave,
        CurrentSource source => source.Wave,
        _ => null,
    };

    /// <summary>The elements of S.</summary>
    public IEnumerable<MatrixElement> Rates()
    {
        foreach (var group in Groups)
        {
            for (var state = 0; state < group.StateCount; state++)
            {
                var at = group.First + state;
                yield return new MatrixElement(at, at, -group.DecayRate);
                if (group.Oscillates)
                {
                    yield return state % 2 == 0
                        ? new MatrixElement(at, at + 1, -group.AngularFrequency)
                        : new MatrixElement(at, at - 1, group.AngularFrequency);
                }

                if (group.HasSlope && state < group.StateCount / 2)
                {
                    yield return new MatrixElement(at, at + (group.StateCount / 2), 1);
                }
            }
        }
    }

    /// <summary>The instants in a span at which some piece starts or ends, in order, each once.</summary>
    public static ImmutableArray<double> Corners(Circuit circuit, double from, double until) =>
        [
            .. circuit.Parts.Select(WaveOf).OfType<Wave>().SelectMany(wave => wave.Pieces)
                .SelectMany(piece => new[] { piece.Start, piece.End })
                .Where(time => time > from && time < until).Distinct().Order(),
        ];
}

/// <summary>The states of one source that share a decay rate (1/s) and an angular frequency
/// (rad/s).</summary>
internal readonly record struct InputGroup(
    int Part, double DecayRate, double AngularFrequency, bool HasSlope, int First)
{
    /// <summary>Whether there is a sine beside the cosine.</summary>
    public bool Oscillates => AngularFrequency != 0;

    /// <summary>Number of states.</summary>
    public int StateCount => (Oscillates ? 2 : 1) * (HasSlope ? 2 : 1);
}
