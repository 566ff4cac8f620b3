using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>One stretch, finite in length, on which n² is analytic up to and including its ends.</summary>
/// <remarks>
/// Implementers supply n² alone (<see cref="IndexSquared"/>, the fast path) and n² with its derivatives
/// (<see cref="Jet"/>), both for coordinates in or at the ends of <see cref="Extent"/>, finite and without
/// allocation. A power law, or a root in a formula, may have an unbounded derivative at an end of its piece.
/// Instances are immutable and safe to share between threads.
/// </remarks>
public abstract class SmoothPiece(Interval extent, int region)
{
    /// <summary>From where to where, in µm.</summary>
    public Interval Extent { get; } = extent;

    /// <summary>The region of the guide that this piece belongs to, counted from 0.</summary>
    public int Region { get; } = region;

    /// <summary>True where n² does not depend on the coordinate.</summary>
    public virtual bool IsUniform => false;

    /// <summary>n² at x.</summary>
    public abstract double IndexSquared(double x);

    /// <summary>n² at x with its derivatives in x and its derivative in the wavelength.</summary>
    public abstract Jet Jet(double x);
}
