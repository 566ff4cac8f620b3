using BenchmarkDotNet.Running;
using GuideModes.Benchmarks;

BenchmarkSwitcher.FromAssembly(typeof(PlanarBenchmarks).Assembly).Run(args);
