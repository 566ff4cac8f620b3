using System.Globalization;
using System.Text.Json;
using GuideModes.Solvers.Wkb;
using Xunit.Abstractions;

namespace GuideModes.Tests.Solvers.Wkb;

public class WkbSolverTests(ITestOutputHelper output)
{
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
                output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"   {i} exact {Num("nEff"):F12} wkb1 {Num("wkb1"):F12} d1 {w?.FirstOrderIndex - Num("wkb1"):E2} d3 {w?.SecondOrderIndex - Num("wkb3"):E2} | ours-exact {w?.EffectiveIndex.Value - Num("nEff"):E2} err {w?.EffectiveIndex.Error:E2} kept {w?.OrderKept} w1-exact {Num("wkb1") - Num("nEff"):E2} {w?.OrderReason}"));
            }
        }
    }
}
