using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Draws;

/// <summary>What must be followed for the figures of a study.</summary>
internal sealed class FigurePlan
{
    private static readonly Window Whole = new(null, null);

    private readonly Circuit circuit;
    private readonly List<Measurand> rows = [];
    private readonly List<FollowedFunction> functions = [];
    private readonly List<Window> windows = [Whole];
    private readonly List<DrawTrack> tracks = [];
    private readonly List<DrawIntegral> integrals = [];

    private FigurePlan(InstrumentedCircuit instrumented)
    {
        circuit = instrumented.Original;
        rows.AddRange(instrumented.Layout.Stores.Select(instrumented.Layout.Held));
    }

    /// <summary>The voltages and currents to follow; what the stores hold comes first.</summary>
    public ImmutableArray<Measurand> Rows { get; private set; } = [];

    /// <summary>The functions made of them.</summary>
    public ImmutableArray<FollowedFunction> Functions { get; private set; } = [];

    /// <summary>The windows; the first is the whole study.</summary>
    public ImmutableArray<Window> Windows { get; private set; } = [];

    /// <summary>Whose extremes are wanted.</summary>
    public ImmutableArray<DrawTrack> Tracks { get; private set; } = [];

    /// <summary>The integrals wanted.</summary>
    public ImmutableArray<DrawIntegral> Integrals { get; private set; } = [];

    /// <summary>The figures, in order.</summary>
    public ImmutableArray<PlannedFigure> Figures { get; private set; } = [];

    /// <summary>For every observation, the index of its first function and of its second; −1 where it cannot
    /// be sampled.</summary>
    public ImmutableArray<DrawTrack?> Observed { get; private set; } = [];

    /// <summary>Plans figures.</summary>
    public static FigurePlan Of(InstrumentedCircuit instrumented, ImmutableArray<StudyFigure> figures)
    {
        var plan = new FigurePlan(instrumented);
        plan.Figures = [.. figures.Select(plan.Figure)];
        plan.Observed = [.. instrumented.Original.Observations.Select(o => plan.Sampled(o.Quantity))];
        plan.Rows = [.. plan.rows];
        plan.Functions = [.. plan.functions];
        plan.Windows = [.. plan.windows];
        plan.Tracks = [.. plan.tracks];
        plan.Integrals = [.. plan.integrals];
        return plan;
    }

    private PlannedFigure Figure(StudyFigure figure) => figure.Kind switch
    {
        StudyFigureKind.Maximum or StudyFigureKind.Minimum => Extreme(
            circuit.Observations[figure.Index], figure.Kind == StudyFigureKind.Maximum),
        StudyFigureKind.Margin => Margin(circuit.Requirements[figure.Index]),
        StudyFigureKind.RatingUsed when figure.Rating < 0 => LinearUsed(figure.Index),
        StudyFigureKind.RatingUsed => Used(figure.Index, circuit.Parts[figure.Index].Ratings[figure.Rating]),
        _ => new ExactFigure("it is read off the whole waveform"),
    };

    private PlannedFigure Extreme(Observation observation, bool isGreatest)
    {
        if (IsIntegrated(observation.Quantity))
        {
            return IsServed(observation.Quantity, observation.Window)
                ? new IntegralFigure(Integral(observation.Quantity, observation.Window), isGreatest)
                : new ExactFigure("it is an energy that goes to and fro");
        }

        return Track(observation.Quantity, observation.Window, isGreatest, !isGreatest) is { } track
            ? new ExtremeFigure(track, isGreatest)
            : new ExactFigure("it is read off the whole waveform");
    }

    private PlannedFigure Margin(Requirement requirement)
    {
        switch (requirement.Bound)
        {
            case Limits limits when IsIntegrated(requirement.Quantity):
                return IsServed(requirement.Quantity, requirement.Window)
                    ? new IntegralMarginFigure(
                        Integral(requirement.Quantity, requirement.Window), limits.Lower, limits.Upper)
                    : new ExactFigure("it is an energy that goes to and fro");
            case Limits limits:
                return Track(requirement.Quantity, requirement.Window,
                    limits.Upper is not null, limits.Lower is not null) is { } track
                    ? new MarginFigure(track, limits.Lower, limits.Upper)
                    : new ExactFigure("it is read off the whole waveform");
            case SettlesTo settles when !IsIntegrated(requirement.Quantity):
                var window = new Window(settles.By, requirement.Window.To);
                return Track(requirement.Quantity, window, true, true) is { } settling
                    ? new SettlingFigure(settling, settles.Target, settles.Within * Math.Abs(settles.Target))
                    : new ExactFigure("it is read off the whole waveform");
            default:
                return new ExactFigure("it is an integral that settles");
        }
    }

