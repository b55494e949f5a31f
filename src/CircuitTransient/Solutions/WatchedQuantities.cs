using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Solutions;

/// <summary>The quantities that switches wait for, as curves: voltages, currents and their rates, powers,
/// stored energies, and integrals gathered since t = 0.</summary>
internal sealed class WatchedQuantities
{
    private readonly Circuit circuit;
    private readonly Dictionary<Measurand, double> gathered = [];

    public WatchedQuantities(Circuit circuit)
    {
        this.circuit = circuit;
        foreach (var declared in circuit.Parts.OfType<Switch>().SelectMany(s => s.Events))
        {
            if (declared.Trigger is WhenCrosses { Quantity: var quantity }
                && QuantityFactors.OfAny(circuit, quantity) is { IsIntegrated: true })
            {
                gathered[quantity] = 0;
            }
        }
    }

    /// <summary>Adds what a stretch of the study that is kept gathers.</summary>
    public void Gather(ImmutableArray<Segment> kept)
    {
        if (gathered.Count == 0)
        {
            return;
        }

        var tables = kept.Select(s => new SegmentTable(s)).ToArray();
        foreach (var quantity in gathered.Keys.ToArray())
        {
            if (Over(tables, quantity) is { Length: > 0 } pieces)
            {
                gathered[quantity] = ((AccumulatedPiece)pieces[^1]).AtEnd;
            }
        }
    }

    /// <summary>A quantity over consecutive segments that follow what is kept; null where the equations leave
    /// it open.</summary>
    public CurvePiece[]? Over(SegmentTable[] tables, Measurand quantity)
    {
        var pieces = new CurvePiece[tables.Length];
        var before = gathered.GetValueOrDefault(quantity);
        for (var k = 0; k < tables.Length; k++)
        {
            if (Piece(tables[k], quantity, before) is not { } piece)
            {
                return null;
            }

            pieces[k] = piece;
            before = piece is AccumulatedPiece sum ? sum.AtEnd : 0;
        }

        return pieces;
    }

    private CurvePiece? Piece(SegmentTable table, Measurand quantity, double before)
    {
        if (QuantityFactors.OfAny(circuit, quantity) is not { } product)
        {
            return Linear(table, quantity);
        }

        if (Linear(table, product.First) is not { } first || Linear(table, product.Second) is not { } second)
        {
            return null;
        }

        second = product.First == product.Second ? first : second;
        var piece = new QuadraticPiece(table, [new ProductTerm(product.Factor, first, second)]);
        return product.IsIntegrated ? new AccumulatedPiece(piece, before, from: 0) : piece;
    }

    private static LinearPiece? Linear(SegmentTable table, Measurand quantity) =>
        table.Segment.Coefficients(quantity) is { } coefficients
            ? new LinearPiece(table, coefficients)
            : null;
}
