using System.Collections.Immutable;

namespace GuideModes.Profiles;

/// <summary>
/// n²(x) of a planar guide at one wavelength: a uniform cover that reaches from −∞ to the first piece, smooth pieces,
/// contiguous and in order, and a uniform substrate from the last piece to +∞. n² may jump, or kink, only where
/// two pieces meet. This is the one type that every solver turns on.
/// </summary>
/// <remarks>
/// A region that runs to infinity is cut where n² can no longer be told from the substrate's; what lies beyond
/// still belongs to that region (<see cref="LastRegionIsUnbounded"/>).
/// </remarks>
public sealed class IndexProfile
{
    /// <exception cref="ArgumentException">There is no piece, or the pieces leave a gap.</exception>
    public IndexProfile(
        Wavelength wavelength,
        Medium cover,
        ImmutableArray<SmoothPiece> pieces,
        Medium substrate,
        int regionCount,
        bool lastRegionIsUnbounded = false)
    {
        if (pieces.IsDefaultOrEmpty) throw new ArgumentException("A profile has at least one piece.", nameof(pieces));
        for (var i = 1; i < pieces.Length; i++)
        {
            if (pieces[i].Extent.Start != pieces[i - 1].Extent.End)
                throw new ArgumentException($"Piece {i} does not start where piece {i - 1} ends.", nameof(pieces));
        }

        Wavelength = wavelength;
        Cover = cover;
        Pieces = pieces;
        Substrate = substrate;
        RegionCount = regionCount;
        LastRegionIsUnbounded = lastRegionIsUnbounded;
    }

    public Wavelength Wavelength { get; }

    public Medium Cover { get; }

    public ImmutableArray<SmoothPiece> Pieces { get; }

    public Medium Substrate { get; }

    public int RegionCount { get; }

    public bool LastRegionIsUnbounded { get; }

    /// <summary>From the first piece's start to the last one's end.</summary>
    public Interval Extent => new(Pieces[0].Extent.Start, Pieces[^1].Extent.End);

    /// <summary>n² of the denser end medium: a mode is guided when n_eff² lies above it.</summary>
    public double CutoffIndexSquared => Math.Max(Cover.IndexSquared, Substrate.IndexSquared);
}
