namespace GuideModes.Profiles;

/// <summary>Cutting a stretch where its law is not smooth.</summary>
internal static class Splitting
{
    /// <summary>Coordinates closer than this, relative to their size (and to 1 µm), are one.</summary>
    public const double Resolution = 1e-12;

    public static bool AreOne(double a, double b) => Math.Abs(a - b) <= Resolution * Math.Max(1, Math.Abs(a));

    /// <summary>The parts of a stretch between ascending cuts; cuts outside it, or at one of its ends, cut nothing.</summary>
    public static IEnumerable<Interval> SplitAt(this Interval extent, IEnumerable<double> cuts)
    {
        var start = extent.Start;
        foreach (var cut in cuts)
        {
            if (cut <= start || cut >= extent.End || AreOne(cut, start) || AreOne(cut, extent.End)) continue;
            yield return new(start, cut);
            start = cut;
        }

        yield return new(start, extent.End);
    }
}
