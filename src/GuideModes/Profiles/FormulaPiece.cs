using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>A piece whose n (or n²) is a formula without branches.</summary>
internal sealed class FormulaPiece(Interval extent, int region, GradedQuantity quantity, Formula formula, double lambda)
    : SmoothPiece(extent, region)
{
    private readonly Func<double, double, double> _number = formula.Number;
    private readonly Func<double, double, Jet> _jet = formula.Derivatives;

    public override double IndexSquared(double x) => quantity.ToIndexSquared(_number(x, lambda));

    public override Jet Jet(double x) => quantity.ToIndexSquared(_jet(x, lambda));
}
