using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns statements into a checked circuit, or finds every mistake in them in one go.</summary>
public static class CircuitChecker
{
    /// <summary>Checks a circuit.</summary>
    /// <param name="syntax">The statements as written.</param>
    /// <param name="earlier">What reading the text found; with an error in it there is no circuit.</param>
    /// <param name="readFile">Reads a file of wave points by its path relative to the circuit's folder; null
    /// where no file can be read.</param>
    /// <param name="overrides">What a study says in place of the text; null for nothing.</param>
    /// <returns>The circuit, or errors in the order of the file; warnings come with either.</returns>
    public static Outcome<Circuit> Check(
        CircuitSyntax syntax, ImmutableArray<Diagnostic> earlier,
        Func<string, Outcome<SourceText>>? readFile = null, CircuitOverrides? overrides = null)
    {
        var findings = new Findings(syntax.Source);
        foreach (var diagnostic in earlier)
        {
            findings.Add(diagnostic);
        }

        var circuit = Build(
            syntax, findings, readFile ?? (_ => new Outcome<SourceText>(null, [])),
            overrides ?? CircuitOverrides.None);
        return new Outcome<Circuit>(findings.HasErrors ? null : circuit, findings.InOrder());
    }

    /// <summary>The names in a circuit that was checked, for what is asked outside its file.</summary>
    internal static CheckState NamesOf(Circuit circuit)
    {
        var findings = new Findings(circuit.Source);
        var syntax = CircuitParser.ParseWhatCanBe(circuit.Source).Syntax;
        var settings = StudySettings.Read(syntax, findings);
        return DeclaredIn(
            syntax, settings, findings, _ => new Outcome<SourceText>(null, []), CircuitOverrides.None).State;
    }

    private static Circuit? Build(
        CircuitSyntax syntax, Findings findings, Func<string, Outcome<SourceText>> readFile,
        CircuitOverrides overrides)
    {
        if (syntax.Statements.IsEmpty)
        {
            ReportEmpty(findings);
            return null;
        }

        findings.LacksNames |= !Unreadable.Excuse(syntax.Statements, findings) && findings.HasErrors;
        var settings = StudySettings.Read(syntax, findings);
        var (state, statements) = DeclaredIn(syntax, settings, findings, readFile, overrides);
        if (statements.IsEmpty)
        {
            ReportEmpty(findings);
            return null;
        }

        state.Values.EvaluateAll();
        return Lower(state, settings, statements);
    }

    private static (CheckState State, ImmutableArray<PlacedStatement> Statements) DeclaredIn(
        CircuitSyntax syntax, StudySettings settings, Findings findings,
        Func<string, Outcome<SourceText>> readFile, CircuitOverrides overrides)
    {
        var parameters = new ParameterList();
        var values = new NamedValues(findings, parameters, overrides);
        var statements = Expansion.WriteOut(syntax, settings.Reference, findings, values);
        var state = new CheckState(findings, values, parameters, readFile, overrides)
        {
            Nodes = new NodeTable(settings.Reference, findings, settings.ReferenceSpan),
        };
        Declarations.Declare(state, statements);
        return (state, statements);
    }

    private static Circuit Lower(
        CheckState state, StudySettings settings, ImmutableArray<PlacedStatement> statements)
    {
        var until = settings.End(state, Scope.Outermost(settings.Reference));
        LowerParts(state);
        CauseNames.Check(state);
        StoreCount.Check(state);
        var couplings = CouplingLowering.Lower(state);
        SwitchOrder.Check(state, until);
        var observations = Observations.Lower(state, statements, until);
        var requirements = ImmutableArray.CreateBuilder<Requirement>();
        foreach (var (statement, scope) in statements)
        {
            if (statement is RequireStatement syntax && Requirements.Lower(state, syntax, scope, until)
                is { } requirement)
            {
                requirements.Add(requirement);
            }
        }

        CheckTopology(state, settings, couplings);
        return new Circuit(
            state.Findings.Source, settings.Title, settings.Notes, state.Nodes.Names,
            [.. state.Parts.OfType<Part>()], couplings,
            UnusedValues.Check(state, state.Parameters.ToImmutable()), observations,
            requirements.ToImmutable(), settings.StartsSettled, until);
    }

    // Switches first: a wave may stand at an instant after one of them acts.
    private static void LowerParts(CheckState state)
    {
        state.Parts = new Part?[state.Declared.Count];
        foreach (var part in state.Declared.Where(p => p.Statement is SwitchStatement))
        {
            state.Parts[part.Index] = SwitchLowering.Lower(state, part);
        }

        foreach (var part in state.Declared)
        {
            state.Parts[part.Index] = PartLowering.Lower(state, part);
        }
    }

    private static void CheckTopology(
        CheckState state, StudySettings settings, ImmutableArray<Coupling> couplings)
    {
        if (state.Declared.Count == 0)
        {
            ReportEmpty(state.Findings);
        }
        else
        {
            Islands.Check(state, settings.ReferenceSpan);
            foreach (var resistor in state.Parts.OfType<Resistor>())
            {
                ValueHabits.CheckAcrossSource(state, resistor);
            }
        }

        if (!state.Findings.HasErrors)
        {
            StoredContradictions.Check(state, couplings, settings.StartsSettled);
        }
    }

    private static void ReportEmpty(Findings findings)
    {
        if (!findings.HasErrors)
        {
            findings.Error(new TextSpan(0, 0), "this file holds no circuit: there is no part in it",
                "start with `source Feed at a : 10 V` and `resistor R1 at a : 1 kΩ`");
        }
    }
}
