using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Studies.Draws;

/// <summary>Tries a new kernel against the exact engine at a few sets of values, so that what its making
/// overlooked (a named value that a wave follows, too) sends the study the exact route.</summary>
internal static class KernelTrial
{
    private const int Trials = 5;
    private const double Allowed = 1e-6; // relative: what draws promise
    private const double Nothing = 1e-30; // in SI units: what has died away is rounding

    /// <summary>Why the kernel cannot be used; null where it agrees with the exact engine.</summary>
    public static string? Find(
        DrawKernel kernel, VariedCircuit varied, ImmutableArray<StudyFigure> figures,
        CancellationToken cancellation)
    {
        var workspace = kernel.CreateWorkspace();
        var values = new double[varied.Values.Length];
        var found = new double[figures.Length];
        var times = new double[figures.Length];
        var reliable = 0;
        for (var trial = 0; trial < Trials; trial++)
        {
            Put(varied, trial, values);
            if (kernel.Evaluate(workspace, values, found, times) == DrawStatus.Doubtful)
            {
                continue;
            }

            var circuit = varied.At(values);
            if (!circuit.Succeeded)
            {
                return "it takes values that no part can have";
            }

            if (StudySolver.At(circuit.Value, figures, cancellation).Value is not { } exact)
            {
                return "it finds a solution where there is none";
            }

            reliable++;
            for (var i = 0; i < figures.Length; i++)
            {
                if (kernel.Unserved[i] is null
                    && !Agree(found[i], exact.Values[i], Size(varied.Circuit, figures, i, exact)))
                {
                    return $"double precision gives {found[i]:G9} for `{figures[i].Name}` where the exact "
                        + $"engine gives {exact.Values[i]:G9}";
                }
            }
        }

        return reliable > 0 ? null : "double precision is not enough for it";
    }

    /// <summary>Values spread over the tolerances, or over ten per cent where there are none.</summary>
    private static void Put(VariedCircuit varied, int trial, double[] values)
    {
        for (var i = 0; i < values.Length; i++)
        {
            var value = varied.Values[i];
            var share = ((trial * 0.618034) + (i * 0.414214) + 0.37) % 1;
            values[i] = value.Tolerance is { } t && t.Highest > t.Lowest
                ? t.Lowest + (share * (t.Highest - t.Lowest))
                : value.Kind == VariedKind.SourcePhase ? value.Nominal + share
                : value.Nominal * (0.95 + (0.1 * share));
        }
    }

    private static bool Agree(double found, double? exact, double size) =>
        exact is not { } value || !double.IsFinite(value)
            ? double.IsNaN(found) || found == exact
            : Math.Abs(found - value) <= (Allowed * size) + Nothing;

    /// <summary>What an error is measured by: an extreme by the larger of its observation's two, a margin by
    /// the limit, too, that it is the distance to.</summary>
    private static double Size(
        Circuit circuit, ImmutableArray<StudyFigure> figures, int index, StudyPoint exact)
    {
        var figure = figures[index];
        var size = Math.Abs(exact.Values[index] ?? 0);
        if (figure.Kind == StudyFigureKind.Margin)
        {
            return size + circuit.Requirements[figure.Index].Bound switch
            {
                Limits l => Math.Max(Math.Abs(l.Lower ?? 0), Math.Abs(l.Upper ?? 0)),
                SettlesTo s => Math.Abs(s.Target),
                _ => 0,
            };
        }

        if (figure.Kind == StudyFigureKind.RatingUsed)
        {
            return Math.Max(size, 1e-9); // a rating used by a billionth is not used
        }

        for (var i = 0; i < figures.Length; i++)
        {
            var isSibling = figures[i].Index == figure.Index
                && figures[i].Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum;
            size = isSibling ? Math.Max(size, Math.Abs(exact.Values[i] ?? 0)) : size;
        }

        return size;
    }
}
