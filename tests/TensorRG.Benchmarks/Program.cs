using TensorRG.Benchmarks;

return args switch
{
    ["gemm"] => GemmBenchmark.Run(),
    ["copy"] => CopyBenchmark.Run(),
    ["decompositions", .. string[] tasks] => DecompositionBenchmark.Run(tasks),
    ["schemes"] => SchemeBenchmark.Run(),
    ["error-bars"] => ErrorBarData.Run(),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: TensorRG.Benchmarks gemm | copy | decompositions [qr] [svd] [eigen] | schemes | error-bars");
    return 2;
}
