using System.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>The memory in which one thread evaluates draws.</summary>
public sealed partial class DrawWorkspace
{
    private readonly DrawKernel kernel;
    private readonly double[] parameters;
    private readonly double[] factors;
    private readonly double[] shifts;
    private readonly ClosedForm[] forms;
    private readonly bool[] isClosed;
    private readonly DrawTimes times;
    private readonly List<DrawSegment> segments = [];
    private readonly double[] stored;
    private readonly double[] stated;
    private readonly double[] modal;
    private readonly double[] atStart;
    private readonly StartOfRow[] startSizes;
    private readonly StartOfRow[] startErrors;
    private readonly Complex[] levels;
    private readonly Complex[] slopes;
    private readonly TrackState[] tracks;
    private readonly double[] integrals;
    private readonly double[] integralErrors;
    private readonly double[] windowFrom;
    private readonly double[] windowTo;
    private readonly bool[] hasWindow;
    private readonly double[] cuts;
    private readonly bool[] isOpen;
    private readonly SegmentWalk walk;
    private readonly int order;
    private readonly int exponents;
    private readonly double[] startSlots;
    private readonly double[] endSlots;
    private int segmentCount;
    private double inherited; // relative error of what the stores hold so far

    internal DrawWorkspace(DrawKernel kernel)
    {
        this.kernel = kernel;
        parameters = new double[kernel.Values.ParameterCount];
        factors = new double[kernel.Waves.FactorCount];
        shifts = new double[kernel.Waves.SourceCount];
        forms = [.. kernel.Forms.Select(f => new ClosedForm(f))];
        isClosed = new bool[forms.Length];
        times = new DrawTimes(kernel.Plan);
        order = kernel.Forms.Select(f => f.Order).DefaultIfEmpty(0).Max();
        exponents = kernel.Waves.Exponents.Length;
        stored = new double[kernel.Circuit.Layout.Stores.Length];
        stated = new double[stored.Length];
        modal = new double[order];
        atStart = new double[4 * order];
        startSizes = new StartOfRow[kernel.Figures.Functions.Length];
        startErrors = new StartOfRow[startSizes.Length];
        levels = new Complex[exponents * shifts.Length];
        slopes = new Complex[levels.Length];
        tracks = new TrackState[kernel.Figures.Tracks.Length];
        integrals = new double[kernel.Figures.Integrals.Length];
        integralErrors = new double[integrals.Length];
        windowFrom = new double[kernel.Figures.Windows.Length];
        windowTo = new double[windowFrom.Length];
        hasWindow = new bool[windowFrom.Length];
        cuts = new double[(2 * windowFrom.Length) + 2];
        isOpen = new bool[tracks.Length];
        var sample = NewSegment();
        walk = new SegmentWalk(
            kernel.Figures.Tracks, kernel.Figures.Functions.Length, order + exponents, sample.Stride);
        startSlots = new double[sample.Stride];
        endSlots = new double[sample.Stride];
        served = [.. kernel.Figures.Functions.Select((_, f) => kernel.IsServed(f))];
    }

    internal DrawKernel Kernel => kernel;

    internal DrawStatus Evaluate(ReadOnlySpan<double> draw, Span<double> figures, Span<double> instants)
    {
        segmentCount = 0;
        inherited = 0;
        Array.Clear(isClosed);
        kernel.Values.PutParameters(draw, parameters);
        kernel.Waves.PutFactors(kernel.Values, draw, parameters, factors, shifts);
        if (!times.Put(draw, parameters, kernel.Circuit.Original.Until) || !CloseAll() || !PutEnd()
            || !PutInitial() || !Solve())
        {
            figures.Fill(double.NaN);
            instants.Fill(double.NaN);
            return DrawStatus.Doubtful;
        }

        PutWindows();
        var isReliable = FindInfinities() && Search() && Integrate();
        return PutFigures(figures, instants) && isReliable ? DrawStatus.Reliable : DrawStatus.Doubtful;
    }

