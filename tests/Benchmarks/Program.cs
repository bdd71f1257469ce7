using BenchmarkDotNet.Running;

// dotnet run -c Release --project tests/Benchmarks -- --filter '*'
BenchmarkSwitcher.FromAssembly(typeof(Looseloop.Benchmarks.FitBenchmark).Assembly).Run(args);
