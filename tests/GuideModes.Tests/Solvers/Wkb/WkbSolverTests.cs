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

            var pieces = p.Profile.Pieces.Select(x => new CountingPiece(x)).ToArray();
            new WkbSolver().Solve(new(new(p.Profile.Wavelength, p.Profile.Cover, [.. pieces], p.Profile.Substrate, 1), p.Polarization));
            output.WriteLine($"{id} {best:F4} ms values {pieces.Sum(x => x.Values)} jets {pieces.Sum(x => x.Jets)}");
        }
    }

    private static GuideModes.Solvers.ModeProblem Fast() => WkbCases.Problem(0.6328, 1.0, 1.51, new JetPiece(
        new(0, 80.6),
        x => WkbCases.Sqr(1.51 + 0.05 * WkbCases.Exp(-WkbCases.Sqr(x / 13))),
        x => { var n = 1.51 + 0.05 * Math.Exp(-(x / 13) * (x / 13)); return n * n; }));

    [Fact]
    public void FieldScratch()
    {
        foreach (var id in WkbCases.PlanarIds())
        {
            var problem = WkbCases.Problem(id);
            var solution = new WkbSolver().Solve(problem);
            var watch = System.Diagnostics.Stopwatch.StartNew();
            var samples = 0;
            foreach (var m in WkbCases.Find(id).GetProperty("expected").GetProperty("modes").EnumerateArray())
            {
                if (!m.TryGetProperty("fieldE", out var field)) continue;
                var i = m.GetProperty("order").GetInt32();
                var points = field.EnumerateArray().Select(p => (X: p[0].GetDouble(), E: p[1].GetDouble())).ToArray();
                var ours = new WkbSolver().Field(problem, solution.Modes[i], [.. points.Select(p => p.X)]);
                samples += points.Length;
                var peak = points.Max(p => Math.Abs(p.E));
                output.WriteLine($"{id} {i} field off {Enumerable.Range(0, points.Length).Max(j => Math.Abs(ours.Value[j] - points[j].E)) / peak:E2} of peak; {string.Join(' ', points.Zip(ours.Value).Take(6).Select(p => $"{p.First.X:F2}:{p.First.E:F5}/{p.Second:F5}"))}");
            }

            output.WriteLine($"{id} {watch.Elapsed.TotalMilliseconds} ms {samples}");
        }
    }

    [Theory]
    [InlineData("s08-parabola-wide-te", 1.4608, 1.4720)]
    [InlineData("s14-linear-te", 1.50001, 1.5499)]
    [InlineData("s15-power4-te", 1.44401, 1.4648)]
    [InlineData("s20-table-te", 1.51301, 1.5515)]
    [InlineData("s07-parabola-trunc-te", 1.46001, 1.4798)]
    [InlineData("s11-gauss-air-te", 1.51001, 1.5598)]
    [InlineData("s12-erfc-air-te", 2.20001, 2.2198)]
    [InlineData("s13-gauss-air-tm", 1.51001, 1.5598)]
    public void ScanScratch(string id, double from, double to)
    {
        var map = new ProfileMap(WkbCases.Problem(id));
        var node = WellTree.Build(map)[0];
        var finder = new WellFinder(map);
        var orders = new OrderChoice(map, finder, new WellPhase(map, finder, new(map)));
        foreach (var kind in Enum.GetValues<PhaseKind>())
        {
            const int n = 4000;
            var (worst, at, rise, riseAt, last) = (0.0, 0.0, 0.0, 0.0, double.NaN);
            var (last2, slope) = (double.NaN, 0.0);
            for (var i = 0; i <= n; i++)
            {
                var e = from + (to - from) * i / n;
                var v = orders.Sample(node, e * e, kind).Number;
                var d = v - last;
                if (i > 1 && d > rise) (rise, riseAt) = (d, e);
                if (i > 2 && Math.Abs(d - slope) > worst) (worst, at) = (Math.Abs(d - slope), e);
                (slope, last) = (d, v);
            }

            output.WriteLine($"{id} {kind} worst jump {worst:E2} at {at:F6} mean step {(orders.Sample(node, from * from, kind).Number - orders.Sample(node, to * to, kind).Number) / n:E2}; worst rise {rise:E2} at {riseAt:F6}");
        }
    }

    [Theory]
    [InlineData("s08-parabola-wide-te", 80.0)]
    [InlineData("s20-table-te", 6.0)]
    [InlineData("s20-table-te", 0.5)]
    public void ZoomScratch(string id, double x)
    {
        var map = new ProfileMap(WkbCases.Problem(id));
        var node = WellTree.Build(map)[0];
        var finder = new WellFinder(map);
        var orders = new OrderChoice(map, finder, new WellPhase(map, finder, new(map)));
        var j = Enumerable.Range(0, map.Ends.Length).First(i => map.Profile.Pieces[i].Extent.End == x);
        var e = map.Ends[j].Value;
        foreach (var d in new[] { -1e-2, -1e-3, -1e-4, -1e-6, -1e-8, -1e-10, 1e-10, 1e-8, 1e-6, 1e-4, 1e-3 })
        {
            var v = Enum.GetValues<PhaseKind>().Select(k => orders.Sample(node, e + d, k)).ToArray();
            output.WriteLine($"zoom {id} {d:E1} {v[0].Number:F7} {v[1].Number:F7} {v[2].Number:F7}");
        }
    }

    [Fact]
    public void Count()
    {
        var c = new CountingPiece(Fast().Profile.Pieces[0]);
        new WkbSolver().Solve(WkbCases.Problem(0.6328, 1.0, 1.51, c));
        output.WriteLine($"values {c.Values} jets {c.Jets}");
        (c.Values, c.Jets) = (0, 0);
        var map = new ProfileMap(WkbCases.Problem(0.6328, 1.0, 1.51, c));
        output.WriteLine($"values map {c.Values} jets {c.Jets}");
        (c.Values, c.Jets) = (0, 0);
        var tree = WellTree.Build(map);
        var finder = new WellFinder(map);
        var phase = new WellPhase(map, finder, new(map));
        var orders = new OrderChoice(map, finder, phase);
        foreach (var inset in new[] { 1e-12, 1e-9, 1e-6, 1e-4, 1e-3, 1e-2, 0.1, 0.3, 0.7 })
        {
            foreach (var kind in new[] { PhaseKind.Uniform, PhaseKind.SecondOrder })
            {
                (c.Values, c.Jets) = (0, 0);
                var v = orders.Sample(tree[0], tree[0].Lower + inset * (tree[0].Upper - tree[0].Lower), kind);
                output.WriteLine($"values {inset} {kind} {c.Values} jets {c.Jets} {v.Number}");
            }
        }

        var p = Fast();
        var best = double.MaxValue;
        for (var r = 0; r < 400; r++)
        {
            var w = System.Diagnostics.Stopwatch.StartNew();
            for (var i = 0; i < 5; i++) new WkbSolver().Solve(p);
            best = Math.Min(best, w.Elapsed.TotalMilliseconds / 5);
        }

        output.WriteLine($"fast {best:F4} ms");
        var sol = new WkbSolver().Solve(p);
        foreach (var m in new[] { 0, 1, 5, 10, 19 })
        {
            (c.Values, c.Jets) = (0, 0);
            new WkbSolver().Field(WkbCases.Problem(0.6328, 1.0, 1.51, c), sol.Modes[m], [.. Enumerable.Range(0, 300).Select(i => -1 + 0.2 * i)]);
            var ft = System.Diagnostics.Stopwatch.StartNew();
            for (var i = 0; i < 20; i++) new WkbSolver().Field(p, sol.Modes[m], [.. Enumerable.Range(0, 300).Select(i => -1 + 0.2 * i)]);
            output.WriteLine($"values field {m} {c.Values} jets {c.Jets} {ft.Elapsed.TotalMilliseconds / 20} ms");
        }

        var t = System.Diagnostics.Stopwatch.StartNew();
        double sum = 0;
        for (var i = 0; i < 1000; i++) sum += GuideModes.Solvers.Wkb.AiryPhase.At(0.003 * i).Theta;
        output.WriteLine($"airy {t.Elapsed.TotalMilliseconds:F4} us {sum}");
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
