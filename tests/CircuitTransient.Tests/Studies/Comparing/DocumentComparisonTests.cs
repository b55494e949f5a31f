using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Tests.Studies.Comparing;

public sealed class DocumentComparisonTests
{
    private static readonly ResultsDocument Plain = SampleDocuments.Of(SampleDocuments.Text());

    [Fact]
    public void A_document_is_the_same_as_itself()
    {
        var comparison = DocumentComparison.Compare(Plain, Plain);

        Assert.True(comparison.IsSame);
        Assert.Empty(comparison.Inputs);
        Assert.Equal(0, comparison.Turned(VerdictTurn.Worse));
    }

    [Fact]
    public void A_remark_in_the_file_changes_its_digest_and_nothing_else()
    {
        var comparison = DocumentComparison.Compare(
            Plain, SampleDocuments.Of(SampleDocuments.Text(more: "# checked")));

        Assert.True(comparison.IsSame);
        Assert.Equal("SHA-256", Assert.Single(comparison.Inputs).What);
    }

    [Fact]
    public void Another_value_shows_in_the_value_the_figures_and_the_causes()
    {
        var comparison = DocumentComparison.Compare(
            Plain, SampleDocuments.Of(SampleDocuments.Text(ohms: 500)));

        var value = Assert.Single(comparison.Values);
        Assert.Equal(("R1", "Ω", 1000.0, 500.0),
            (value.Part, value.Unit, value.Value.Before!.Value, value.Value.After!.Value));
        // v(2 ms) = 10 − 9·e^(−2 ms/RC), its maximum being at the end.
        var observed = Assert.Single(comparison.Observations);
        Assert.Equal(10 - (9 * Math.Exp(-2)), observed.Max.Before!.Value, 1e-10);
        Assert.Equal(9 * (Math.Exp(-2) - Math.Exp(-4)), observed.Max.Difference!.Value, 1e-10);
        Assert.False(observed.MaxTime.Differs);
        // Feed's share 10·(1 − e^(−t/RC)) grew by more than the charge's e^(−t/RC) fell.
        Assert.Equal(["Feed", "C1 initial charge"], observed.AtMax.Select(share => share.Cause));
    }

    [Fact]
    public void A_stress_of_the_other_sign_is_compared_by_its_magnitude()
    {
        // C1 is charged to 1 V: −10 V puts −11 V across R1 at first, 5 V puts 4 V there.
        string With(string level) => SampleDocuments.Text()
            .Replace("step of 10 V", $"step of {level}", StringComparison.Ordinal);
        var comparison = DocumentComparison.Compare(
            SampleDocuments.Of(With("-10 V")), SampleDocuments.Of(With("5 V")));

        var peak = Assert.Single(comparison.Stresses, s => s is { Part: "R1", Stress: "peakVoltage" }).Value;
        Assert.Equal(-7, peak.Difference!.Value, 1e-9);
        Assert.Equal(-7 / 11.0, peak.Relative!.Value, 1e-9);
    }

    [Fact]
    public void A_verdict_turns_for_the_worse_and_back_for_the_better()
    {
        var broken = SampleDocuments.Of(SampleDocuments.Text(ohms: 500));

        var there = DocumentComparison.Compare(Plain, broken);
        var back = DocumentComparison.Compare(broken, Plain);

        Assert.Equal((1, 0), (there.Turned(VerdictTurn.Worse), there.Turned(VerdictTurn.Better)));
        Assert.Equal((0, 1), (back.Turned(VerdictTurn.Worse), back.Turned(VerdictTurn.Better)));
        Assert.False(there.After.AllHold);
    }

    [Fact]
    public void A_turned_verdict_is_never_overlooked()
    {
        var comparison = DocumentComparison.Compare(
            Plain, SampleDocuments.Of(SampleDocuments.Text(ohms: 500)), within: 10);

        Assert.Equal(1, comparison.Turned(VerdictTurn.Worse));
        Assert.DoesNotContain(comparison.Observations, o => o.Differs);
    }

    [Fact]
    public void Requirements_between_nodes_keep_apart_when_their_bounds_change()
    {
        var before = SampleDocuments.Text(more: """
            require voltage from a to b at most 11 V
            require voltage from a to ground at most 12 V
            """);
        var after = SampleDocuments.Text(more: """
            require voltage from a to ground at most 13 V
            require voltage from a to b at most 14 V
            """);
        var changes = DocumentComparison.Compare(SampleDocuments.Of(before), SampleDocuments.Of(after))
            .Requirements.Where(change => change.Differs);

        Assert.Equal(
            [
                "voltage from a to b at most 11 V", "voltage from a to b at most 14 V",
                "voltage from a to ground at most 12 V", "voltage from a to ground at most 13 V",
            ],
            changes.SelectMany(change => new[] { change.Before!.Statement, change.After!.Statement }));
    }

