using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The whole of a circuit's equations for given switch positions, nothing eliminated:
/// E x′ + G x = B u with E = P D Rᵀ, where q = D Rᵀ x are the stored quantities and P says in which rows
/// they stand.</summary>
/// <param name="Unknowns">What x is made of.</param>
/// <param name="Storage">What q is made of.</param>
/// <param name="Conductances">The elements of G, to be added where several share a place.</param>
/// <param name="StorageRows">The elements of P: row, stored quantity, sign.</param>
/// <param name="StorageColumns">The elements of R: unknown, stored quantity, sign.</param>
/// <param name="Inputs">The elements of B: row, part that is the source, sign.</param>
internal sealed record DescriptorEquations(
    UnknownLayout Unknowns, StorageLayout Storage, ImmutableArray<MatrixElement> Conductances,
    ImmutableArray<Incidence> StorageRows, ImmutableArray<Incidence> StorageColumns,
    ImmutableArray<Incidence> Inputs)
{
    /// <summary>The equations of a circuit.</summary>
    public static DescriptorEquations Of(
        Circuit circuit, StorageLayout storage, ImmutableArray<bool> closed, bool resistorsAsBranches) =>
        new Stamps(circuit, storage, UnknownLayout.Of(circuit, closed, resistorsAsBranches)).Equations();

    /// <summary>The elements of E, to be added where several share a place.</summary>
    public IEnumerable<MatrixElement> StorageElements()
    {
        var (rows, columns) =
            (StorageRows.ToLookup(row => row.Index), StorageColumns.ToLookup(column => column.Index));
        return
            from element in Storage.Values
            from row in rows[element.Row]
            from column in columns[element.Column]
            select new MatrixElement(row.Place, column.Place, element.Value * (row.Sign * column.Sign));
    }

    private sealed class Stamps(Circuit circuit, StorageLayout storage, UnknownLayout unknowns)
    {
        private readonly List<MatrixElement> conductances = [];
        private readonly List<Incidence> storageRows = [];
        private readonly List<Incidence> storageColumns = [];
        private readonly List<Incidence> inputs = [];

        public DescriptorEquations Equations()
        {
            for (var part = 0; part < circuit.Parts.Length; part++)
            {
                if (unknowns.Kinds[part] is not (Conduction.Gap or Conduction.SpareContact))
                {
                    Stamp(part, circuit.Parts[part], unknowns.CurrentUnknown[part]);
                }
            }

            return new DescriptorEquations(
                unknowns, storage, [.. conductances], [.. storageRows], [.. storageColumns], [.. inputs]);
        }

        private void Stamp(int part, Part p, int current)
        {
            if (current >= 0)
            {
                Leave(p.From, current, 1);
                Leave(p.To, current, -1);
            }

            switch (p)
            {
                case Resistor resistor: Resistance(p, current, resistor.Resistance.Nominal); break;
                case Switch @switch: Contact(p, current, @switch, unknowns.IsClosed[part]); break;
                case Capacitor: Capacitance(p, current, storage.IndexOf[part]); break;
                case Inductor: Inductance(p, current, storage.IndexOf[part]); break;
                case VoltageSource:
                    Voltage(current, p.From, p.To, 1);
                    inputs.Add(new Incidence(current, part, 1));
                    break;
                case CurrentSource when current >= 0:
                    conductances.Add(new MatrixElement(current, current, 1));
                    inputs.Add(new Incidence(current, part, 1));
                    break;
                case CurrentSource:
                    AddAt(inputs, p, part, -1);
                    break;
                case DependentSource dependent: Dependent(p, current, dependent); break;
                case IdealTransformer transformer: Transformer(p, current, transformer); break;
                default: throw new System.Diagnostics.UnreachableException($"no equation for {p.Kind}");
            }
        }

        private void Contact(Part p, int current, Switch @switch, bool isClosed)
        {
            if ((isClosed ? @switch.ClosedResistance : @switch.OpenResistance) is { } resistance)
            {
                Resistance(p, current, resistance.Nominal);
            }
            else
            {
                Voltage(current, p.From, p.To, 1);
            }
        }

        private void Resistance(Part p, int current, double resistance)
        {
            if (current >= 0)
            {
                Voltage(current, p.From, p.To, 1);
                conductances.Add(new MatrixElement(current, current, -resistance));
                return;
            }

            var conductance = DoubleDouble.One / resistance;
            Conduct(p, p.From, p.To, conductance);
        }

        // A current from p.From to p.To that is a multiple of the voltage from a to b.
        private void Conduct(Part p, int a, int b, DoubleDouble conductance)
        {
            foreach (var (node, sign) in new[] { (p.From, 1.0), (p.To, -1.0) })
            {
                if (unknowns.NodeUnknown[node] is >= 0 and var row)
                {
                    Voltage(row, a, b, conductance * sign);
                }
            }
        }

        private void Capacitance(Part p, int current, int stored)
        {
            AddAt(storageColumns, p, stored, 1);
            if (current < 0)
            {
                AddAt(storageRows, p, stored, 1);
                return;
            }

            storageRows.Add(new Incidence(current, stored, 1));
            conductances.Add(new MatrixElement(current, current, -1));
        }

        private void Inductance(Part p, int current, int stored)
        {
            storageRows.Add(new Incidence(current, stored, 1));
            storageColumns.Add(new Incidence(current, stored, 1));
            Voltage(current, p.From, p.To, -1);
        }

        private void Dependent(Part p, int current, DependentSource source)
        {
            var gain = source.Gain.Nominal;
            if (source.SetsVoltage)
            {
                Voltage(current, p.From, p.To, 1);
                Control(current, source.Control, -gain);
            }
            else if (current >= 0)
            {
                conductances.Add(new MatrixElement(current, current, 1));
                Control(current, source.Control, -gain);
            }
            else
            {
                foreach (var (node, sign) in new[] { (p.From, 1), (p.To, -1) })
                {
                    if (unknowns.NodeUnknown[node] is >= 0 and var row)
                    {
                        Control(row, source.Control, sign * gain);
                    }
                }
            }
        }

        private void Control(int row, Measurand control, double factor)
        {
            switch (control)
            {
                case VoltageBetween between: Voltage(row, between.From, between.To, factor); break;
                case VoltageAcross across:
                    Voltage(row, circuit.Parts[across.Part].From, circuit.Parts[across.Part].To, factor);
                    break;
                case CurrentThrough through
                    when unknowns.CurrentUnknown[through.Part] is >= 0 and var current:
                    conductances.Add(new MatrixElement(row, current, through.Delivered ? -factor : factor));
                    break;
                case CurrentThrough: break; // an open gap: nothing to follow
                default: throw new System.Diagnostics.UnreachableException($"no control by {control}");
            }
        }

        private void Transformer(Part p, int current, IdealTransformer transformer)
        {
            Voltage(current, p.From, p.To, 1);
            Voltage(current, transformer.SecondaryFrom, transformer.SecondaryTo, -transformer.Ratio);
            Leave(transformer.SecondaryFrom, current, -transformer.Ratio);
            Leave(transformer.SecondaryTo, current, transformer.Ratio);
        }

        // A current that is a multiple of an unknown leaves a node.
        private void Leave(int node, int current, double factor)
        {
            if (unknowns.NodeUnknown[node] is >= 0 and var row)
            {
                conductances.Add(new MatrixElement(row, current, factor));
            }
        }

        // A multiple of the voltage from a to b stands in a row.
        private void Voltage(int row, int a, int b, DoubleDouble factor)
        {
            if (unknowns.NodeUnknown[a] is >= 0 and var first)
            {
                conductances.Add(new MatrixElement(row, first, factor));
            }

            if (unknowns.NodeUnknown[b] is >= 0 and var second)
            {
                conductances.Add(new MatrixElement(row, second, -factor));
            }
        }

        private void AddAt(List<Incidence> list, Part p, int index, int sign)
        {
            if (unknowns.NodeUnknown[p.From] is >= 0 and var from)
            {
                list.Add(new Incidence(from, index, sign));
            }

            if (unknowns.NodeUnknown[p.To] is >= 0 and var to)
            {
                list.Add(new Incidence(to, index, -sign));
            }
        }
    }
}

/// <summary>An element of a matrix.</summary>
internal readonly record struct MatrixElement(int Row, int Column, DoubleDouble Value);

/// <summary>Plus or minus one at a row or unknown (<paramref name="Place"/>) for a stored quantity or a
/// source.</summary>
internal readonly record struct Incidence(int Place, int Index, int Sign);
