namespace TensorRG.Runs;

/// <summary>What is built from single file operations.</summary>
internal static class RunFilesExtensions
{
    /// <summary>
    /// Replaces a file so that at every instant, power cuts included, either the old or the new content is there
    /// complete: write aside, flush, rename, flush the folder.
    /// </summary>
    public static void Replace(this IRunFiles files, string folder, string name, ReadOnlySpan<byte> content)
    {
        string aside = Path.Combine(folder, name + RunFiles.Aside);
        try
        {
            files.Write(aside, content);
            files.Move(aside, Path.Combine(folder, name));
        }
        catch (RunStoreException)
        {
            DeleteQuietly(files, aside);
            throw;
        }

        files.FlushFolder(folder);
    }

    /// <summary>Removes half-written files of a process that was killed. Call it under the lock only.</summary>
    public static void DeleteLeftovers(this IRunFiles files, string folder)
    {
        foreach (string name in files.List(folder).Where(RunFiles.IsLeftover))
            files.Delete(Path.Combine(folder, name));
    }

    /// <summary>On a full disk the half-written file takes space; that it cannot be deleted is not the news.</summary>
    private static void DeleteQuietly(IRunFiles files, string path)
    {
        try
        {
            files.Delete(path);
        }
        catch (RunStoreException)
        {
        }
    }
}
