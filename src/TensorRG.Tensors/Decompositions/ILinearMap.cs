using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Tensors.Decompositions;

/// <summary>
/// A matrix M[rows, columns] between two groups of legs, given only by what it does to blocks of vectors. It conserves charge.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public interface ILinearMap<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Row legs of M.</summary>
    ImmutableArray<Leg> RowLegs { get; }

    /// <summary>Column legs of M.</summary>
    ImmutableArray<Leg> ColumnLegs { get; }

    /// <summary>M X.</summary>
    /// <param name="block">X: the duals of the column legs, then one leg that counts vectors.</param>
    /// <returns>The row legs, then the leg that counts vectors.</returns>
    Tensor<T> Apply(Tensor<T> block);

    /// <summary>M^H Y.</summary>
    /// <param name="block">Y: the row legs, then one leg that counts vectors.</param>
    /// <returns>The duals of the column legs, then the leg that counts vectors.</returns>
    Tensor<T> ApplyAdjoint(Tensor<T> block);

    /// <summary>M as a tensor: row legs, then column legs.</summary>
    Tensor<T> ToTensor();
}
