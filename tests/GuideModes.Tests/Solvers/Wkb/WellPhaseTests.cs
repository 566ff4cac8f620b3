using GuideModes.Solvers.Wkb;
using Xunit.Abstractions;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>ν(n_eff) of a well: continuous and falling, also where a turning point crosses a joint.</summary>
public class WellPhaseTests(ITestOutputHelper output)
{
    private static (WellNode Node, OrderChoice Orders, ProfileMap Map) Open(string id)
    {
        var map = new ProfileMap(WkbCases.Problem(id));
        var finder = new WellFinder(map);
        return (WellTree.Build(map)[0], new(map, finder, new(map, finder, new(map))), map);
    }

    /// <summary>A jump shows as a step that differs from its neighbours, less what the curvature of ν explains.</summary>
    [Theory]
    [InlineData("s08-parabola-wide-te", 1.4610, 1.4720)]
    [InlineData("s14-linear-te", 1.5002, 1.5495)]
    [InlineData("s15-power4-te", 1.4442, 1.4645)]
    [InlineData("s20-table-te", 1.5132, 1.5510)]
    [InlineData("s07-parabola-trunc-te", 1.4602, 1.4798)]
    [InlineData("s11-gauss-air-te", 1.5102, 1.5580)]
    [InlineData("s13-gauss-air-tm", 1.5102, 1.5580)]
    public void Number_OverTheRange_FallsWithoutAJump(string id, double from, double to)
    {
        var (node, orders, _) = Open(id);
        foreach (var kind in new[] { PhaseKind.Uniform, PhaseKind.SecondOrder })
        {
            const int count = 4000;
            var (last, step, worst) = (double.NaN, double.NaN, 0.0);
            for (var i = 0; i <= count; i++)
            {
                var n = from + (to - from) * i / count;
                var number = orders.Sample(node, n * n, kind).Number;
                Assert.False(number >= last, $"{kind} rises by {number - last:E2} at {n}");
                if (Math.Abs(number - last - step) > worst) worst = Math.Abs(number - last - step);
                (step, last) = (number - last, number);
            }

            output.WriteLine($"{kind}: largest change of step {worst:E2}");
            Assert.InRange(worst, 0, 1e-3);
        }
    }

    /// <summary>The two limits at the level of a joint itself.</summary>
    [Theory]
    [InlineData("s08-parabola-wide-te", 80.0)]
    [InlineData("s20-table-te", 0.5)]
    [InlineData("s20-table-te", 2.0)]
    [InlineData("s20-table-te", 6.0)]
    public void Number_AtAJoint_HasTheSameLimitFromBothSides(string id, double joint)
    {
        var (node, orders, map) = Open(id);
        var level = map.Ends[Enumerable.Range(0, map.Ends.Length).First(i => map.Profile.Pieces[i].Extent.End == joint)].Value;
        foreach (var kind in new[] { PhaseKind.Uniform, PhaseKind.SecondOrder })
        {
            var jump = orders.Sample(node, level - 1e-10, kind).Number - orders.Sample(node, level + 1e-10, kind).Number;
            output.WriteLine($"{kind}: jump {jump:E2}");
            Assert.InRange(Math.Abs(jump), 0, 1e-3);
        }
    }
}
