using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>
/// Bad input: exit code 2, one message on standard error that names what is wrong and how to put it right, nothing on
/// standard output, no folder made.
/// </summary>
public sealed class BadInputTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    /// <summary>Command line (single quotes around words that are empty or have spaces), what the message names, the remedy it gives.</summary>
    public static TheoryData<string, string, string> CommandLines => new()
    {
        // Commands.
        { "", "command is missing", "run, resume, converge, models" },
        { "rum ising", "'rum'", "Did you mean 'run'?" },
        { "xyzzy", "'xyzzy'", "run, resume, converge, models" },
        { "--frobnicate", "'--frobnicate'", "tensorrg --help" },
        { "RUN ising", "'RUN'", "Did you mean 'run'?" },

        // Models.
        { "run", "'model'", "tensorrg run --help" },
        { "run isng", "'isng'", "Did you mean 'ising'?" },
        { "run xyzzy", "'xyzzy'", "potts, potts-triangular, six-vertex, spin-1" },
        { "run ''", "empty", "Give a name" },
        { "run ising potts", "'potts'", "one model" },
        { "converge", "'model'", "tensorrg converge --help" },
        { "converge poots", "'poots'", "Did you mean 'potts'?" },
        { "models isng", "'isng'", "Did you mean 'ising'?" },
        { "models ising potts", "'potts'", "one name" },
        { "models --set h=1", "--set", "models NAME --set" },
        { "models --file", "--file", "Name it" },
        { "models ising --file --json", "--file", "Give one of them" },
        { "models ising --file --set h=1", "--file", "Give one of them" },
        { "models ising --form triangles", "triangles form", "'auto'" },
        { "models ising --set H0=1", "'H0'", "It has: temperature" },

        // Options.
        { "run ising --bond-dimensionn 8", "'--bond-dimensionn'", "Did you mean '--bond-dimension'?" },
        { "run ising --bond-dimensionn=8", "'--bond-dimensionn'", "Did you mean '--bond-dimension'?" },
        { "run ising --tempreature 2", "'--tempreature'", "Did you mean '--temperature'?" },
        { "run --jsn ising", "'--jsn'", "Did you mean '--json'?" },
        { "run ising -x", "'-x'", "tensorrg run --help" },
        { "converge ising -c 8", "'-c'", "tensorrg converge --help" },
        { "models --quiet", "'--quiet'", "tensorrg models --help" },
        { "resume --jsonn", "'--jsonn'", "Did you mean '--json'?" },
        { "run ising --json=perhaps", "'perhaps'", "tensorrg run --help" },
        { "run ising --scheme trg --scheme hotrg", "'--scheme'", "single" },
        { "run ising --bond-dimension 8 -c 16", "bond-dimension", "single" },

        // Bond dimension.
        { "run ising --bond-dimension 0", "'0'", "from 1 to" },
        { "run ising --bond-dimension -1", "'-1'", "from 1 to" },
        { "run ising --bond-dimension 2001", "'2001'", "from 1 to 2000" },
        { "run ising --bond-dimension 99999999999999999999", "'99999999999999999999'", "from 1 to" },
        { "run ising --bond-dimension 1e99", "'1e99'", "whole number" },
        { "run ising --bond-dimension 8.5", "'8.5'", "whole number" },
        { "run ising --bond-dimension many", "'many'", "whole number" },
        { "run ising --bond-dimension", "--bond-dimension", "tensorrg run --help" },
        { "run ising -c ''", "''", "whole number" },

        // Steps, seed, threads.
        { "run ising --steps -1", "'-1'", "from 0 to" },
        { "run ising --steps 1001", "'1001'", "from 0 to 1000" },
        { "run ising --steps 2.5", "'2.5'", "whole number" },
        { "run ising --steps 1,000", "'1,000'", "whole number" },
        { "run ising --seed pi", "'pi'", "whole number" },
        { "run ising --seed 1e400", "'1e400'", "whole number" },
        { "run ising --threads 0", "'0'", "from 1 to" },
        { "run ising --threads -2", "'-2'", "from 1 to" },
        { "run ising --threads all", "'all'", "whole number" },
        { "resume nowhere --threads 0", "'0'", "from 1 to" },

        // Temperature.
        { "run ising --temperature 0", "temperature", "from 1e-9" },
        { "run ising --temperature -1", "temperature", "from 1e-9" },
        { "run ising --temperature 1e300", "temperature", "to 1e9" },
        { "run ising --temperature NaN", "'NaN'", "finite number" },
        { "run ising --temperature inf", "'inf'", "finite number" },
        { "run ising --temperature -Infinity", "'-Infinity'", "finite number" },
        { "run ising --temperature 1e999", "'1e999'", "finite number" },
        { "run ising --temperature warm", "'warm'", "the word critical" },
        { "run ising --temperature 2,5", "'2,5'", "point, not a comma" },
        { "run ising --temperature ''", "''", "finite number" },
        { "run ising --temperature", "--temperature", "tensorrg run --help" },
        { "converge ising --temperature 0", "temperature", "from 1e-9" },

        // Parameters.
        { "run ising --set h", "'h'", "NAME=VALUE" },
        { "run ising --set =1", "'=1'", "NAME=VALUE" },
        { "run ising --set h=", "'h'", "finite number" },
        { "run ising --set h=NaN", "'NaN'", "finite number" },
        { "run ising --set h=0,1", "'0,1'", "point, not a comma" },
        { "run ising --set h=1=2", "'1=2'", "finite number" },
        { "run ising --set H0=1", "'H0'", "It has: temperature, Jx, Jy, h, J" },
        { "run ising --set h=1 --set h=2", "set twice", "Give one of them" },
        { "run ising --set J=1 --set Jx=2", "set twice", "Give one of them" },
        { "run ising --set h=1e7", "'h'", "from -1e6 to 1e6" },
        { "run potts --set q=1", "'q'", "whole number from 2" },
        { "run potts --set q=2.5", "'q'", "whole number from 2" },
        { "run potts --set q=65", "'q'", "to 64" },
        { "run six-vertex --set a=-1", "'a'", "from" },
        { "run six-vertex --set a=0", "'a'", "from" },

        // Contradictions.
        { "run ising --json --quiet", "--json and --quiet", "Give one of them" },
        { "converge ising --json --quiet", "--json and --quiet", "Give one of them" },
        { "run ising --temperature 2 --set temperature=3", "set twice", "Give one of them" },
        { "run ising --temperature 2 --set T=2", "set twice", "Give one of them" },
        { "run ising --temperature critical --set temperature=3", "set twice", "Give one of them" },
        { "run ising --scheme trg --bond-exponent -0.5", "'trg'", "Leave it out" },
        { "run six-vertex --temperature 1", "'six-vertex'", "Leave out --temperature" },
        { "run six-vertex --temperature critical", "'six-vertex'", "Leave out --temperature" },
        { "run ising --set h=0.5 --temperature critical", "magnetic field", "as a number" },
        { "run ising --set Jx=0 --temperature critical", "Jx = 0", "as a number" },
        { "run clock --set q=6 --temperature critical", "q >= 5", "as a number" },
        { "run potts --set J=-1 --set q=3 --temperature critical", "antiferromagnetic", "as a number" },

        // Choices.
        { "run ising --scheme TRG2", "'TRG2'", "bond-weighted, trg, hotrg" },
        { "run ising --scheme ''", "''", "bond-weighted, trg, hotrg" },
        { "run ising --backend mk", "'mk'", "managed" },
        { "run ising --backend mkl", "MKL", "default backend" },
        { "run ising --cut multiplet", "'multiplet'", "multiplets, anywhere" },
        { "run ising --grading yes", "'yes'", "on, off" },
        { "run ising --decomposition fast", "'fast'", "auto, iterative, full" },
        { "run ising --bond-exponent half", "'half'", "from -1 to 0.5" },
        { "run ising --bond-exponent 5", "'5'", "from -1 to 0.5" },
        { "run ising --bond-exponent NaN", "'NaN'", "number" },

        // Lists of bond dimensions.
        { "converge ising --bond-dimensions 16,8", "'8' in '16,8'", "ascending" },
        { "converge ising --bond-dimensions 8,8", "'8' in '8,8'", "ascending" },
        { "converge ising --bond-dimensions 0,8", "'0' in '0,8'", "from 1 to" },
        { "converge ising --bond-dimensions 8,16,99999", "'99999'", "to 2000" },
        { "converge ising --bond-dimensions 8,,16", "'' in '8,,16'", "such as 8,16,24" },
        { "converge ising --bond-dimensions eight", "'eight'", "such as 8,16,24" },
        { "converge ising --bond-dimensions 8 16", "'16'", "tensorrg converge --help" },
        { "converge ising --bond-dimensions ''", "''", "such as 8,16,24" },

        // Measurements.
        { "measure", "'model'", "tensorrg measure --help" },
        { "measure isng", "'isng'", "Did you mean 'ising'?" },
        { "measure ising --observables ln-z,,energy", "is empty", "such as ln-z,energy" },
        { "measure ising --observables ln-z,ln-z", "'ln-z' twice", "Give it once" },
        { "measure ising --observables enrgy", "'enrgy'", "energy" },
        { "measure six-vertex --observables free-energy", "'free-energy'", "ln-z" },
        { "measure ising --torus 12", "'12'", "power of two" },
        { "measure ising --method bloks", "'bloks'", "boundary, blocks" },
        { "measure ising --form faces", "'faces'", "auto, bond, face" },
        { "measure ising --json --quiet", "--json and --quiet", "Give one of them" },
        { "measure ising --over T=1:2:3", "'--over'", "tensorrg measure --help" },

        // Grids.
        { "sweep ising", "--over is missing", "NAME=FROM:TO:COUNT" },
        { "sweep ising --over h", "'h'", "NAME=FROM:TO:COUNT" },
        { "sweep ising --over h=", "'h='", "NAME=FROM:TO:COUNT" },
        { "sweep ising --over h=0:1", "'h=0:1'", "NAME=FROM:TO:COUNT" },
        { "sweep ising --over h=0:1:2:3", "'h=0:1:2:3'", "NAME=FROM:TO:COUNT" },
        { "sweep ising --over h=0:1:0", "'0'", "from 1 to 1000000" },
        { "sweep ising --over h=0:1:2.5", "'2.5'", "whole number" },
        { "sweep ising --over h=0:NaN:3", "'NaN'", "finite number" },
        { "sweep ising --over h=0,x", "'x'", "finite number" },
        { "sweep ising --over h=0:0:3", "the value 0 more than once", "Give each value once" },
        { "sweep ising --over H0=0:1:3", "'H0'", "It has: temperature" },
        { "sweep ising --over h=0:1:3 --set h=1", "set twice", "Give one of them" },
        { "sweep ising --over T=1:2:3 --temperature 2", "set twice", "Give one of them" },
        { "sweep ising --over T=1:2:3 --temperature critical", "set twice", "Give one of them" },
        { "sweep ising --over J=1:2:3 --over Jx=1,2", "set twice", "Give one of them" },
        { "sweep ising --over h=0:1:3 --over h=2,3", "set twice", "Give one of them" },
        { "sweep ising --over h=0:1:2 --temperature critical", "magnetic field", "as a number" },
        { "sweep ising --over h=0:1:1001 --over T=1:2:1001", "1002001 points", "fewer values" },
        { "sweep ising --over T=0:2:3", "temperature", "from 1e-9" },
        { "sweep potts --over q=2:3:3", "'q'", "whole number from 2" },
        { "sweep ising --over T=2:3:3 --observables enrgy", "'enrgy'", "energy" },
        { "sweep ising --over T=2:3:3 --into ''", "--into is empty", "leave it out" },
        { "sweep ising --over T=2:3:3 -o ln-z -c 2 --into file", "is a file", "Give a folder" },
        { "sweep ising --over T=2:3:3 -o ln-z -c 2 --into .", "not empty", "new or empty folder" },

        // Folders.
        { "resume", "'dir'", "tensorrg resume --help" },
        { "resume ''", "empty", "Give a name" },
        { "resume nowhere", "nowhere", "Check the path" },
        { "resume .", "run.json", "start a new run" },
        { "resume file", "is a file", "Give the folder of a run" },
        { "resume a b", "'b'", "one dir" },
        { "run ising --run file", "is a file", "Give a folder" },
        { "run ising --run file/below", "below", "Check the path" },
        { "run ising --run .", "not empty", "new or empty folder" },
        { "run ising --run ''", "--run is empty", "leave it out" },
        { "run ising --run ' '", "--run is empty", "leave it out" },
        { "run ising --run /proc/tensorrg", "/proc/tensorrg", "Check the path" },
        { "converge ising --into ''", "--into is empty", "leave it out" },
        { "converge ising --into file", "file", "Check the path" },
    };

    public void Dispose() => _folder.Dispose();

    [Theory]
    [MemberData(nameof(CommandLines))]
    public void Bad_command_line(string line, string named, string remedy)
        => AssertRefused(() => InProcess.Run(_folder.Path, Words(line)), named, remedy);

    /// <summary>A process of its own says the same as the entry point called from here, and ends with the same code.</summary>
    [Theory]
    [InlineData("", "command is missing", "run, resume, converge, models")]
    [InlineData("run ising --tempreature 2", "'--tempreature'", "Did you mean '--temperature'?")]
    [InlineData("models isng", "'isng'", "Did you mean 'ising'?")]
    [InlineData("measure ising --observables enrgy", "'enrgy'", "energy")]
    [InlineData("sweep ising --over h=0:1", "'h=0:1'", "NAME=FROM:TO:COUNT")]
    [InlineData("resume nowhere", "nowhere", "Check the path")]
    [InlineData("run ising --run file", "is a file", "Give a folder")]
    public void Bad_command_line_in_a_process(string line, string named, string remedy)
    {
        AssertRefused(() => CommandLineProcess.Run(_folder.Path, Words(line)), named, remedy);
        Assert.Equal(CommandLineProcess.Run(_folder.Path, Words(line)).Error, InProcess.Run(_folder.Path, Words(line)).Error);
    }

    [Theory]
    [InlineData("run ising")]
    [InlineData("converge ising")]
    public void Unknown_instruction_path_in_the_environment(string line)
    {
        using CommandLineProcess process = CommandLineProcess.Start(_folder.Path, Words(line), new Dictionary<string, string> { ["TENSORRG_SIMD"] = "sse9" });
        AssertRefused(process.End, "TENSORRG_SIMD=sse9", "use avx512, avx2 or portable");
    }

    [Fact]
    public void Bad_input_names_all_bad_options()
    {
        ProcessOutcome refused = CommandLineProcess.Run(_folder.Path, "run", "ising", "--steps", "-1", "--threads", "0").Expect(2);
        refused.ExpectError("--steps", "--threads");
        Assert.Equal(3, refused.ErrorLines.Length);
    }

    [Fact]
    public void Stored_run_of_other_inputs_is_named_with_the_differences()
    {
        string[] args = ["run", "ising", "--run", "stored", "--steps", "2", "--bond-dimension", "4"];
        CommandLineProcess.Run(_folder.Path, args).Expect(0);
        RunFiles stored = new(_folder.Sub("stored"));
        Dictionary<string, byte[]> before = stored.Content();
        ProcessOutcome refused = CommandLineProcess.Run(_folder.Path, [.. args, "--seed", "5"]).Expect(2);
        Assert.Single(refused.ExpectError("stored", "seed", "5", "Use another folder").ErrorLines);
        Assert.Equal(before, stored.Content());
    }

    [SkippableTheory]
    [InlineData("run ising --steps 2 --run closed/run")]
    [InlineData("run ising --steps 2 --run closed")]
    [InlineData("converge ising --steps 2 --into closed/scan")]
    [InlineData("resume closed")]
    public void Folder_without_permission(string line)
    {
        Skip.If(OperatingSystem.IsWindows(), "Permission bits are those of Unix.");

        // Permission bits do not bind root, so the program then runs as somebody else.
        string[] launcher = Environment.IsPrivilegedProcess ? ["setpriv", "--reuid=65534", "--regid=65534", "--clear-groups"] : [];
        Skip.If(launcher.Length > 0 && !File.Exists("/usr/bin/setpriv"), "setpriv is missing.");
        string closed = Directory.CreateDirectory(_folder.Sub("closed")).FullName;
#pragma warning disable CA1416 // Skipped on Windows above.
        File.SetUnixFileMode(_folder.Path, (UnixFileMode)Convert.ToInt32("755", 8));
        File.SetUnixFileMode(closed, UnixFileMode.None);
#pragma warning restore CA1416
        using CommandLineProcess process = CommandLineProcess.Start(
            _folder.Path, Words(line), new Dictionary<string, string> { ["HOME"] = _folder.Path }, launcher);
        ProcessOutcome refused = process.End();
        Skip.If(refused.Error.Contains("setpriv:", StringComparison.Ordinal), $"setpriv does not work here. {refused}");
        Assert.Single(refused.Expect(2).ExpectError(closed, "Check the permissions").ErrorLines);
        Assert.Empty(refused.Out);
    }

    /// <summary>Splits at spaces; single quotes keep a word together.</summary>
    private static string[] Words(string line)
    {
        string[] parts = line.Split('\'');
        return [.. parts.SelectMany((part, i) => i % 2 == 1 ? [part] : part.Split(' ', StringSplitOptions.RemoveEmptyEntries))];
    }

    private void AssertRefused(Func<ProcessOutcome> run, string named, string remedy)
    {
        File.WriteAllText(_folder.Sub("file"), "");
        ProcessOutcome refused = run().Expect(2).ExpectError(named, remedy);
        Assert.True(refused.Out.Length == 0, $"Standard output must stay empty.\n{refused}");
        string[] lines = [.. refused.ErrorLines.Where(static l => !l.StartsWith("See: tensorrg ", StringComparison.Ordinal))];
        Assert.True(lines.Length == 1, $"One message is wanted.\n{refused}");
        Assert.Equal(["file"], Directory.GetFileSystemEntries(_folder.Path).Select(Path.GetFileName));
    }
}
