namespace GuideModes.Solvers.Wkb;

/// <summary>A well over the range of n_eff² in which it neither meets nor takes in another one.</summary>
/// <param name="Anchor">A coordinate that it always holds: where n² is largest in it.</param>
/// <param name="Top">n² there.</param>
/// <param name="Upper">n_eff² at which it begins: Top, or the barrier's top where its children met.</param>
/// <param name="Lower">n_eff² at which it ends: the barrier's top where it meets another, or cutoff.</param>
/// <param name="Left">The child on the left; null for a simple well.</param>
/// <param name="Right">The child on the right; null for a simple well.</param>
internal sealed record WellNode(double Anchor, double Top, double Upper, double Lower, WellNode? Left, WellNode? Right);

/// <summary>The wells of a profile and how they join as n_eff falls to cutoff.</summary>
internal static class WellTree
{
    /// <summary>A dip of n² smaller than this share of it parts no wells.</summary>
    private const double LeastDip = 1e-13;

    /// <summary>How many maxima the profile has, counted as changes from a rising to a falling segment.</summary>
    public static int Peaks(ProfileMap map)
    {
        var (count, rising) = (0, true);
        foreach (var segment in map.Segments)
        {
            var rises = segment.RightSquared >= segment.LeftSquared;
            if (rising && !rises) count++;
            rising = rises;
        }

        return count;
    }

    /// <summary>The wells at cutoff, from left to right, each with its children.</summary>
    public static List<WellNode> Build(ProfileMap map)
    {
        var cutoff = map.Profile.CutoffIndexSquared;
        var nodes = new List<WellNode>();
        var dips = new List<double>();
        Peaks(map, cutoff, nodes, dips);
        while (dips.Count > 0)
        {
            var i = Highest(dips);
            if (dips[i] <= cutoff) break;
            Join(nodes, i, dips[i]);
            dips.RemoveAt(i);
        }

        return nodes;
    }

    private static int Highest(List<double> dips)
    {
        var best = 0;
        for (var i = 1; i < dips.Count; i++)
        {
            if (dips[i] > dips[best]) best = i;
        }

        return best;
    }

    private static void Join(List<WellNode> nodes, int i, double level)
    {
        var (a, b) = (nodes[i], nodes[i + 1]);
        var higher = a.Top >= b.Top ? a : b;
        var shallow = Math.Min(a.Top, b.Top) - level <= LeastDip * level;
        nodes[i] = shallow
            ? higher
            : new(higher.Anchor, higher.Top, level, a.Lower, a with { Lower = level }, b with { Lower = level });
        nodes.RemoveAt(i + 1);
    }

    private static void Peaks(ProfileMap map, double cutoff, List<WellNode> nodes, List<double> dips)
    {
        var (rising, peak, anchor) = (true, double.NegativeInfinity, 0.0);
        var (last, lowest) = (double.NegativeInfinity, double.PositiveInfinity);
        foreach (var segment in map.Segments)
        {
            if (segment.LeftSquared == segment.RightSquared)
            {
                Step(0.5 * (segment.Left + segment.Right), segment.LeftSquared);
                continue;
            }

            var inset = 1e-9 * (segment.Right - segment.Left);
            Step(segment.Left + inset, segment.LeftSquared);
            Step(segment.Right - inset, segment.RightSquared);
        }

        if (rising) Emit();

        void Step(double x, double value)
        {
            if (rising && value < peak) Emit();
            var risesNow = rising ? value >= peak : value > last;
            if (risesNow && (!rising || value > peak)) (peak, anchor) = (value, x);
            (rising, last) = (risesNow, value);
            lowest = Math.Min(lowest, value);
        }

        void Emit()
        {
            if (peak <= cutoff) return;
            if (nodes.Count > 0) dips.Add(lowest);
            nodes.Add(new(anchor, peak, peak, cutoff, null, null));
            lowest = double.PositiveInfinity;
        }
    }
}
