using System.Collections.Immutable;
using GuideModes.Numerics;
using GuideModes.Profiles;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>Takes the singular potential out of a TM problem: a power law whose n² has no finite slope or curvature at its centre.</summary>
/// <remarks>
/// TM's potential ¾(s′/s)² − ½s″/s grows without bound there, but the equation for H itself holds s alone, no derivative: replacing s
/// by a straight line on a stretch of length h moves n_eff by no more than about k·h·max|δs|, the joints taking care of the kinks.
/// h is a millionth of the piece; for s ~ |x|^α the shift falls as h^(α+1), 1e-15 and less from α = 1.2 on. It goes into the bracket.
/// </remarks>
internal static class SingularEnds
{
    private const double Share = 1e-6;

    /// <summary>The problem with straight caps for singular ends, and what that may do to n_eff.</summary>
    public static (ModeProblem Problem, double IndexError) Capped(ModeProblem problem)
    {
        var profile = problem.Profile;
        if (problem.Polarization == Polarization.TE || !profile.Pieces.Any(piece => IsSingular(problem, piece, piece.Extent.Start) || IsSingular(problem, piece, piece.Extent.End)))
            return (problem, 0);
        var error = 0.0;
        var pieces = ImmutableArray.CreateBuilder<SmoothPiece>();
        foreach (var piece in profile.Pieces) error += Add(problem, piece, pieces);
        var capped = new IndexProfile(
            profile.Wavelength, profile.Cover, pieces.ToImmutable(), profile.Substrate, profile.RegionCount, profile.LastRegionIsUnbounded);
        return (problem with { Profile = capped }, error * profile.Wavelength.Wavenumber);
    }

    private static bool IsSingular(ModeProblem problem, SmoothPiece piece, double x) =>
        !piece.IsUniform && !double.IsFinite(new Potential(piece, problem).At(x));

    /// <summary>Adds a piece, capped where it must be; gives Σ h·max|δs|.</summary>
    private static double Add(ModeProblem problem, SmoothPiece piece, ImmutableArray<SmoothPiece>.Builder into)
    {
        var (start, end) = (piece.Extent.Start, piece.Extent.End);
        var h = Math.Max(Share * piece.Extent.Length, 64 * Math.BitIncrement(Math.Abs(end)) - 64 * Math.Abs(end));
        var (inner, outer) = (start, end);
        if (IsSingular(problem, piece, start)) inner = Math.Min(start + h, piece.Extent.Middle);
        if (IsSingular(problem, piece, end)) outer = Math.Max(end - h, piece.Extent.Middle);
        var error = 0.0;
        if (inner > start) error += AddCap(piece, new(start, inner), into);
        if (outer > inner) into.Add(new Part(piece, new(inner, outer)));
        if (outer < end) error += AddCap(piece, new(outer, end), into);
        return error;
    }

    private static double AddCap(SmoothPiece piece, Interval extent, ImmutableArray<SmoothPiece>.Builder into)
    {
        var cap = new Cap(piece, extent);
        into.Add(cap);
        var off = 0.0;
        for (var i = 1; i < 8; i++)
        {
            var x = extent.Start + extent.Length * i / 8;
            off = Math.Max(off, Math.Abs(piece.IndexSquared(x) - cap.IndexSquared(x)));
        }

        return off * extent.Length;
    }

    /// <summary>A piece on a part of its extent.</summary>
    private sealed class Part(SmoothPiece whole, Interval extent) : SmoothPiece(extent, whole.Region)
    {
        public override bool IsUniform => whole.IsUniform;

        public override double IndexSquared(double x) => whole.IndexSquared(x);

        public override Jet Jet(double x) => whole.Jet(x);
    }

    /// <summary>The straight line between a piece's n² at two points.</summary>
    private sealed class Cap(SmoothPiece piece, Interval extent) : SmoothPiece(extent, piece.Region)
    {
        private readonly double _start = piece.IndexSquared(extent.Start);
        private readonly double _slope = (piece.IndexSquared(extent.End) - piece.IndexSquared(extent.Start)) / extent.Length;

        /// <summary>Along so short a stretch the wavelength's part does not change; it is taken where the piece is surely regular.</summary>
        private readonly double _dispersion = piece.Jet(extent.Middle).DLambda;

        public override double IndexSquared(double x) => _start + _slope * (x - Extent.Start);

        public override Jet Jet(double x) => new(IndexSquared(x), _slope, 0, 0, _dispersion);
    }
}