    private bool CloseAll()
    {
        var plan = kernel.Plan;
        for (var k = 0; k < plan.Intervals.Length; k++)
        {
            if (!Close(plan.Intervals[k].Form))
            {
                return false;
            }
        }

        return !kernel.Circuit.Original.StartsSettled || Close(plan.Initial);
    }

    private bool Close(int form)
    {
        if (isClosed[form])
        {
            return true;
        }

        isClosed[form] = true;
        return kernel.Values.PutDeviations(kernel.Plan.Positions[form], parameters, forms[form].Deviations)
            && forms[form].Close();
    }

    /// <summary>Solves every segment; impulses are looked for on the way.</summary>
    private bool Solve()
    {
        ClearTracks();
        Array.Clear(startSizes);
        Array.Clear(startErrors);
        for (var k = 0; k < kernel.Plan.Intervals.Length; k++)
        {
            var form = forms[kernel.Plan.Intervals[k].Form];
            SetState(form);
            var (from, until) = (times.Starts[k], times.Starts[k + 1]);
            for (var start = from; start < until;)
            {
                var end = NextCorner(start, until);
                var segment = Segment(segmentCount++);
                kernel.Waves.Put(start, perpetual: false, factors, shifts, levels, slopes);
                segment.Solve(form, start, end, start == from, modal, kernel.Waves, levels, slopes);
                PutFunctions(segment, form);
                if (segment.BeginsInterval)
                {
                    CheckStart(segment, form);
                }

                if (!PutImpulses(segment, form))
                {
                    return false;
                }

                if (end < until)
                {
                    segment.PutStateAtEnd(kernel.Waves, modal);
                }

                start = end;
            }

            TakeStored(Segment(segmentCount - 1));
        }

        InheritStarts();
        return double.IsFinite(inherited);
    }

    private double NextCorner(double start, double until)
    {
        foreach (var corner in kernel.Plan.Corners)
        {
            if (corner > start)
            {
                return Math.Min(corner, until);
            }
        }

        return until;
    }

    private void PutFunctions(DrawSegment segment, ClosedForm form)
    {
        for (var f = 0; f < served.Length; f++)
        {
            if (served[f])
            {
                var function = kernel.Figures.Functions[f];
                segment.Put(f, function.Row, function.Order, withSlopes: true, form, kernel.Waves, levels,
                    slopes);
            }
        }

        for (var k = 0; k < stored.Length; k++)
        {
            segment.Put(served.Length + k, k, 0, withSlopes: false, form, kernel.Waves, levels, slopes);
        }
    }

    /// <summary>What the stores hold at a segment's end, and by how much it may be wrong.</summary>
    private void TakeStored(DrawSegment segment)
    {
        segment.Evaluate(segment.End - segment.Start, endSlots);
        double worst = 0;
        for (var k = 0; k < stored.Length; k++)
        {
            stored[k] = segment.Value(served.Length + k, endSlots);
            var (size, error) = ErrorOf(segment, served.Length + k);
            worst = size > 0 ? Math.Max(worst, error / size) : worst;
        }

        inherited += worst;
    }

    /// <summary>A function's size at a segment's start, and a bound of its error over the segment.</summary>
    private static (double Size, double Error) ErrorOf(DrawSegment segment, int function)
    {
        const double rounding = 16 * 1.1e-16; // some sums and products on the way to a coefficient
        double size = 0, error = 0;
        for (var unit = 0; unit < segment.Units; unit++)
        {
            var magnitude = segment.Magnitude(function, unit, segment.End - segment.Start);
            size += magnitude;
            error += magnitude * (segment.ModeError[unit] + rounding);
        }

        return (size, error);
    }

    private DrawSegment Segment(int index)
    {
        while (segments.Count <= index)
        {
            segments.Add(NewSegment());
        }

        return segments[index];
    }

    private DrawSegment NewSegment() =>
        new(order, exponents, kernel.Figures.Functions.Length + kernel.Circuit.Layout.Stores.Length);
}
