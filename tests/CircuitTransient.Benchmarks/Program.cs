using CircuitTransient.Benchmarks;

if (args is ["solve", var program, var circuit])
{
    SolveMeasurement.Print(program, circuit);
}
else if (args is ["draws", .. var circuits])
{
    DrawMeasurement.Print(circuits);
}
else
{
    BenchmarkDotNet.Running.BenchmarkSwitcher.FromAssembly(typeof(SolveMeasurement).Assembly).Run(args);
}
