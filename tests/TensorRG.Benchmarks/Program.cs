using TensorRG.Benchmarks;

return args switch
{
    ["gemm"] => GemmBenchmark.Run(),
    ["copy"] => CopyBenchmark.Run(),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: TensorRG.Benchmarks gemm|copy");
    return 2;
}
