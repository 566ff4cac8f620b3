using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>A stretch of one medium.</summary>
public sealed class UniformPiece(Interval extent, int region, Jet indexSquared) : SmoothPiece(extent, region)
{
    public override bool IsUniform => true;

    public override double IndexSquared(double x) => indexSquared.Value;

    public override Jet Jet(double x) => indexSquared;
}
