using GuideModes.Profiles;
using GuideModes.Solvers.Certification;

namespace GuideModes.Web.Solving;

/// <summary>How much of the x axis is worth showing: the regions that end, and where the modes are.</summary>
internal static class ViewRange
{
    /// <summary>The power of a mode further than this many rms widths from its centre is not seen on a plot.</summary>
    private const double Reach = 3.5;

    /// <summary>A field has fallen to e^−12, six parts in a million, over this many penetration depths.</summary>
    private const double Tails = 12;

    /// <summary>For plots: tight.</summary>
    public static Interval ForPlots(GuideAnswer answer)
    {
        var (start, end) = Guide(answer);
        foreach (var mode in answer.Modes)
        {
            start = Math.Min(start, mode.Exact.CentroidUm - Reach * mode.Exact.RmsWidthUm);
            end = Math.Max(end, mode.Exact.CentroidUm + Reach * mode.Exact.RmsWidthUm);
        }

        return Limit(answer, start, end, 1);
    }

    /// <summary>For files: wide enough to hold the tails of the modes asked for.</summary>
    public static Interval ForFields(GuideAnswer answer, IEnumerable<CertifiedMode> modes)
    {
        var (start, end) = Guide(answer);
        foreach (var mode in modes.Select(mode => mode.Exact))
        {
            start = Math.Min(start, Finite(-Tails * mode.CoverPenetrationUm));
            end = Math.Max(end, Finite(end + Tails * mode.SubstratePenetrationUm));
        }

        return Limit(answer, start, end, 5);
    }

    /// <summary>From the cover to where the index has come within half a percent of its rise to the substrate's.</summary>
    private static (double Start, double End) Guide(GuideAnswer answer)
    {
        var profile = answer.Guide.Profile;
        var extent = profile.Extent;
        if (!profile.LastRegionIsUnbounded) return (extent.Start, extent.End);

        var first = profile.Pieces.First(piece => piece.Region == profile.RegionCount - 1).Extent.Start;
        var samples = ProfileSamples.Of(profile);
        var rise = samples.Index.Max(n => Math.Abs(n - profile.Substrate.Index));
        var last = samples.Index.FindLastIndex(n => Math.Abs(n - profile.Substrate.Index) > 0.005 * rise);
        return (extent.Start, Math.Max(first, last < 0 ? extent.End : samples.XUm[last]));
    }

    private static Interval Limit(GuideAnswer answer, double start, double end, double lengths)
    {
        var guide = Guide(answer);
        var length = Math.Max(guide.End - guide.Start, 1e-3 * answer.Guide.Wavelength.Micrometres);
        return new(
            Math.Max(start, guide.Start - lengths * length) - 0.06 * length,
            Math.Min(end, guide.End + lengths * length) + 0.06 * length);
    }

    private static double Finite(double value) => double.IsFinite(value) ? value : 0;
}

/// <summary>n(x) along the pieces of a profile; at a jump the coordinate stands twice.</summary>
internal sealed record ProfileSamples(List<double> XUm, List<double> Index)
{
    private const int PerProfile = 900;

    private const int LeastPerPiece = 12;

    public static ProfileSamples Of(IndexProfile profile)
    {
        var samples = new ProfileSamples([], []);
        var perPiece = Math.Max(LeastPerPiece, PerProfile / profile.Pieces.Length);
        foreach (var piece in profile.Pieces)
        {
            var steps = piece.IsUniform ? 1 : perPiece;
            for (var i = 0; i <= steps; i++)
            {
                var x = i == steps ? piece.Extent.End : piece.Extent.Start + piece.Extent.Length * i / steps;
                samples.XUm.Add(x);
                samples.Index.Add(Math.Sqrt(piece.IndexSquared(x)));
            }
        }

        return samples;
    }
}
