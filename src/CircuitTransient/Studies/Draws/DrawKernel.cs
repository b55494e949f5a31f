using System.Collections.Immutable;

namespace CircuitTransient.Studies.Draws;

/// <summary>What a draw's figures are worth.</summary>
public enum DrawStatus
{
    /// <summary>Every figure that the kernel serves is within its bound of error.</summary>
    Reliable,

    /// <summary>Some figure may be wrong, or the draw's events leave their nominal order, or a value is none
    /// that a part can have: the exact engine must give this draw.</summary>
    Doubtful,
}

/// <summary>Evaluates a varied circuit's figures for very many sets of values, in double precision. The
/// equations are reduced once, in double-double, with an instrument at every varied part; a draw then costs
/// one small linear system and one small eigenproblem for each set of switch positions, and a walk along the
/// closed form. The same values give the same bits on whatever thread.</summary>
public sealed class DrawKernel
{
    private readonly VariedCircuit varied;

    private DrawKernel(
        VariedCircuit varied, InstrumentedCircuit circuit, DrawPlan plan, FigurePlan figures,
        ImmutableArray<VariedForm> forms)
    {
        this.varied = varied;
        Circuit = circuit;
        Plan = plan;
        Figures = figures;
        Forms = forms;
        Values = new DrawValues(circuit, varied.Values);
        Waves = new SourceWaves(circuit);
        Unserved = [.. figures.Figures.Select(f => (f as ExactFigure)?.Reason ?? Missing(f))];
    }

    /// <summary>For every figure, why the kernel does not serve it and the exact engine must; null where it
    /// serves it.</summary>
    public ImmutableArray<string?> Unserved { get; }

    /// <summary>How many values a draw has.</summary>
    public int ValueCount => varied.Values.Length;

    internal InstrumentedCircuit Circuit { get; }

    internal DrawPlan Plan { get; }

    internal FigurePlan Figures { get; }

    internal ImmutableArray<VariedForm> Forms { get; }

    internal DrawValues Values { get; }

    internal SourceWaves Waves { get; }

    /// <summary>The kernel of a varied circuit.</summary>
    /// <param name="varied">The circuit and what varies in it.</param>
    /// <param name="figures">The figures to follow.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The kernel; or null, with the reason why every draw must go to the exact engine.</returns>
    public static (DrawKernel? Kernel, string? Reason) For(
        VariedCircuit varied, ImmutableArray<StudyFigure> figures, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(varied);
        var isVaried = new bool[varied.Circuit.Parameters.Length];
        foreach (var value in varied.Values.Where(v => v.Parameter >= 0))
        {
            isVaried[value.Parameter] = true;
        }

        var (circuit, reason) = InstrumentedCircuit.Of(varied.Circuit, isVaried);
        if (circuit is null)
        {
            return (null, reason);
        }

        var (plan, undecided) = DrawPlan.Of(varied.Circuit, varied.Values);
        if (plan is null)
        {
            return (null, undecided);
        }

        var followed = FigurePlan.Of(circuit, figures);
        var forms = ImmutableArray.CreateBuilder<VariedForm>();
        foreach (var positions in plan.Positions)
        {
            cancellation.ThrowIfCancellationRequested();
            var (form, singular) = VariedFormBuilder.Build(circuit, positions, followed.Rows);
            if (form is null)
            {
                return (null, singular);
            }

            forms.Add(form);
        }

        var kernel = new DrawKernel(varied, circuit, plan, followed, forms.ToImmutable());
        return KernelTrial.Find(kernel, varied, figures, cancellation) is { } wrong
            ? (null, wrong)
            : (kernel, null);
    }

    /// <summary>The memory that one thread works in.</summary>
    public DrawWorkspace CreateWorkspace() => new(this);

    /// <summary>Evaluates the figures of one draw.</summary>
    /// <param name="workspace">This thread's memory.</param>
    /// <param name="values">A value in SI for each varied one.</param>
    /// <param name="figures">Takes the figures; not a number where one does not exist, is infinite or is not
    /// served. A margin that is infinitely negative is negative infinity.</param>
    /// <param name="times">Takes when each stood, in seconds; not a number where there is no instant.</param>
    public DrawStatus Evaluate(
        DrawWorkspace workspace, ReadOnlySpan<double> values, Span<double> figures, Span<double> times)
    {
        MustBeOurs(workspace);
        return workspace.Evaluate(values, figures, times);
    }

    /// <summary>Samples an observation of the draw evaluated last; at a jump the value after it.</summary>
    /// <param name="workspace">The memory it was evaluated in.</param>
    /// <param name="observation">Index of the observation.</param>
    /// <param name="times">Instants in seconds, in order.</param>
    /// <param name="samples">Takes the values.</param>
    /// <returns>False where this observation cannot be sampled here: an integral, a figure, or one that the
    /// equations leave open.</returns>
    public bool Sample(
        DrawWorkspace workspace, int observation, ReadOnlySpan<double> times, Span<double> samples)
    {
        MustBeOurs(workspace);
        return workspace.Sample(observation, times, samples);
    }

    private void MustBeOurs(DrawWorkspace workspace)
    {
        ArgumentNullException.ThrowIfNull(workspace);
        if (workspace.Kernel != this)
        {
            throw new ArgumentException("the workspace was made by another kernel", nameof(workspace));
        }
    }

    /// <summary>Whether every form holds a function's row.</summary>
    internal bool IsServed(int function) => function < 0
        || Forms.All(f => f.IsServed[Figures.Functions[function].Row]);

    private string? Missing(PlannedFigure figure)
    {
        var (first, second) = figure switch
        {
            ExtremeFigure f => Of(Figures.Tracks[f.Track]),
            MarginFigure f => Of(Figures.Tracks[f.Track]),
            SettlingFigure f => Of(Figures.Tracks[f.Track]),
            PeakUsedFigure f => Of(Figures.Tracks[f.Track]),
            StoredEnergyFigure f => Of(Figures.Tracks[f.Track]),
            IntegralFigure f => Of(Figures.Integrals[f.Integral]),
            IntegralMarginFigure f => Of(Figures.Integrals[f.Integral]),
            IntegralUsedFigure f => Of(Figures.Integrals[f.Integral]),
            _ => (-1, -1),
        };
        return IsServed(first) && IsServed(second) ? null
            : "some interval leaves it open, or it follows derivatives of sources";

        static (int, int) Of(DrawProduct of) => (of.First, of.Second);
    }
}
