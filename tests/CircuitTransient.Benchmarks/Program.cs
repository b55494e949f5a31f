using CircuitTransient.Benchmarks;

if (args is ["solve", var program, var circuit])
{
    SolveMeasurement.Print(program, circuit);
}
else if (args is ["draws", .. var drawn])
{
    DrawMeasurement.Print(drawn);
}
else if (args is ["by", .. var circuits])
{
    BreakdownMeasurement.Print(circuits);
}
else
{
    BenchmarkDotNet.Running.BenchmarkSwitcher.FromAssembly(typeof(SolveMeasurement).Assembly).Run(args);
}
