using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>g and its first three derivatives at one s.</summary>
internal readonly record struct ShapeDerivatives(double G, double G1, double G2, double G3);

/// <summary>A dimensionless profile shape g(s), alone and with derivatives; a struct, so that the piece that uses it is compiled for it.</summary>
internal interface IShape
{
    double Value(double s);

    ShapeDerivatives Derivatives(double s);
}

/// <summary>g = s.</summary>
internal readonly struct LinearShape : IShape
{
    public double Value(double s) => s;

    public ShapeDerivatives Derivatives(double s) => new(s, 1, 0, 0);
}

/// <summary>g = s².</summary>
internal readonly struct SquareShape : IShape
{
    public double Value(double s) => s * s;

    public ShapeDerivatives Derivatives(double s) => new(s * s, 2 * s, 2, 0);
}

/// <summary>g = |s|^alpha on one side of the centre: sign +1 for s ≥ 0, −1 for s ≤ 0, so that the slope at s = 0 is that side's.</summary>
internal readonly struct PowerShape(double alpha, double sign) : IShape
{
    public double Value(double s) => Math.Pow(Math.Abs(s), alpha);

    public ShapeDerivatives Derivatives(double s)
    {
        var g = JetMath.Pow(Jet.Coordinate(Math.Abs(s)), alpha);
        return new(g.Value, sign * g.D1, g.D2, sign * g.D3);
    }
}

/// <summary>g = s^alpha for an even integer alpha: smooth through s = 0.</summary>
internal readonly struct EvenPowerShape(double alpha) : IShape
{
    public double Value(double s) => Math.Pow(s, alpha);

    public ShapeDerivatives Derivatives(double s)
    {
        var g = JetMath.Pow(Jet.Coordinate(s), alpha);
        return new(g.Value, g.D1, g.D2, g.D3);
    }
}

/// <summary>g = exp(−s²).</summary>
internal readonly struct GaussianShape : IShape
{
    public double Value(double s) => Math.Exp(-s * s);

    public ShapeDerivatives Derivatives(double s)
    {
        var g = Math.Exp(-s * s);
        return new(g, -2 * s * g, (4 * s * s - 2) * g, (12 - 8 * s * s) * s * g);
    }
}

/// <summary>g = exp(−s).</summary>
internal readonly struct ExponentialShape : IShape
{
    public double Value(double s) => Math.Exp(-s);

    public ShapeDerivatives Derivatives(double s)
    {
        var g = Math.Exp(-s);
        return new(g, -g, g, -g);
    }
}

/// <summary>g = erfc(s).</summary>
internal readonly struct ErfcShape : IShape
{
    private const double TwoOverRootPi = 1.1283791670955125739;

    public double Value(double s) => RealMath.Erfc(s);

    public ShapeDerivatives Derivatives(double s)
    {
        var slope = -TwoOverRootPi * Math.Exp(-s * s);
        return new(RealMath.Erfc(s), slope, -2 * s * slope, (4 * s * s - 2) * slope);
    }
}

/// <summary>g = sech²(s); with t = tanh s, g′ = −2tg and t² = 1 − g.</summary>
internal readonly struct SechSquaredShape : IShape
{
    public double Value(double s) => RealMath.Square(RealMath.Sech(s));

    public ShapeDerivatives Derivatives(double s)
    {
        var g = Value(s);
        var slope = -2 * Math.Tanh(s) * g;
        return new(g, slope, (4 - 6 * g) * g, (4 - 12 * g) * slope);
    }
}

/// <summary>g = 1/(1 + exp(s)): the Fermi step; g′ = −g(1 − g).</summary>
internal readonly struct FermiShape : IShape
{
    public double Value(double s) => 1 / (1 + Math.Exp(s));

    public ShapeDerivatives Derivatives(double s)
    {
        var e = Math.Exp(-Math.Abs(s));
        var share = 1 / (1 + e);
        var g = s < 0 ? share : e * share;
        var slope = -e * share * share;
        var curvature = slope * (2 * g - 1);
        return new(g, slope, curvature, curvature * (2 * g - 1) + 2 * slope * slope);
    }
}

/// <summary>g = ((c₃ s + c₂) s + c₁) s.</summary>
internal readonly struct CubicShape(double c1, double c2, double c3) : IShape
{
    public double Value(double s) => ((c3 * s + c2) * s + c1) * s;

    public ShapeDerivatives Derivatives(double s) =>
        new(Value(s), (3 * c3 * s + 2 * c2) * s + c1, 6 * c3 * s + 2 * c2, 6 * c3);
}
