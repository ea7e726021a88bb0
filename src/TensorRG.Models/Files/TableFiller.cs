using System.Numerics;

namespace TensorRG.Models.Files;

/// <summary>Fills tables over the configurations of a cluster: sets the variables in the slots, state after state.</summary>
/// <param name="slots">The slots; the variables of the first site start at <paramref name="first"/>.</param>
/// <param name="first">Slot of the first variable of the first site.</param>
/// <param name="values">Values of the variables of state 0, of state 1, ...</param>
/// <param name="variables">Number of variables of a site.</param>
internal sealed class TableFiller(Complex[] slots, int first, Complex[] values, int variables)
{
    /// <summary>Calls a function for each configuration, the state of the last site fastest, with its position in the table.</summary>
    /// <param name="sites">Sites of the cluster.</param>
    /// <param name="visit">The function; it finds the variables in the slots.</param>
    public void Each(int sites, Action<int> visit)
    {
        int states = values.Length / variables;
        int[] state = new int[sites];
        for (int site = 0; site < sites; site++)
            Set(site, 0);
        for (int position = 0; ; position++)
        {
            visit(position);
            int site = sites - 1;
            while (site >= 0 && ++state[site] == states)
            {
                state[site] = 0;
                Set(site--, 0);
            }
            if (site < 0)
                return;
            Set(site, state[site]);
        }
    }

    private void Set(int site, int state)
        => Array.Copy(values, state * variables, slots, first + (site * variables), variables);
}
