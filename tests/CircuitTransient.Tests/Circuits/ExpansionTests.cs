namespace CircuitTransient.Tests.Circuits;

/// <summary>Repetitions and assemblies.</summary>
public class ExpansionTests
{
    [Fact]
    public void A_million_repetitions_are_refused_with_their_count() =>
        Assert.Equal(
            """
            plant.cause:1:8: error: written out, this circuit has 2 000 000 parts; the most is 100 000
              repeat 1000000 as k
                     ^^^^^^^
              → repeat fewer times, or lump several sections into one
            """,
            Checking.Messages(
                """
                repeat 1000000 as k
                resistor R[k] from n[k] to n[k+1] : 1 Ω
                capacitor C[k] at n[k] : 1 nF
                end
                """));

    [Fact]
    public void Nested_repetitions_are_counted_before_they_are_written() =>
        Assert.Equal(
            """
            plant.cause:1:8: error: written out, this circuit has 1 000 000 parts; the most is 100 000
              repeat 1000 as k
                     ^^^^
              → repeat fewer times, or lump several sections into one
            """,
            Checking.Messages(
                """
                repeat 1000 as k
                repeat 1000 as j
                resistor R[k] from n[k] to n[j] : 1 Ω
                end
                end
                """));

    [Fact]
    public void More_stored_quantities_than_can_be_solved_are_refused_before_memory_is_spent() =>
        Assert.Equal(
            """
            plant.cause:3:11: error: the circuit has 2500 capacitors and inductors; 2000 are the most
              capacitor C[k] at n[k] : 1 nF
                        ^^^^
              → lump neighbouring sections of a ladder into fewer
            """,
            Checking.Messages(
                """
                repeat 2500 as k
                resistor R[k] from n[k] to n[k+1] : 1 Ω
                capacitor C[k] at n[k] : 1 nF
                end
                resistor Rend at n[2501] : 1 Ω
                """));

    [Fact]
    public void A_broken_count_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:8: error: `2.5` is not a number of times to repeat
              repeat 2.5 as k
                     ^^^
              → write a whole number
            """,
            Checking.Messages(
                """
                source Feed at n[1] : 1 V
                repeat 2.5 as k
                resistor R[k] from n[k] to n[k+1] : 1 Ω
                end
                """));

    [Fact]
    public void A_mistake_in_a_repetition_is_told_once() =>
        Assert.Equal(
            """
            plant.cause:3:25: error: `1 V` is a voltage; a resistance in ohms is expected here
              resistor R[k] at n[1] : 1 V
                                      ^^^
              → if the number is right, write `1 Ω`
            """,
            Checking.Messages(
                """
                source Feed at n[1] : 1 V
                repeat 40 as k
                resistor R[k] at n[1] : 1 V
                end
                """));

    [Fact]
    public void An_unknown_counter_is_named() =>
        Assert.Equal(
            """
            plant.cause:3:19: error: there is no counter `j` here
              resistor R[k] at n[j] : 1 Ω
                                ^^^
              → the counter here is `k`
            """,
            Checking.Messages(
                """
                source Feed at n[1] : 1 V
                repeat 2 as k
                resistor R[k] at n[j] : 1 Ω
                end
                """));

    [Fact]
    public void A_counter_is_not_used_twice() =>
        Assert.Equal(
            """
            plant.cause:3:1: error: the counter `k` is in use by the repetition round this one
              repeat 2 as k
              ^^^^^^^^^^^^^
              → give the inner one another letter
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                repeat 2 as k
                repeat 2 as k
                resistor R[k] at a : 1 Ω
                end
                end
                """));

    [Fact]
    public void An_assembly_that_holds_itself_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:10: error: the assembly `ring` holds itself
              assembly ring with terminals in
                       ^^^^
              → an assembly may hold others, but no ring of them can be built
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                resistor R1 at a : 1 Ω
                assembly ring with terminals in
                place ring as Inner with in = in
                end
                place ring as Outer with in = a
                """));

    [Fact]
    public void Assemblies_that_hold_each_other_are_refused() =>
        Assert.Equal(
            """
            plant.cause:3:10: error: the assembly `hen` holds itself: hen → egg → hen
              assembly hen with terminals in
                       ^^^
              → an assembly may hold others, but no ring of them can be built
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                resistor R1 at a : 1 Ω
                assembly hen with terminals in
                place egg as E with in = in
                end
                assembly egg with terminals in
                place hen as H with in = in
                end
                """));

    [Fact]
    public void An_unknown_assembly_is_offered_the_nearest() =>
        Assert.Equal(
            """
            plant.cause:6:7: error: there is no assembly `filtr`
              place filtr as F with in = a
                    ^^^^^
              → did you mean `filter`?
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                resistor R1 at a : 1 Ω
                assembly filter with terminals in
                resistor R1 at in : 1 Ω
                end
                place filtr as F with in = a
                """));

    [Fact]
    public void An_unknown_terminal_is_offered_the_nearest() =>
        Assert.Equal(
            """
            plant.cause:5:32: error: the assembly `filter` has no terminal or value `ou`
              place filter as F with in = a, ou = ground
                                             ^^
              → did you mean `out`?
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                assembly filter with terminals in, out
                resistor R1 from in to out : 1 Ω
                end
                place filter as F with in = a, ou = ground
                """));

    [Fact]
    public void A_terminal_left_open_is_named() =>
        Assert.Equal(
            """
            plant.cause:6:17: error: the terminal `out` of `F` is not joined to any node
              place filter as F with in = a
                              ^
              → add `out = NODE`
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                resistor R1 at a : 1 Ω
                assembly filter with terminals in, out
                resistor R1 from in to out : 1 Ω
                end
                place filter as F with in = a
                """));

    [Fact]
    public void A_value_given_in_another_dimension_is_told_where_it_is_given() =>
        Assert.Equal(
            """
            plant.cause:6:46: error: `F/Rd` is given a voltage; in its assembly it is a resistance
              place filter as F with in = a, out = ground, Rd = 5 V
                                                           ^^^^^^^^
              → give it in ohms
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                assembly filter with terminals in, out
                value Rd : 3 Ω
                resistor R1 from in to out : Rd
                end
                place filter as F with in = a, out = ground, Rd = 5 V
                """));

    [Fact]
    public void An_inner_node_is_known_by_its_full_name_only() =>
        Assert.Equal(
            """
            plant.cause:7:20: error: there is no node `F/y`
              observe voltage of F/y
                                 ^^^
              → did you mean `F/x`?
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                assembly filter with terminals in, out
                resistor R1 from in to x : 1 Ω
                resistor R2 from x to out : 1 Ω
                end
                place filter as F with in = a, out = ground
                observe voltage of F/y
                """));

    [Fact]
    public void Two_placings_of_one_name_are_refused() =>
        Assert.Equal(
            """
            plant.cause:6:15: error: there are two placings named `F`
              place load as F with in = a
                            ^
              → the first stands in line 5; give this one a name of its own
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                assembly load with terminals in
                resistor R1 at in : 1 Ω
                end
                place load as F with in = a
                place load as F with in = a
                """));
}
