using System.Numerics;

namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>Whether observables know a permutation of the states.</summary>
internal static class ObservableSymmetry
{
    private const double RoundOff = 1e-12;

    /// <summary>True if a local term of the observable changes when all variables of its cluster are permuted.</summary>
    /// <param name="observable">The observable.</param>
    /// <param name="permutation">Element s is the state that s goes to.</param>
    public static bool Breaks(LocalObservable observable, int[] permutation)
        => observable.Terms.Any(t => Changes([.. t.Values], permutation));

    private static bool Changes(Complex[] values, int[] permutation)
    {
        double bound = RoundOff * values.Max(static v => Complex.Abs(v));
        return Enumerable.Range(0, values.Length).Any(i => Complex.Abs(values[i] - values[Image(i, values.Length, permutation)]) > bound);
    }

    // Digits of the index are the states of the cluster's variables.
    private static int Image(int index, int count, int[] permutation)
    {
        int q = permutation.Length, image = 0;
        for (int place = 1; place < count; place *= q)
            image += permutation[index / place % q] * place;
        return image;
    }
}
