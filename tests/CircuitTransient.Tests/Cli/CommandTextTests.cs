using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>Commands on reports, against the shell itself.</summary>
public sealed class CommandTextTests
{
    [Fact]
    public void What_is_pasted_into_a_shell_comes_apart_into_the_same_words()
    {
        string[] words =
        [
            "plain.cause", "a b.cause", "Rsn from 1 Ω to 10 kΩ", "$HOME `id` \\ \"quoted\" it's!", "'", "",
            "*", "\"K 1\" closes", "a;b&c|d>e",
        ];
        var command = CommandText.Of(words)["circuit-transient".Length..];
        Assert.Equal(
            string.Join('\n', words) + "\n", Shell.Run(".", $"printf '%s\\n'{command}").Output);
    }

    [Fact]
    public void Plain_words_stand_bare_and_words_with_blanks_in_double_quotes() =>
        Assert.Equal(
            "circuit-transient solve filter.cause --at \"1 ms\"",
            CommandText.Of("solve", "filter.cause", "--at", "1 ms"));
}
