using GuideModes.Guides;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Published;

/// <summary>Cutoffs found the hard way: where the exact mode count of a guide steps as V rises.</summary>
internal static class Cutoffs
{
    /// <summary>The V at which mode <paramref name="order"/> appears, sought within a millionth of what is expected.</summary>
    /// <remarks>A billionth to either side of it, the full solver must find the mode, and must not.</remarks>
    public static double Find(Func<double, GuideDocument> guideAt, int order, double expected)
    {
        double low = (1 - 1e-6) * expected, high = (1 + 1e-6) * expected;
        Assert.True(Count(guideAt(low)) <= order);
        Assert.True(Count(guideAt(high)) > order);
        while (high - low > 1e-13 * expected)
        {
            var middle = 0.5 * (low + high);
            if (Count(guideAt(middle)) > order) high = middle;
            else low = middle;
        }

        var cutoff = 0.5 * (low + high);
        Assert.Equal(order, Documents.Solve(guideAt(cutoff * (1 - 1e-9))).Modes.Length);
        Assert.Equal(order + 1, Documents.Solve(guideAt(cutoff * (1 + 1e-9))).Modes.Length);
        return cutoff;
    }

    /// <summary>The solver's own count, without finding the modes.</summary>
    private static int Count(GuideDocument document)
    {
        var problem = Documents.Problem(document);
        var plan = StepPlan.For(problem, new TransferMatrixSolver().IndexTolerance, default);
        return new Sweep(new StepMesh(plan, problem)).CountBelow(0);
    }
}
