using TensorRG.Benchmarks;

return args switch
{
    ["gemm"] => GemmBenchmark.Run(),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: TensorRG.Benchmarks gemm");
    return 2;
}
