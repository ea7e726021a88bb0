using System.Runtime.InteropServices;

namespace TensorRG.Cli.Execution;

/// <summary>Turns SIGINT and SIGTERM into a request to stop after the present step.</summary>
internal sealed class StopSignal : IDisposable
{
    private readonly CancellationTokenSource _source = new();
    private readonly PosixSignalRegistration[] _registrations;

    public StopSignal()
    {
        _registrations =
        [
            PosixSignalRegistration.Create(PosixSignal.SIGINT, Handle),
            PosixSignalRegistration.Create(PosixSignal.SIGTERM, Handle),
        ];
    }

    public CancellationToken Token => _source.Token;

    public void Dispose()
    {
        foreach (PosixSignalRegistration registration in _registrations)
            registration.Dispose();
        _source.Dispose();
    }

    private void Handle(PosixSignalContext context)
    {
        context.Cancel = true;
        _source.Cancel();
    }
}
