using CsCheck;

namespace CircuitTransient.Tests;

/// <summary>Properties on drawn examples that are the same in every run: all of them follow from one seed,
/// not the first alone.</summary>
internal static class SeededDraws
{
    /// <summary>Checks a law on every one of a number of draws.</summary>
    public static void OnEach<T>(this Gen<T> draws, Action<T> check, string seed, int iter)
    {
        foreach (var (index, drawn) in draws.Array[iter].Single(_ => true, seed).Index())
        {
            try
            {
                check(drawn);
            }
            catch (Exception failure)
            {
                throw new InvalidOperationException($"draw {index} of seed {seed}: {drawn}", failure);
            }
        }
    }

    /// <inheritdoc cref="OnEach{T}(Gen{T}, Action{T}, string, int)"/>
    public static void OnEach<T>(this Gen<T> draws, Func<T, bool> holds, string seed, int iter) =>
        draws.OnEach(drawn => Assert.True(holds(drawn)), seed, iter);

    /// <inheritdoc cref="OnEach{T}(Gen{T}, Action{T}, string, int)"/>
    public static void OnEach<T1, T2>(
        this Gen<(T1, T2)> draws, Func<T1, T2, bool> holds, string seed, int iter) =>
        draws.OnEach(drawn => Assert.True(holds(drawn.Item1, drawn.Item2)), seed, iter);

    /// <inheritdoc cref="OnEach{T}(Gen{T}, Action{T}, string, int)"/>
    public static void OnEach<T1, T2, T3>(
        this Gen<(T1, T2, T3)> draws, Action<T1, T2, T3> check, string seed, int iter) =>
        draws.OnEach(drawn => check(drawn.Item1, drawn.Item2, drawn.Item3), seed, iter);

    /// <inheritdoc cref="OnEach{T}(Gen{T}, Action{T}, string, int)"/>
    public static void OnEach<T1, T2, T3, T4>(
        this Gen<(T1, T2, T3, T4)> draws, Action<T1, T2, T3, T4> check, string seed, int iter) =>
        draws.OnEach(drawn => check(drawn.Item1, drawn.Item2, drawn.Item3, drawn.Item4), seed, iter);

    /// <inheritdoc cref="OnEach{T}(Gen{T}, Action{T}, string, int)"/>
    public static void OnEach<T1, T2, T3, T4>(
        this Gen<(T1, T2, T3, T4)> draws, Func<T1, T2, T3, T4, bool> holds, string seed, int iter) =>
        draws.OnEach(
            drawn => Assert.True(holds(drawn.Item1, drawn.Item2, drawn.Item3, drawn.Item4)), seed, iter);
}
