using TensorRG.Benchmarks;

return args switch
{
    ["gemm"] => GemmBenchmark.Run(),
    ["copy"] => CopyBenchmark.Run(),
    ["decompositions", .. string[] tasks] => DecompositionBenchmark.Run(tasks),
    ["schemes"] => SchemeBenchmark.Run(),
    ["one-size", string bondDimension] => SchemeBenchmark.OneSize(int.Parse(bondDimension, System.Globalization.CultureInfo.InvariantCulture)),
    ["error-bars"] => ErrorBarData.Run(),
    ["reference-table", string file] => ReferenceTable.Run(file, null),
    ["reference-table", string file, string only] => ReferenceTable.Run(file, only),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: TensorRG.Benchmarks gemm | copy | decompositions [qr] [svd] [eigen] | schemes | error-bars | reference-table FILE [ID]");
    return 2;
}
