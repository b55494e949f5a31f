using System.Collections.Concurrent;
using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Sizes;

/// <summary>A circuit with sought values: what they have to meet, and how each set of them does.</summary>
public sealed class SizeProblem
{
    private readonly VariedCircuit varied;
    private readonly ImmutableArray<StudyFigure> figures;
    private readonly SizeAimReading aim;
    private readonly ConcurrentDictionary<(double, double, UInt128?), SizePoint> known = new();

    private SizeProblem(
        Circuit file, VariedCircuit varied, ImmutableArray<SizedValue> parts,
        ImmutableArray<SizeConstraint> constraints, SizeAimReading aim)
    {
        File = file;
        this.varied = varied;
        this.aim = aim;
        Parts = parts;
        Constraints = constraints;
        figures = [.. constraints.Select(c => c.Figure), .. aim.Figures];
        Corners = new ToleranceCorners(varied, parts.Length);
    }

    /// <summary>The circuit as its file says it.</summary>
    public Circuit File { get; }

    /// <summary>The sought values.</summary>
    public ImmutableArray<SizedValue> Parts { get; }

    /// <summary>What has to hold.</summary>
    public ImmutableArray<SizeConstraint> Constraints { get; }

    /// <summary>The corners of the tolerances; there are none where they are not asked for.</summary>
    public ToleranceCorners Corners { get; }

    /// <summary>The unit of what is made least or greatest; null where nothing is.</summary>
    public string? AimUnit => aim.Part >= 0 ? Parts[aim.Part].Unit : aim.Unit;

    /// <summary>The values that vary besides the sought ones, by name.</summary>
    public string NameOf(int place) => varied.Values[place].Name;

    /// <summary>+1 where the aim is to be least, −1 where greatest, 0 where there is none.</summary>
    public int AimSign => aim.Sign;

    /// <summary>The place of the part whose own value is the aim; −1 where it is none.</summary>
    public int AimPart => aim.Part;

    /// <summary>Sets a problem up.</summary>
    /// <param name="source">The circuit file's text.</param>
    /// <param name="request">What is asked.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    /// <returns>The problem with the circuit's warnings, or what is wrong with the file or the
    /// request.</returns>
    public static Outcome<SizeProblem> Of(
        SourceText source, SizeRequest request, Func<string, Outcome<SourceText>> readBeside)
    {
        var (syntax, mistakes) = CircuitParser.ParseWhatCanBe(source);
        var plain = CircuitChecker.Check(syntax, mistakes, readBeside);
        return plain.Then(circuit => SizeAimReading
            .Of(circuit, request, readBeside)
            .Then(aim => Build(circuit, aim, request, readBeside)));
    }

    /// <summary>Solves for one set of values.</summary>
    /// <param name="sized">The sought values.</param>
    /// <param name="corners">The corners of the tolerances to look at besides the nominal circuit.</param>
    /// <param name="cancellation">Stops the work.</param>
    public SizePoint At(
        ImmutableArray<double> sized, ImmutableArray<UInt128> corners, CancellationToken cancellation)
    {
        var point = AtCorner(sized, null, cancellation);
        foreach (var corner in corners)
        {
            var other = AtCorner(sized, corner, cancellation);
            point = point with
            {
                Shares = [.. point.Shares.Zip(other.Shares, Math.Min)],
                IsSolved = point.IsSolved && other.IsSolved,
            };
        }

        return point;
    }

    /// <summary>Solves at one corner, or with everything else nominal where it is null.</summary>
    public SizePoint AtCorner(
        ImmutableArray<double> sized, UInt128? corner, CancellationToken cancellation)
    {
        // A search that is done again with more corners asks again for what it knows.
        var key = (sized[0], sized[^1], corner);
        return known.TryGetValue(key, out var point)
            ? point
            : known.GetOrAdd(key, Solve(sized, corner, cancellation));
    }

    private SizePoint Solve(
        ImmutableArray<double> sized, UInt128? corner, CancellationToken cancellation)
    {
        var point = CircuitAt(sized, corner) is { Succeeded: true, Value: var circuit }
            ? StudySolver.At(circuit, figures, cancellation).Value
            : null;
        if (point is null)
        {
            return new SizePoint(
                sized, [.. Constraints.Select(_ => double.NegativeInfinity)], null)
            { IsSolved = false };
        }

        return new SizePoint(
            sized,
            [.. Constraints.Select((constraint, i) => constraint.Share(point.Values[i]))],
            aim.Read(sized, point.Values.AsSpan()[Constraints.Length..]));
    }

    /// <summary>The fast evaluation of the constraints' figures.</summary>
    internal PointBatch Batch(CancellationToken cancellation) =>
        new(varied, [.. Constraints.Select(c => c.Figure)], Environment.ProcessorCount, cancellation);

    /// <summary>The circuit with such values.</summary>
    public Outcome<Circuit> CircuitAt(ImmutableArray<double> sized, UInt128? corner) =>
        varied.At(Corners.Values(sized.AsSpan(), corner));

    /// <summary>The text of the circuit's file with the sought values in it.</summary>
    /// <param name="sized">The sought values.</param>
    public Outcome<string> TextWith(ImmutableArray<double> sized) => CircuitRewriting.Put(
        File,
        Enumerable.Range(0, Parts.Length).ToDictionary(i => varied.Values[i].Parameter, i => sized[i]),
        keepsTolerances: true);

    private static Outcome<SizeProblem> Build(
        Circuit file, SizeAimReading aim, SizeRequest request, Func<string, Outcome<SourceText>> readBeside)
    {
        var circuit = aim.Circuit;
        var constraints = SizeConstraint.Of(circuit);
        if (constraints.IsEmpty)
        {
            return new(null, [Diagnostic.Error(circuit.Source, new TextSpan(0, 0),
                "nothing is required or rated, so any value would do",
                "say what has to hold: `require voltage of bus at most 60 V`")]);
        }

        var targets = request.Parts.Select(StudyTarget (part) => part.IsNamedValue
            ? new NamedValueTarget(part.Name) { Written = part.Source, Span = part.Span }
            : new PartValueTarget(part.Name) { Written = part.Source, Span = part.Span });
        StudyTarget[] others = request.WithSpread ? [new EveryTolerance()] : [];
        var found = VariedCircuit.Of(circuit, [.. targets, .. others], readBeside);
        if (!found.Succeeded)
        {
            return new(null, found.Diagnostics);
        }

        var parts = ImmutableArray.CreateBuilder<SizedValue>();
        for (var i = 0; i < request.Parts.Length; i++)
        {
            var (value, mistake) = SizedValue.Of(
                request.Parts[i], found.Value.Values[i], request.Parts.Length);
            if (value is null)
            {
                return new(null, [mistake!]);
            }

            parts.Add(value);
        }

        return new(new SizeProblem(file, found.Value, parts.ToImmutable(), constraints, aim), []);
    }
}
