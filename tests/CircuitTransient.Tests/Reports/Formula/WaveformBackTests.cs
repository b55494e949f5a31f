using System.Numerics;
using System.Text.Json;
using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Reports.Formula;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Reports.Formula;

/// <summary>What is printed, worked out by an evaluator of the test's own, is the waveform.</summary>
public sealed class WaveformBackTests
{
    private const int InstantsPerStretch = 7;

    public static TheoryData<string, string> Circuits => FormulaCircuits.All;

    [Theory]
    [MemberData(nameof(Circuits))]
    public void The_document_gives_it_back_to_nine_digits(string name, string text)
    {
        var study = FormulaOf.Text(text);
        using var document = JsonDocument.Parse(FormulaJson.Write(study));
        var quantities = document.RootElement.GetProperty("quantities").EnumerateArray().ToArray();
        var solved = SolvedText.Of(text + Observed(study), Instants(study));

        Assert.NotEmpty(quantities);
        Assert.All(quantities, quantity =>
        {
            var exact = solved[quantity.GetProperty("name").GetString()!];
            var scale = exact.Contributions.SelectMany(c => new[] { c.OwnMax?.Value, c.OwnMin?.Value })
                .Append(exact.Greatest.Value).Max(v => Math.Abs(v ?? 0));
            foreach (var sample in exact.Samples)
            {
                if (Holding(quantity, sample.Time) is not { } stretch)
                {
                    continue;
                }

                var tau = sample.Time - stretch.GetProperty("from").GetDouble();
                Close.OfScale(scale, sample.Value!.Value, Value(stretch.GetProperty("total"), tau));
                foreach (var (c, sum) in stretch.GetProperty("byCause").EnumerateArray().Index())
                {
                    Close.OfScale(scale, sample.ByCause[c]!.Value, Value(sum, tau));
                }
            }
        });
        Assert.NotEmpty(name);
    }

    [Theory]
    [MemberData(nameof(Circuits))]
    public void The_text_gives_it_back_to_its_digits(string name, string text)
    {
        var study = FormulaOf.Text(text);
        var solved = SolvedText.Of(text + Observed(study), Instants(study));
        foreach (var digits in new[] { 4, 5, 9 })
        {
            var written = FormulaText.Write(study, digits);
            foreach (var form in study.Forms)
            {
                Check(WrittenFormula.Read(written, form.Name), form, solved, study, digits);
            }
        }

        Assert.NotEmpty(name);
    }

    /// <summary>Every term is off by at most half a unit of its last digit in its number, its rate and its
    /// angle; terms left out add half a unit of the total.</summary>
    private static void Check(
        WrittenFormula written, ClosedForm form, SolvedText solved, ClosedFormStudy study, int digits)
    {
        foreach (var sample in solved[form.Name].Samples)
        {
            if (form.Stretches.FirstOrDefault(s => s.From < sample.Time && sample.Time < s.Until)
                is not { } exact)
            {
                continue;
            }

            var stretch = written.At(sample.Time);
            var isAlone = stretch.Sums.Count(s => s.Terms.Any()) == 1;
            foreach (var (c, cause) in study.Causes.Index())
            {
                Within(exact.ByCause[c], stretch.Value(cause.Name, sample.Time), sample.ByCause[c]!.Value);
            }

            if (!isAlone)
            {
                Within(exact.Total!, stretch.Value("all causes together", sample.Time), sample.Value!.Value);
            }

            void Within(ClosedSum sum, double printed, double value)
            {
                var unit = Math.Pow(10, 1 - digits) * Math.Max(sum.Scale, exact.Total!.Scale);
                Close.Within((sum.Terms.Length + 1) * unit, value, printed);
            }
        }
    }

    /// <summary>Observes the factors of products too, which the circuit's own text does not.</summary>
    private static string Observed(ClosedFormStudy study) => string.Concat(
        study.Forms.Where(f => !study.Circuit.Observations.Any(o => o.Name == f.Name))
            .Select(f => $"\nobserve {f.Name}"))
        + "\n";

    private static double[] Instants(ClosedFormStudy study) =>
    [
        .. study.Forms.SelectMany(f => f.Stretches).Select(s => (s.From, s.Until)).Distinct()
            .SelectMany(s => Enumerable.Range(1, InstantsPerStretch)
                .Select(k => s.From + ((s.Until - s.From) * Math.Pow(k / (InstantsPerStretch + 0.5), 3))))
            .Distinct().Order(),
    ];

    private static JsonElement? Holding(JsonElement quantity, double time) =>
        quantity.GetProperty("stretches").EnumerateArray()
            .Where(s => s.GetProperty("from").GetDouble() < time && time < s.GetProperty("until").GetDouble())
            .Select(s => (JsonElement?)s).FirstOrDefault();

    private static double Value(JsonElement sum, double tau) =>
        sum.GetProperty("terms").EnumerateArray().Sum(term =>
            (Number(term) * DividedDifference.Of(
                [.. term.GetProperty("rates").EnumerateArray().Select(Number)], tau)).Real);

    private static Complex Number(JsonElement element) =>
        new(element.GetProperty("re").GetDouble(), element.GetProperty("im").GetDouble());
}
