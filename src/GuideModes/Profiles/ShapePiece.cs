using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>A piece on which n or n² is base + delta·g(s), s = (x − origin)/length.</summary>
/// <remarks>
/// Formed exactly so, in that order: once delta·g is below a rounding of the base, n² is the base's n² to the last bit,
/// and a tail joins its substrate without a step.
/// </remarks>
internal sealed class ShapePiece<TShape>(
    Interval extent,
    int region,
    GradedQuantity quantity,
    Jet basis,
    Jet delta,
    TShape shape,
    double origin,
    double length) : SmoothPiece(extent, region)
    where TShape : struct, IShape
{
    private readonly bool _gradesIndex = quantity == GradedQuantity.Index;
    private readonly double _base = basis.Value;
    private readonly double _delta = delta.Value;

    public override double IndexSquared(double x)
    {
        var value = _base + _delta * shape.Value((x - origin) / length);
        return _gradesIndex ? value * value : value;
    }

    public override Jet Jet(double x)
    {
        var g = shape.Derivatives((x - origin) / length);
        var scale = _delta / length;
        var value = new Jet(
            _base + _delta * g.G,
            scale * g.G1,
            scale / length * g.G2,
            scale / (length * length) * g.G3,
            basis.DLambda + delta.DLambda * g.G);
        return _gradesIndex ? JetMath.Square(value) : value;
    }
}
