using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Formula;

/// <summary>Closed forms as plain text.</summary>
public static partial class FormulaText
{
    /// <summary>Significant digits where nothing is said.</summary>
    public const int UsualDigits = 5;

    /// <summary>The closed forms of a study.</summary>
    /// <param name="study">The closed forms.</param>
    /// <param name="digits">Significant digits.</param>
    /// <param name="colour">Whether headings carry terminal attributes.</param>
    public static string Write(ClosedFormStudy study, int digits = UsualDigits, bool colour = false)
    {
        var text = new SummaryText(colour);
        text.Title(study.Circuit.Title ?? study.Circuit.Source.Name);
        foreach (var product in study.Products)
        {
            text.Paragraph(FormulaWords.Product(product) + ", written out below", 2, 2);
        }

        var notes = new Notes();
        foreach (var form in study.Forms)
        {
            WriteForm(text, study, form, digits, notes);
        }

        WriteNotes(text, notes);
        TerminalSummary.WriteSelfChecks(text, study.SelfChecks, study.NotJudged);
        return text.ToString();
    }

    /// <summary>A power in superscript digits.</summary>
    internal static string Superscript(int power) =>
        string.Concat(power.ToString().Select(d => "⁰¹²³⁴⁵⁶⁷⁸⁹"[d - '0']));

    private static void WriteForm(
        SummaryText text, ClosedFormStudy study, ClosedForm form, int digits, Notes notes)
    {
        text.Heading(form.Name);
        if (form.Stretches.IsEmpty)
        {
            text.Paragraph("its window holds nothing of the study");
        }

        var (first, leftOut, last) = FormulaWords.Shown(form);
        foreach (var stretch in first)
        {
            WriteStretch(text, study, form, stretch, digits, notes);
        }

        if (leftOut > 0)
        {
            text.Blank();
            text.Paragraph(
                $"{leftOut} stretches from {FormulaWords.Instant(first[^1].Until, 0)} until "
                + $"{FormulaWords.Instant(last[0].From, 0)} are left out here; `--json` writes them all");
        }

        foreach (var stretch in last)
        {
            WriteStretch(text, study, form, stretch, digits, notes);
        }
    }

    private static void WriteStretch(
        SummaryText text, ClosedFormStudy study, ClosedForm form, ClosedStretch stretch, int digits,
        Notes notes)
    {
        var sums = stretch.Total is null ? [] : stretch.ByCause
            .Select(s => (Sum: s, Printed: FormulaSum.Of(s, stretch, form.Unit, digits))).ToArray();
        var total = stretch.Total is null ? null : FormulaSum.Of(stretch.Total, stretch, form.Unit, digits);
        FormulaSum[] all = total is null ? [] : [total, .. sums.Select(s => s.Printed)];
        var error = FormulaWords.InstantError(all, digits);
        var from = FormulaWords.Instant(stretch.From, error);
        var interval = study.Intervals[stretch.Interval];
        var starts = stretch.StartsInterval && !interval.StartsWith.IsEmpty
            ? $", when {string.Join(" and ", interval.StartsWith)}," : "";
        var active = sums.Where(s => IsThere(s.Sum, s.Printed)).ToArray();
        var heading = $"From {from}{starts} until {FormulaWords.Instant(stretch.Until, error)}";
        text.Blank();
        if (total is null || active.Length == 0)
        {
            text.Paragraph(
                heading + (total is null ? ": the equations leave it open"
                    : $": {Idle(sums.Sum(s => s.Printed.LeftOut), form)}"), 2, 2);
            return;
        }

        text.Paragraph($"{heading}; τ = t{(stretch.From == 0 ? "" : " - " + from)}", 2, 2);
        string[] modes = [.. FormulaWords.Modes(interval, all.SelectMany(s => s.Printed))];
        if (stretch.StartsInterval || !modes.SequenceEqual(notes.Modes))
        {
            notes.Modes = modes;
            foreach (var mode in modes)
            {
                text.Paragraph(mode, 4, 2);
            }
        }

        if (active is not [_])
        {
            WriteSum(text, "all causes together", stretch.Total!, total, form, notes);
        }

        foreach (var (sum, printed) in active)
        {
            WriteSum(text, sum.Cause!, sum, printed, form, notes);
        }

        if (active.Length > 0 && active.Length < sums.Length)
        {
            var idle = sums.Where(s => !IsThere(s.Sum, s.Printed)).ToArray();
            var size = idle.Sum(s => s.Printed.LeftOut);
            text.Paragraph(
                $"from {string.Join(", ", idle.Select(s => s.Sum.Cause))}: "
                + Idle(size, form), 4, 2);
        }
    }

    private static string Idle(double size, ClosedForm form) =>
        size == 0 ? "nothing" : $"at most {EngineeringNumber.Format(size, form.Unit, 2)}";

    private static bool IsThere(ClosedSum sum, FormulaSum printed) =>
        !printed.Terms.IsEmpty || sum.Impulse != 0;

    private static void WriteSum(
        SummaryText text, string name, ClosedSum sum, FormulaSum printed, ClosedForm form, Notes notes)
    {
        text.Paragraph(name, 4, 2);
        if (sum.Impulse != 0)
        {
            notes.Impulse = true;
            text.Paragraph(Signed(EngineeringNumber.Format(
                sum.Impulse, FormulaWords.ImpulseUnit(form.Unit), 5)) + "·δ(τ)", 6, 4);
        }

        if (sum.IsBeyondImpulse)
        {
            text.Paragraph("at its start infinite both ways: more than an impulse", 6, 4);
        }

        foreach (var term in printed.Terms)
        {
            text.Paragraph(Term(term, notes), 6, 4);
        }

        if (printed.LeftOut > 0)
        {
            var bound = EngineeringNumber.Format(printed.LeftOut, form.Unit, 2);
            text.Paragraph($"terms left out: at most {bound} in sum", 6, 4);
        }
    }

    /// <summary>What is known of the text so far.</summary>
    private sealed class Notes
    {
        /// <summary>The modes last listed.</summary>
        public string[] Modes { get; set; } = [];

        public bool Angle { get; set; }

        public bool Impulse { get; set; }

        public bool Divided { get; set; }
    }
}
