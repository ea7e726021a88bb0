using System.CommandLine;
using TensorRG.Cli.Commands;
using TensorRG.Cli.Input;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Runs;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli;

/// <summary>The command line as a whole: commands, messages and exit codes.</summary>
internal static class Application
{
    public static int Run(string[] args)
    {
        ParseResult result = CreateRoot().Parse(args);
        if (result.Errors.Count > 0)
        {
            Console.Error.WriteLine(ParseFailure.Describe(result));
            return ExitCode.BadInput;
        }

        return Guard(() => result.Invoke(new InvocationConfiguration
        {
            EnableDefaultExceptionHandler = false,
            ProcessTerminationTimeout = null,
        }));
    }

    public static RootCommand CreateRoot()
    {
        var root = new RootCommand("Coarse-grains two-dimensional lattice models with tensor networks: free energies per site with error bars, convergence in the bond dimension, phases.");
        root.Subcommands.Add(RunCommand.Create());
        root.Subcommands.Add(ResumeCommand.Create());
        root.Subcommands.Add(ConvergeCommand.Create());
        root.Subcommands.Add(ModelsCommand.Create());
        root.Subcommands.Add(MeasureCommand.Create());
        root.Subcommands.Add(SweepCommand.Create());
        return root;
    }

    /// <summary>Turns what can go wrong into a message and an exit code.</summary>
    private static int Guard(Func<int> action)
    {
        try
        {
            return action();
        }
        catch (Exception e) when (e is UsageException or ModelException or BackendUnavailableException)
        {
            return Fail(e.Message, ExitCode.BadInput);
        }
        catch (RunStoreException e)
        {
            return Fail(e.Message, e.Problem == RunStoreProblem.Storage ? ExitCode.Failed : ExitCode.BadInput);
        }
        catch (Exception e) when (e is ArithmeticException or SnapshotException)
        {
            return Fail("The computation failed. " + e.Message, ExitCode.Failed);
        }
        catch (OutOfMemoryException e)
        {
            return Fail("Out of memory. " + e.Message + " Lower --bond-dimension; what was stored is intact.", ExitCode.Failed);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return Fail(e.Message + " Choose a folder that can be written, with space on its disk.", ExitCode.Failed);
        }
#pragma warning disable CA1031 // The last resort: a defect ends with a report and exit code 1, not with an abort.
        catch (Exception e)
#pragma warning restore CA1031
        {
            return Fail("Internal error, please report it with the command that led to it. What was stored is intact.\n" + e, ExitCode.Failed);
        }
    }

    private static int Fail(string message, int code)
    {
        Console.Error.WriteLine(message);
        return code;
    }
}
