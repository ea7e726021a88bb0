using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining;

/// <summary>What a scheme declares about itself; tests compare it with what is measured.</summary>
public abstract class SchemeDefinition
{
    /// <summary>Name on the command line.</summary>
    public abstract string Name { get; }

    /// <summary>One line that says what it does.</summary>
    public abstract string Summary { get; }

    /// <summary>The publication it follows.</summary>
    public abstract string Source { get; }

    /// <summary>The time of a step grows as the bond dimension to this power.</summary>
    public abstract double CostExponent { get; }

    /// <summary>Whether the scheme reads <see cref="SchemeSettings.BondExponent"/>.</summary>
    public virtual bool UsesBondExponent => false;

    /// <summary>How the error of ln Z follows from the discarded weights, calibrated on exactly solved models.</summary>
    public abstract TruncationLaw TruncationLaw { get; }

    /// <summary>Creates the scheme for an element type.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="algebra">Contractions and kernels.</param>
    /// <param name="settings">The user's choices.</param>
    public abstract IScheme<T> Create<T>(TensorAlgebra<T> algebra, SchemeSettings settings)
        where T : unmanaged, INumberBase<T>;
}
