using TensorRG.Benchmarks;

return args switch
{
    ["gemm"] => GemmBenchmark.Run(),
    ["copy"] => CopyBenchmark.Run(),
    ["decompositions", .. string[] tasks] => DecompositionBenchmark.Run(tasks),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: TensorRG.Benchmarks gemm|copy|decompositions [qr] [svd] [eigen]");
    return 2;
}
