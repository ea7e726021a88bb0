return TensorRG.Cli.Application.Run(args);
