using System.Reflection;

namespace TensorRG.EndToEnd.Harness;

/// <summary>
/// The program's entry point called in the process of the tests: for the many command lines that are refused, each of which would
/// spend most of its time on starting a process. The present folder and the console belong to the whole process, so only one runs at a time.
/// </summary>
internal static class InProcess
{
    private static readonly Lock s_lock = new();
    private static readonly MethodInfo s_main = Assembly.Load("tensorrg").EntryPoint!;

    /// <summary>Runs a command line.</summary>
    /// <param name="folder">Present folder.</param>
    /// <param name="args">Arguments.</param>
    public static ProcessOutcome Run(string folder, params string[] args)
    {
        lock (s_lock)
        {
            (TextWriter consoleOut, TextWriter consoleError, string present) = (Console.Out, Console.Error, Environment.CurrentDirectory);
            using StringWriter output = new(), error = new();
            try
            {
                Console.SetOut(output);
                Console.SetError(error);
                Environment.CurrentDirectory = folder;
                int code = (int)s_main.Invoke(null, [args])!;
                return new ProcessOutcome("tensorrg " + string.Join(' ', args), code, output.ToString(), error.ToString());
            }
            finally
            {
                Environment.CurrentDirectory = present;
                Console.SetOut(consoleOut);
                Console.SetError(consoleError);
            }
        }
    }
}
