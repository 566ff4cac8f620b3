using System.Globalization;
using System.Text.Json;
using GuideModes.Solvers.Wkb;
using Xunit.Abstractions;

namespace GuideModes.Tests.Solvers.Wkb;

public class WkbSolverTests(ITestOutputHelper output)
{
    [Fact]
    public void Timing()
    {
        foreach (var id in new[] { "s29-gauss20-te", "s21-many-te", "s20-table-te", "s13-gauss-air-tm", "s09-sech2-te", "s07-parabola-trunc-te", "s08-parabola-wide-te", "s01-slab-sym-te" })
        {
            var p = WkbCases.Problem(id);
            var best = double.MaxValue;
            for (var r = 0; r < 40; r++)
            {
                var w = System.Diagnostics.Stopwatch.StartNew();
                for (var i = 0; i < 5; i++) new WkbSolver().Solve(p);
                best = Math.Min(best, w.Elapsed.TotalMilliseconds / 5);
            }

            output.WriteLine($"{id} {best:F4} ms");
        }
    }

    [Fact]
    public void Scratch()
    {
        foreach (var id in WkbCases.PlanarIds())
        {
            var solution = new WkbSolver().Solve(WkbCases.Problem(id));
            output.WriteLine($"{id} {solution.Modes.Length} {solution.ModeNumberAtCutoff} {WkbCases.Find(id).GetProperty("expected").GetProperty("modeCount")}");
            foreach (var m in WkbCases.Find(id).GetProperty("expected").GetProperty("modes").EnumerateArray())
            {
                var i = m.GetProperty("order").GetInt32();
                var w = i < solution.Modes.Length ? solution.Modes[i] : null;
                double? Num(string k) => m.TryGetProperty(k, out var v) && v.ValueKind == JsonValueKind.Number ? v.GetDouble() : null;
                var (d, e) = (w?.EffectiveIndex.Value - Num("nEff"), w?.EffectiveIndex.Error);
                output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"   {i} d1 {w?.FirstOrderIndex - Num("wkb1"):E1} d3 {w?.SecondOrderIndex - Num("wkb3"):E1} off {d:E2} err {e:E2} {(Math.Abs(d ?? 1) <= e ? "ok" : "UNCOVERED")} k{w?.OrderKept} n1off {Num("wkb1") - Num("nEff"):E1} T {w?.BarrierTransparency:E1} {w?.IsNearDegenerate}"));
            }
        }
    }
}
