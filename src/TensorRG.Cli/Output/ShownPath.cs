namespace TensorRG.Cli.Output;

/// <summary>Paths as they are shown: relative where they lie below the present folder, absolute elsewhere.</summary>
internal static class ShownPath
{
    public static string Of(string path)
    {
        string relative = Path.GetRelativePath(Environment.CurrentDirectory, path);
        bool outside = Path.IsPathRooted(relative) || relative.Split(Path.DirectorySeparatorChar)[0] == "..";
        return outside ? Path.GetFullPath(path) : relative;
    }
}
