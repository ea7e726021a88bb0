namespace TensorRG.Models.Tests.Literature;

/// <summary>
/// Every model of the catalogue on small tori as a plain sum over configurations, written from the published Hamiltonians and vertex weights and
/// not from the files: a wrong file is found. On the square lattice a site owns the bond to its right and the bond below it, so lengths 1 and 2 double bonds.
/// </summary>
internal static class Configurations
{
    /// <summary>ln Z and the mean energy of a torus; NaN where there is no energy.</summary>
    public static (double LogZ, double Energy) Sum(ParameterSet parameters, int lx, int ly)
    {
        var sum = new ConfigurationSum(Of(parameters, lx, ly));
        return (sum.LogScale + Math.Log(sum.Z.Real), sum.Names.Contains("energy") ? (sum.Of("energy").Value / sum.Z).Real : double.NaN);
    }

    /// <summary>The model on a torus of lx x ly cells.</summary>
    public static LiteratureModel Of(ParameterSet parameters, int lx, int ly)
    {
        var torus = new Torus(lx, ly);
        return SquareSpins.Find(parameters, torus) ?? SquareIntegrals.Find(parameters, torus) ?? OtherLattices.Find(parameters, torus) ?? EdgeModels.Find(parameters, torus)
            ?? throw new NotSupportedException($"No independent sum over configurations is written for model '{parameters.Model.Name}'; add one here.");
    }
}
