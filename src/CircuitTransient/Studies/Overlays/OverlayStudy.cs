using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>Lays oscilloscope records over the solution of a circuit.</summary>
public static class OverlayStudy
{
    /// <summary>Compares every record with its circuit.</summary>
    /// <param name="circuit">The circuit as the file has it.</param>
    /// <param name="records">The records, each with the circuit it was taken on.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The result; or what is wrong with a record, or why a circuit has no solution.</returns>
    public static Outcome<OverlayResult> Compare(
        Circuit circuit, ImmutableArray<PlacedRecord> records, CancellationToken cancellation = default)
    {
        var compared = ImmutableArray.CreateBuilder<RecordComparison>();
        foreach (var placed in records)
        {
            var outcome = ModelCurve.Solve(placed.Circuit, placed.Observation, cancellation)
                .Then(model => new RecordComparer(placed, model).Compare(cancellation));
            if (!outcome.Succeeded)
            {
                return new(null, outcome.Diagnostics);
            }

            compared.Add(outcome.Value);
        }

        return new(new OverlayResult(circuit, compared.ToImmutable(), null), []);
    }
}
