using System.Collections.Immutable;
using CircuitTransient.Measurements.ClosedForms;

namespace CircuitTransient.Reports.Formula;

public static class FormulaJson
{
    public static string Write(ClosedFormStudy study) => "";
    public static string Write(ImmutableArray<ClosedFormStudy> studies) => "";
}
public static class FormulaLatex
{
    public static string Write(ClosedFormStudy study, int digits) => "";
}
