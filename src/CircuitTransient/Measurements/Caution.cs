namespace CircuitTransient.Measurements;

/// <summary>How grave a caution is.</summary>
public enum CautionSeverity
{
    /// <summary>Worth knowing.</summary>
    Note,

    /// <summary>May do damage.</summary>
    Warning,

    /// <summary>May kill or burn.</summary>
    Danger,
}

/// <summary>A caution with its figure in words and the standard to verify it in.</summary>
public sealed record Caution(CautionSeverity Severity, string Text, string Standard);
