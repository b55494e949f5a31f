using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Fixes what the sources leave open in a settled start by what the file states.</summary>
internal static class OpenQuantities
{
    /// <summary>Adds to every cause the multiple of each held quantity (exact zero pole) that makes stated
    /// parts hold what they state, then replaces stated quantities; an error where something open is not
    /// stated.</summary>
    public static Diagnostic? Fix(
        IntervalModel model, NetworkLayout layout, ImmutableArray<Cause> causes, DoubleDouble[][] stored)
    {
        var directions = Directions(model, layout);
        var stated = Stated(layout);
        foreach (var direction in directions)
        {
            var anchor = Enumerable.Range(0, direction.Length)
                .Where(k => stated.Contains(k) && !direction[k].IsZero).DefaultIfEmpty(-1).First();
            if (anchor < 0)
            {
                return Unstated(layout, direction);
            }

            for (var c = 0; c < causes.Length; c++)
            {
                var wanted = causes[c].Store == layout.Stores[anchor]
                    ? (DoubleDouble)causes[c].Stored
                    : DoubleDouble.Zero;
                Add(stored[c], (wanted - stored[c][anchor]) / direction[anchor], direction);
            }

            Eliminate(directions, direction, anchor);
        }

        Replace(layout, causes, stored, stated);
        return null;
    }

    /// <summary>What each exact zero pole can hold, seen in every store.</summary>
    private static List<DoubleDouble[]> Directions(IntervalModel model, NetworkLayout layout)
    {
        var directions = new List<DoubleDouble[]>();
        for (var b = 0; b < model.Blocks.Length; b++)
        {
            for (var i = 0; i < model.Blocks[b].Size; i++)
            {
                if (model.Blocks[b].T[i, i].IsZero)
                {
                    directions.Add([.. layout.Stores
                        .Select(p => Clean(model.Project(layout.Held(p)).Rows[b][i].Re))]);
                }
            }
        }

        return directions;
    }

    private static DoubleDouble Clean(DoubleDouble x) => Math.Abs(x.Hi) < 1e-20 ? DoubleDouble.Zero : x;

    private static HashSet<int> Stated(NetworkLayout layout) =>
        [.. Enumerable.Range(0, layout.Stores.Length).Where(k => layout.Circuit.Parts[layout.Stores[k]] is
            Capacitor { InitialVoltage: not null } or Inductor { InitialCurrent: not null })];

    /// <summary>Takes the fixed store out of the directions still to come.</summary>
    private static void Eliminate(List<DoubleDouble[]> directions, DoubleDouble[] by, int anchor)
    {
        foreach (var other in directions.SkipWhile(d => !ReferenceEquals(d, by)).Skip(1))
        {
            Add(other, -other[anchor] / by[anchor], by);
            for (var k = 0; k < other.Length; k++)
            {
                other[k] = Clean(other[k]);
            }
        }
    }

    /// <summary>A stated quantity is its own cause's alone.</summary>
    private static void Replace(
        NetworkLayout layout, ImmutableArray<Cause> causes, DoubleDouble[][] stored, HashSet<int> stated)
    {
        foreach (var k in stated)
        {
            for (var c = 0; c < causes.Length; c++)
            {
                stored[c][k] = causes[c].Store == layout.Stores[k] ? causes[c].Stored : DoubleDouble.Zero;
            }
        }
    }

    private static void Add(DoubleDouble[] sum, DoubleDouble f, DoubleDouble[] x)
    {
        for (var k = 0; k < sum.Length; k++)
        {
            sum[k] += f * x[k];
        }
    }

    private static Diagnostic? Unstated(NetworkLayout layout, DoubleDouble[] direction)
    {
        var holders = Enumerable.Range(0, direction.Length).Where(k => !direction[k].IsZero)
            .Select(k => layout.Circuit.Parts[layout.Stores[k]]).ToArray();
        if (holders.Length == 0)
        {
            return null;
        }

        var names = string.Join(", ", holders.Select(p => $"`{p.Name}`"));
        var advice = holders[0] is Capacitor
            ? $"say what it is charged to: `charged to 0 V` on {holders[0].Name}"
            : $"say what it carries: `carrying 0 A` on {holders[0].Name}";
        return Diagnostic.Error(
            layout.Circuit.Source, holders[0].Span,
            $"the settled start leaves open what {names} hold: no source and no resistor decides it", advice);
    }
}
