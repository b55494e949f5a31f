using System.Collections.Immutable;

namespace CircuitTransient.Studies.Comparing;

/// <summary>What is read back of a results document, in SI. Null stands for what is infinite or was left open
/// by the equations.</summary>
public sealed record ResultsDocument(
    DocumentCircuit Circuit,
    DocumentStudy Study,
    ImmutableArray<string> Causes,
    ImmutableArray<DocumentEvent> Events,
    ImmutableArray<DocumentObservation> Observations,
    ImmutableArray<DocumentFigure> Figures,
    ImmutableArray<DocumentRequirement> Requirements,
    ImmutableArray<DocumentPart> Parts,
    ImmutableArray<DocumentCheck> SelfChecks,
    ImmutableArray<string> NotJudged,
    ImmutableArray<string> Warnings,
    ImmutableArray<string> Cautions)
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient results 1";

    /// <summary>Whether every requirement and rating holds.</summary>
    public bool AllHold =>
        Requirements.All(r => r.Holds) && Parts.All(p => p.Ratings.All(rating => rating.Holds));
}

/// <summary>Results documents as read from one file: one, or the array that several circuits make.</summary>
public sealed record ResultsFile(ImmutableArray<ResultsDocument> Documents);

/// <summary>The circuit a document speaks of.</summary>
public sealed record DocumentCircuit(
    string? Title, string File, string Sha256, int Parts, int Nodes, int StoredQuantities);

/// <summary>The study: its end in seconds and how it starts.</summary>
public sealed record DocumentStudy(double Until, string Start);

/// <summary>A switching and its instant in seconds: <c>Kmain closes</c>.</summary>
public sealed record DocumentEvent(string Name, double Time);

/// <summary>An extreme or a worst value, and its instant in seconds.</summary>
public sealed record DocumentPeak(double? Value, double Time);

/// <summary>An observed quantity.</summary>
public sealed record DocumentObservation(
    string Name,
    string Unit,
    double? Final,
    DocumentPeak Max,
    DocumentPeak Min,
    ImmutableArray<DocumentContribution> Contributions)
{
    /// <summary>The greatest magnitude it reaches; zero where none is finite.</summary>
    public double Magnitude => Math.Max(Math.Abs(Max.Value ?? 0), Math.Abs(Min.Value ?? 0));
}

/// <summary>What a cause has in the extremes.</summary>
public sealed record DocumentContribution(string Cause, double? AtMax, double? AtMin);

/// <summary>A figure read off a waveform.</summary>
public sealed record DocumentFigure(string Name, string Unit, double? Value);

/// <summary>A verdict on a requirement.</summary>
/// <param name="Quantity">What is judged, without its bound; the whole statement where an older document does
/// not say it.</param>
public sealed record DocumentRequirement(
    string Statement, string Quantity, string Unit, bool Holds, DocumentPeak Worst, double? Margin);

/// <summary>A part with its stresses and ratings.</summary>
public sealed record DocumentPart(
    string Name, string Kind, ImmutableArray<DocumentStress> Stresses,
    ImmutableArray<DocumentRating> Ratings, DocumentLimit? LinearUpTo)
{
    /// <summary>Its value in SI; null where it has none, or an older document does not say it.</summary>
    public double? Value { get; init; }

    /// <summary>The unit of its value.</summary>
    public string ValueUnit { get; init; } = "";
}

/// <summary>A stress of a part, in SI.</summary>
public sealed record DocumentStress(string Name, string Unit, double? Value);

/// <summary>A rating against what was reached.</summary>
public sealed record DocumentRating(double Rated, string Unit, double? Reached, double? Used, bool Holds);

/// <summary>How far a part's value may be believed, and how far it went.</summary>
public sealed record DocumentLimit(double Declared, string Unit, double? Reached, bool Holds);

/// <summary>A self-check.</summary>
public sealed record DocumentCheck(string Name, bool Holds);
