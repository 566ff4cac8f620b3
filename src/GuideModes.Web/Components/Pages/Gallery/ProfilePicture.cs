using System.Globalization;
using GuideModes.Profiles;
using GuideModes.Web.Solving;

namespace GuideModes.Web.Components.Pages.Gallery;

/// <summary>An index profile as a small picture.</summary>
internal static class ProfilePicture
{
    public const int Width = 240;

    public const int Height = 84;

    /// <summary>An open path from left to right; the cover's index may lie below the picture.</summary>
    public static string Of(IndexProfile profile)
    {
        var samples = ProfileSamples.Of(profile);
        var (start, end) = (profile.Extent.Start, End(profile, samples));
        var margin = 0.12 * (end - start);
        var (low, high) = (Math.Min(profile.Substrate.Index, samples.Index.Min()), samples.Index.Max());
        var rise = high > low ? high - low : 1;

        string Point(double x, double n) => string.Create(
            CultureInfo.InvariantCulture,
            $"{Width * (x - start + margin) / (end - start + 2 * margin):0.#} {Height - 8 - (Height - 18) * Math.Max(-0.08, (n - low) / rise):0.#}");

        List<string> points = [Point(start - margin, profile.Cover.Index), Point(start, profile.Cover.Index)];
        for (var i = 0; i < samples.XUm.Count && samples.XUm[i] <= end; i++) points.Add(Point(samples.XUm[i], samples.Index[i]));
        points.Add(Point(end, profile.Substrate.Index));
        points.Add(Point(end + margin, profile.Substrate.Index));
        return "M" + string.Join(" L", points);
    }

    private static double End(IndexProfile profile, ProfileSamples samples)
    {
        if (!profile.LastRegionIsUnbounded) return profile.Extent.End;
        var rise = samples.Index.Max(n => Math.Abs(n - profile.Substrate.Index));
        return samples.XUm[samples.Index.FindLastIndex(n => Math.Abs(n - profile.Substrate.Index) > 0.005 * rise)];
    }
}
