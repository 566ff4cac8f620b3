using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>A dimensionless profile shape g(s), as a number and with derivatives; a struct, so that the piece that uses it is compiled for it.</summary>
internal interface IShape
{
    double Value(double s);

    Jet Jet(Jet s);
}

/// <summary>g = s.</summary>
internal readonly struct LinearShape : IShape
{
    public double Value(double s) => s;

    public Jet Jet(Jet s) => s;
}

/// <summary>g = s².</summary>
internal readonly struct SquareShape : IShape
{
    public double Value(double s) => s * s;

    public Jet Jet(Jet s) => JetMath.Square(s);
}

/// <summary>g = |s|^alpha on one side of the centre: sign +1 for s ≥ 0, −1 for s ≤ 0, so that the slope at s = 0 is that side's.</summary>
internal readonly struct PowerShape(double alpha, double sign) : IShape
{
    public double Value(double s) => Math.Pow(Math.Abs(s), alpha);

    public Jet Jet(Jet s)
    {
        var distance = s * sign;
        return JetMath.Pow(distance with { Value = Math.Abs(s.Value) }, alpha);
    }
}

/// <summary>g = s^alpha for an even integer alpha: smooth through s = 0.</summary>
internal readonly struct EvenPowerShape(double alpha) : IShape
{
    public double Value(double s) => Math.Pow(s, alpha);

    public Jet Jet(Jet s) => JetMath.Pow(s, alpha);
}

/// <summary>g = exp(−s²).</summary>
internal readonly struct GaussianShape : IShape
{
    public double Value(double s) => Math.Exp(-s * s);

    public Jet Jet(Jet s) => JetMath.Exp(-JetMath.Square(s));
}

/// <summary>g = exp(−s).</summary>
internal readonly struct ExponentialShape : IShape
{
    public double Value(double s) => Math.Exp(-s);

    public Jet Jet(Jet s) => JetMath.Exp(-s);
}

/// <summary>g = erfc(s).</summary>
internal readonly struct ErfcShape : IShape
{
    public double Value(double s) => RealMath.Erfc(s);

    public Jet Jet(Jet s) => JetMath.Erfc(s);
}

/// <summary>g = sech²(s).</summary>
internal readonly struct SechSquaredShape : IShape
{
    public double Value(double s) => RealMath.Square(RealMath.Sech(s));

    public Jet Jet(Jet s) => JetMath.Square(JetMath.Sech(s));
}

/// <summary>g = 1/(1 + exp(s)): the Fermi step.</summary>
internal readonly struct FermiShape : IShape
{
    public double Value(double s) => 1 / (1 + Math.Exp(s));

    public Jet Jet(Jet s)
    {
        var e = Math.Exp(-Math.Abs(s.Value));
        var slope = -e / ((1 + e) * (1 + e));
        var g = Value(s.Value);
        var curvature = slope * (2 * g - 1);
        return s.Compose(g, slope, curvature, curvature * (2 * g - 1) + 2 * slope * slope);
    }
}

/// <summary>g = ((c₃ s + c₂) s + c₁) s.</summary>
internal readonly struct CubicShape(double c1, double c2, double c3) : IShape
{
    public double Value(double s) => ((c3 * s + c2) * s + c1) * s;

    public Jet Jet(Jet s) => s.Compose(
        Value(s.Value),
        (3 * c3 * s.Value + 2 * c2) * s.Value + c1,
        6 * c3 * s.Value + 2 * c2,
        6 * c3);
}
