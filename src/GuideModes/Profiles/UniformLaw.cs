using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>One index throughout.</summary>
public sealed record UniformLaw(IndexSource N) : IndexLaw
{
    public override IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength) =>
        [new UniformPiece(extent, region, JetMath.Square(N.At(wavelength)))];

    public override double? Limit(Wavelength wavelength) => N.At(wavelength).Value;

    public override double? SettlesAt(double start, double furthest, Wavelength wavelength) => start;
}
