using TensorRG.Benchmarks;

return args switch
{
    ["gemm"] => GemmBenchmark.Run(),
    ["copy"] => CopyBenchmark.Run(),
    ["decompositions", .. string[] tasks] => DecompositionBenchmark.Run(tasks),
    ["schemes"] => SchemeBenchmark.Run(),
    ["one-size", string bondDimension] => SchemeBenchmark.OneSize(int.Parse(bondDimension, System.Globalization.CultureInfo.InvariantCulture)),
    ["error-bars"] => ErrorBarData.Run(),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: TensorRG.Benchmarks gemm | copy | decompositions [qr] [svd] [eigen] | schemes | error-bars");
    return 2;
}
