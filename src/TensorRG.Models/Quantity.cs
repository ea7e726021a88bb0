namespace TensorRG.Models;

/// <summary>A quantity that some models know exactly. "Per site" is per lattice site, in the thermodynamic limit.</summary>
public enum Quantity
{
    /// <summary>ln Z / N.</summary>
    LogZPerSite,

    /// <summary>Mean energy U / N, the field's part included; at a first-order transition the mean of the two phases.</summary>
    EnergyPerSite,

    /// <summary>Specific heat C / N = d(U/N)/dT.</summary>
    SpecificHeatPerSite,

    /// <summary>Uniform spontaneous magnetisation per site, in [0, 1].</summary>
    SpontaneousMagnetisation,

    /// <summary>Jump of the energy per site at the transition; 0 for a continuous one.</summary>
    LatentHeat,

    /// <summary>Entropy S / N.</summary>
    EntropyPerSite,

    /// <summary>Mean number of particles per site.</summary>
    Density,
}