    private PlannedFigure Used(int part, Rating rating)
    {
        Measurand voltage = new VoltageAcross(part), current = new CurrentThrough(part);
        switch (rating.Kind)
        {
            case RatingKind.PeakVoltage:
                return new PeakUsedFigure(Track(voltage, Whole, true, true)!.Value, rating.Limit);
            case RatingKind.PeakCurrent:
                return new PeakUsedFigure(Track(current, Whole, true, true)!.Value, rating.Limit);
            case RatingKind.VoltageRate:
                return new PeakUsedFigure(
                    Track(new RateOfChange(voltage), Whole, true, true)!.Value, rating.Limit);
            case RatingKind.CurrentRate:
                return new PeakUsedFigure(
                    Track(new RateOfChange(current), Whole, true, true)!.Value, rating.Limit);
            case RatingKind.Energy when circuit.Parts[part] is Capacitor or Inductor:
                var held = circuit.Parts[part] is Capacitor ? voltage : current;
                return new StoredEnergyFigure(
                    Track(held, Whole, true, true)!.Value, new TrackFactor(1, FactorKind.HalfOfStore, part),
                    rating.Limit);
            case RatingKind.JouleIntegral:
                return new IntegralUsedFigure(Integral(current, current, 1, Whole), rating.Limit, false);
            default:
                return new IntegralUsedFigure(
                    Integral(voltage, current, 1, Whole), rating.Limit, rating.Kind == RatingKind.MeanPower);
        }
    }

    private PeakUsedFigure LinearUsed(int part)
    {
        var limit = circuit.Parts[part].LinearUpTo!;
        Measurand quantity = limit.IsVoltage ? new VoltageAcross(part) : new CurrentThrough(part);
        return new PeakUsedFigure(Track(quantity, Whole, true, true)!.Value, limit.Limit);
    }

    private bool IsIntegrated(Measurand quantity) =>
        QuantityFactors.OfAny(circuit, quantity) is { IsIntegrated: true };

    /// <summary>Whether an integral over the window never turns: i² t, and what resistances and contacts take
    /// up, which is counted from t = 0.</summary>
    private bool IsServed(Measurand quantity, Window window) => quantity is JouleIntegral
        || (quantity is EnergyIn e && window.From is null
            && circuit.Parts[e.Part] is Switch or Resistor { Resistance.Nominal: > 0 });

    private int Integral(Measurand quantity, Window window)
    {
        var product = QuantityFactors.OfAny(circuit, quantity)!;
        return Integral(product.First, product.Second, product.Factor, window);
    }

    private int Integral(Measurand first, Measurand second, double sign, Window window) => Place(
        integrals, new DrawIntegral(
            Function(first), Function(second), new TrackFactor(sign, FactorKind.One, -1),
            Place(windows, window)));

    private int? Track(Measurand quantity, Window window, bool wantsMaximum, bool wantsMinimum)
    {
        if (quantity is Figure)
        {
            return null;
        }

        var (first, second, factor) = Curve(quantity);
        var wanted = new DrawTrack(first, second, factor, Place(windows, window));
        var place = tracks.FindIndex(t => t.First == first && t.Second == second && t.Factor == factor
            && t.Window == wanted.Window);
        if (place < 0)
        {
            tracks.Add(wanted);
            place = tracks.Count - 1;
        }

        tracks[place].WantsMaximum |= wantsMaximum;
        tracks[place].WantsMinimum |= wantsMinimum;
        return place;
    }

    private DrawTrack? Sampled(Measurand quantity)
    {
        if (quantity is Figure || IsIntegrated(quantity))
        {
            return null;
        }

        var (first, second, factor) = Curve(quantity);
        return new DrawTrack(first, second, factor, 0);
    }

    private (int First, int Second, TrackFactor Factor) Curve(Measurand quantity)
    {
        if (QuantityFactors.OfAny(circuit, quantity) is not { } product)
        {
            return (Function(quantity), -1, new TrackFactor(1, FactorKind.One, -1));
        }

        var factor = quantity switch
        {
            EnergyIn e => new TrackFactor(e.Delivered ? -1 : 1, FactorKind.HalfOfStore, e.Part),
            CouplingEnergy k => new TrackFactor(1, FactorKind.Mutual, k.Coupling),
            _ => new TrackFactor(product.Factor, FactorKind.One, -1),
        };
        return (Function(product.First), Function(product.Second), factor);
    }

    /// <summary>A function, and before a rate that of which it is the rate.</summary>
    private int Function(Measurand quantity)
    {
        var order = 0;
        while (quantity is RateOfChange rate)
        {
            Function(rate.Of);
            quantity = rate.Of;
            order++;
        }

        return Place(functions, new FollowedFunction(Place(rows, quantity), order));
    }

    private static int Place<T>(List<T> list, T item)
    {
        var known = list.IndexOf(item);
        if (known < 0)
        {
            list.Add(item);
            return list.Count - 1;
        }

        return known;
    }
}