    [Fact]
    public void A_requirement_whose_bound_was_changed_is_still_the_same_one()
    {
        var comparison = DocumentComparison.Compare(
            Plain, SampleDocuments.Of(SampleDocuments.Text(limit: "8.9 V")));

        var change = Assert.Single(comparison.Requirements);
        Assert.Equal("voltage of b at most 9 V", change.Before!.Statement);
        Assert.Equal("voltage of b at most 8.9 V", change.After!.Statement);
        Assert.Equal(-0.1, change.Margin.Difference!.Value, 1e-9);
    }

    [Fact]
    public void A_new_requirement_that_is_broken_is_worse_and_one_taken_away_is_no_verdict()
    {
        var more = SampleDocuments.Of(SampleDocuments.Text(more: "require current through R1 at most 1 mA"));

        Assert.Equal(1, DocumentComparison.Compare(Plain, more).Turned(VerdictTurn.Worse));
        var back = DocumentComparison.Compare(more, Plain);
        Assert.Equal((0, 0), (back.Turned(VerdictTurn.Worse), back.Turned(VerdictTurn.Better)));
        Assert.False(back.IsSame);
    }

    [Fact]
    public void A_part_of_another_name_with_the_same_figures_is_told_as_renamed()
    {
        var comparison = DocumentComparison.Compare(
            Plain, SampleDocuments.Of(SampleDocuments.Text(name: "Rcharge")));

        Assert.Equal(new Renaming("part", "R1", "Rcharge"), Assert.Single(comparison.Renamed));
        Assert.All(comparison.Missing, change => Assert.True(change.IsEmpty));
    }

    [Fact]
    public void Parts_and_causes_that_only_one_has_are_listed()
    {
        var more = SampleDocuments.Of(SampleDocuments.Text(
            more: "capacitor C2 from b to ground : 1 nF, charged to 1 V"));
        var comparison = DocumentComparison.Compare(Plain, more);

        Assert.Equal<string>(["C2 initial charge"], comparison.Causes.New);
        Assert.Contains(comparison.Missing, change => change is { Kind: "part", New: ["capacitor C2"] });
        Assert.Contains(comparison.Inputs, input => input is { What: "parts", Before: "3", After: "4" });
    }

    [Fact]
    public void Items_of_one_name_are_paired_in_their_order()
    {
        var pairs = NamedPairs<string>.Of(["a1", "a2", "b1"], ["a3", "c1", "a4", "a5"], item => item[..1]);

        Assert.Equal([("a1", "a3"), ("a2", "a4")], pairs.Pairs.AsEnumerable());
        Assert.Equal(["b1"], pairs.Gone.AsEnumerable());
        Assert.Equal(["c1", "a5"], pairs.New.AsEnumerable());
    }

    [Fact]
    public void Rounding_is_no_difference_and_a_thousandfold_of_it_is()
    {
        var (same, other) = (Scaled(Plain, 1 + 1e-12), Scaled(Plain, 1 + 1e-8));

        Assert.False(Assert.Single(DocumentComparison.Compare(Plain, same).Observations).Differs);
        Assert.True(Assert.Single(DocumentComparison.Compare(Plain, other).Observations).Max.Differs);
    }

    private static ResultsDocument Scaled(ResultsDocument document, double factor) => document with
    {
        Observations =
        [
            .. document.Observations.Select(o => o with
            {
                Max = o.Max with { Value = o.Max.Value * factor },
            }),
        ],
    };

    [Fact]
    public void A_caution_whose_figure_changed_is_neither_gone_nor_new()
    {
        var before = Plain with { Cautions = ["C12 stores up to 900.0 mJ (at 1.000 kV)", "R1 burns"] };
        var after = Plain with { Cautions = ["C12 stores up to 1.200 J (at 950.0 V)", "R2 burns"] };

        var cautions = DocumentComparison.Compare(before, after).Notes.Single(n => n.Kind == "caution");

        Assert.Equal(
            new WordsChange(
                "C12 stores up to 900.0 mJ (at 1.000 kV)", "C12 stores up to 1.200 J (at 950.0 V)"),
            Assert.Single(cautions.Changed));
        Assert.Equal(["R1 burns"], cautions.Gone);
        Assert.Equal(["R2 burns"], cautions.New);
    }

    [Fact]
    public void A_rating_of_a_part_that_bears_another_name_is_still_judged()
    {
        var comparison = DocumentComparison.Compare(
            Plain, SampleDocuments.Of(SampleDocuments.Text(name: "Rnew")));

        Assert.Equal((0, 0), (comparison.RequirementsGone, comparison.RatingsGone));
        Assert.False(comparison.IsOfDifferentCircuits);
    }
}
