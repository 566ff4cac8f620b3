using GuideModes.Guides;

namespace GuideModes.Tests.Published;

/// <summary>Cutoffs found the hard way: where the exact mode count of a guide steps as V rises.</summary>
internal static class Cutoffs
{
    /// <summary>The V at which mode <paramref name="order"/> appears, to a few ε, sought within a tenth of what is expected.</summary>
    public static double Find(Func<double, GuideDocument> guideAt, int order, double expected)
    {
        bool Holds(double v) => Documents.Solve(guideAt(v)).Modes.Length > order;

        double low = 0.9 * expected, high = 1.1 * expected;
        Assert.False(Holds(low));
        Assert.True(Holds(high));
        while (high - low > 4e-16 * expected)
        {
            var middle = 0.5 * (low + high);
            if (middle <= low || middle >= high) break;
            if (Holds(middle)) high = middle;
            else low = middle;
        }

        return 0.5 * (low + high);
    }
}
