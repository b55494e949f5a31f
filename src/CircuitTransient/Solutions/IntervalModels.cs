using System.Collections.Immutable;
using CircuitTransient.Equations;

namespace CircuitTransient.Solutions;

/// <summary>The networks of the switch positions met so far: equal positions share one.</summary>
public sealed class IntervalModels(NetworkLayout layout, CancellationToken cancellation)
{
    private readonly Dictionary<string, IntervalModel?> models = [];

    /// <summary>The network with the switches in these positions; null where its equations have no unique
    /// solution.</summary>
    /// <exception cref="OperationCanceledException">The work was stopped between two of its steps, each of
    /// which grows with the cube of the network's order.</exception>
    public IntervalModel? For(ImmutableArray<bool> isClosed)
    {
        var key = string.Concat(isClosed.Select(c => c ? '1' : '0'));
        if (!models.TryGetValue(key, out var model))
        {
            cancellation.ThrowIfCancellationRequested();
            var form = DescriptorReduction.Reduce(layout, NetworkEquations.Assemble(layout, isClosed), out _);
            cancellation.ThrowIfCancellationRequested();
            model = form is null ? null : new IntervalModel(form, isClosed);
            models.Add(key, model);
        }

        return model;
    }
}
