using System.Text.Json;
using CircuitTransient.Reports.Formula;
using Json.Schema;

namespace CircuitTransient.Tests.Reports.Formula;

public sealed class FormulaJsonTests
{
    private const string Ringing =
        """
        circuit "Ring"
        source    E at s : step of 1 V
        switch    K from s to k : open, closes at 1 s
        resistor  R from k to r : 0.2 Ω
        inductor  L from r to c : 1 H
        capacitor C from c to ground : 1 F, charged to 0.5 V
        observe voltage of c
        observe energy in C
        until 30 s
        """;

    private static readonly JsonSchema Schema = JsonSchema.FromText(FormulaJson.Schema);

    [Fact]
    public void Every_document_obeys_the_schema_of_formulas()
    {
        foreach (var text in new[] { Ringing, FormulaCircuits.Loop(200) })
        {
            using var document = JsonDocument.Parse(FormulaJson.Write(FormulaOf.Text(text)));
            Assert.True(Schema.Evaluate(document.RootElement).IsValid);
        }
    }

    [Fact]
    public void The_schema_refuses_a_term_without_rates()
    {
        var text = FormulaJson.Write(FormulaOf.Text(Ringing));
        using var document = JsonDocument.Parse(text.Replace("\"rates\"", "\"rate\""));

        Assert.False(Schema.Evaluate(document.RootElement).IsValid);
    }

    [Fact]
    public void A_mode_is_told_by_time_constant_frequency_damping_and_quality()
    {
        using var document = JsonDocument.Parse(FormulaJson.Write(FormulaOf.Text(Ringing)));
        var interval = document.RootElement.GetProperty("intervals")[1];
        var mode = Assert.Single(interval.GetProperty("modes").EnumerateArray());

        Assert.Equal("K closes", interval.GetProperty("startsWith")[0].GetString());
        Assert.Equal(10, mode.GetProperty("timeConstant").GetDouble(), 1e-12); // 2 L/R
        Assert.Equal(1 / double.Tau, mode.GetProperty("naturalFrequency").GetDouble(), 1e-14);
        Assert.Equal(0.1, mode.GetProperty("dampingRatio").GetDouble(), 1e-14); // R/2·√(C/L)
        Assert.Equal(5, mode.GetProperty("qualityFactor").GetDouble(), 1e-12);
    }

    [Fact]
    public void An_energy_is_given_by_its_factors()
    {
        using var document = JsonDocument.Parse(FormulaJson.Write(FormulaOf.Text(Ringing)));
        var product = Assert.Single(document.RootElement.GetProperty("products").EnumerateArray());

        Assert.Equal("energy in C", product.GetProperty("name").GetString());
        Assert.Equal(0.5, product.GetProperty("factor").GetDouble());
        Assert.Equal("voltage across C", product.GetProperty("first").GetString());
        Assert.Contains(
            "voltage across C",
            document.RootElement.GetProperty("quantities").EnumerateArray()
                .Select(q => q.GetProperty("name").GetString()));
    }

    [Fact]
    public void Terms_say_whether_the_network_or_a_source_makes_them()
    {
        using var document = JsonDocument.Parse(FormulaJson.Write(FormulaOf.Text(Ringing, "voltage of c")));
        var quantity = document.RootElement.GetProperty("quantities")[0];
        var total = quantity.GetProperty("stretches")[1].GetProperty("total");

        Assert.Equal(
            ["source", "network"],
            total.GetProperty("terms").EnumerateArray().Select(t => t.GetProperty("origin").GetString()));
    }
}
