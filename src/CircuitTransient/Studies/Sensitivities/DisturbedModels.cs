using CircuitTransient.Equations;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The networks of a solution with a disturbance on the right side of each law that a value reaches:
/// the same equations and blocks, with more inputs.</summary>
internal sealed class DisturbedModels(NetworkLayout layout)
{
    private readonly Dictionary<IntervalModel, IntervalModel?> models = [];

    /// <summary>The network; null where a value decides whether the equations have a solution at
    /// all.</summary>
    public IntervalModel? For(IntervalModel model)
    {
        if (!models.TryGetValue(model, out var disturbed))
        {
            var rows = NetworkEquations.Assemble(layout, model.IsClosed);
            var form = DescriptorReduction.Reduce(layout, rows, out _);
            disturbed = form is null ? null : new IntervalModel(form, model.IsClosed, model.Blocks);
            models.Add(model, disturbed);
        }

        return disturbed;
    }
}
