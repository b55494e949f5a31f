using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Moves forward in time over the pieces of all sources and tells the states of the
/// <see cref="InputModel"/> there. A constant that never ends is summed once and forgotten, so a long train
/// of pulses costs each edge once.</summary>
internal sealed class InputCursor
{
    private readonly InputModel model;
    private readonly List<ActivePiece> waiting = []; // latest first
    private readonly List<ActivePiece> active = [];
    private readonly DoubleDouble[] constant;

    /// <summary>Stands before every piece.</summary>
    public InputCursor(Circuit circuit, InputModel model)
    {
        this.model = model;
        constant = new DoubleDouble[model.StateCount];
        foreach (var group in model.Groups)
        {
            var wave = InputModel.WaveOf(circuit.Parts[group.Part])!;
            foreach (var piece in wave.Pieces)
            {
                if (piece.DecayRate == group.DecayRate && piece.AngularFrequency == group.AngularFrequency)
                {
                    waiting.Add(new ActivePiece(group, piece, wave.Scale.Nominal));
                }
            }
        }

        waiting.Sort((a, b) => b.Piece.Start.CompareTo(a.Piece.Start));
    }

    /// <summary>The states just after an instant, which must not lie before that of the last call.</summary>
    public DoubleDouble[] StatesAfter(double time)
    {
        while (waiting.Count > 0 && waiting[^1].Piece.Start <= time)
        {
            Activate(waiting[^1]);
            waiting.RemoveAt(waiting.Count - 1);
        }

        active.RemoveAll(entry => entry.Piece.End <= time);
        var states = (DoubleDouble[])constant.Clone();
        foreach (var entry in active)
        {
            Add(states, entry, time);
        }

        return states;
    }

    private void Activate(ActivePiece entry)
    {
        var piece = entry.Piece;
        if (piece is { Slope: 0, DecayRate: 0, AngularFrequency: 0, End: double.PositiveInfinity })
        {
            var phase = piece.Phase == 0 ? DoubleDouble.One : DoubleDouble.SinCos(piece.Phase).Cos;
            constant[entry.Group.First] += DoubleDouble.FromProduct(piece.Amplitude, entry.Scale) * phase;
        }
        else
        {
            active.Add(entry);
        }
    }

    private static void Add(DoubleDouble[] states, ActivePiece entry, double time)
    {
        var (group, piece) = (entry.Group, entry.Piece);
        var since = (DoubleDouble)time - piece.Start;
        var size = piece.DecayRate == 0
            ? entry.Scale
            : DoubleDouble.Exp(since * -piece.DecayRate) * entry.Scale;
        var value = (since * piece.Slope + piece.Amplitude) * size;
        var slope = size * piece.Slope;
        var (sin, cos) = DoubleDouble.SinCos((since * piece.AngularFrequency) + piece.Phase);
        states[group.First] += value * cos;
        if (group.Oscillates)
        {
            states[group.First + 1] += value * sin;
        }

        if (group.HasSlope)
        {
            var half = group.First + (group.StateCount / 2);
            states[half] += slope * cos;
            if (group.Oscillates)
            {
                states[half + 1] += slope * sin;
            }
        }
    }

    private readonly record struct ActivePiece(InputGroup Group, WavePiece Piece, double Scale);
}
