using System.Runtime.CompilerServices;

namespace GuideModes.Numerics;

/// <summary>The elementary functions on <see cref="Jet"/>: value and exact derivatives together.</summary>
/// <remarks>
/// Each function hands its own first three derivatives, in closed form, to <see cref="Jet.Compose"/>.
/// <see cref="Abs"/>, <see cref="Min"/> and <see cref="Max"/> take the branch they are on and have no derivative where the branches meet.
/// </remarks>
public static class JetMath
{
    private const double TwoOverRootPi = 1.1283791670955125739;

    public static Jet Exp(Jet u)
    {
        var e = Math.Exp(u.Value);
        return u.Compose(e, e, e, e);
    }

    public static Jet Log(Jet u)
    {
        var r = 1 / u.Value;
        return u.Compose(Math.Log(u.Value), r, -r * r, 2 * r * r * r);
    }

    public static Jet Log10(Jet u)
    {
        var r = 1 / u.Value;
        const double scale = 0.43429448190325182765;
        return u.Compose(Math.Log10(u.Value), scale * r, -scale * r * r, 2 * scale * r * r * r);
    }

    public static Jet Sqrt(Jet u)
    {
        var root = Math.Sqrt(u.Value);
        var first = 0.5 / root;
        var second = -0.5 * first / u.Value;
        return u.Compose(root, first, second, -1.5 * second / u.Value);
    }

    public static Jet Square(Jet u) => u.Compose(u.Value * u.Value, 2 * u.Value, 2, 0);

    /// <summary>u to a constant power; the derivatives stay finite at u = 0 wherever they exist there.</summary>
    public static Jet Pow(Jet u, double power) => u.Compose(
        Math.Pow(u.Value, power),
        Falling(u.Value, power, 1),
        Falling(u.Value, power, 2),
        Falling(u.Value, power, 3));

    public static Jet Pow(Jet u, Jet power)
    {
        if (power is { D1: 0, D2: 0, D3: 0, DLambda: 0 }) return Pow(u, power.Value);
        var exponent = power * Log(u);
        var value = Math.Pow(u.Value, power.Value);
        return exponent.Compose(value, value, value, value);
    }

    public static Jet Sin(Jet u)
    {
        var (s, c) = Math.SinCos(u.Value);
        return u.Compose(s, c, -s, -c);
    }

    public static Jet Cos(Jet u)
    {
        var (s, c) = Math.SinCos(u.Value);
        return u.Compose(c, -s, -c, s);
    }

    public static Jet Tan(Jet u)
    {
        var t = Math.Tan(u.Value);
        var q = 1 + t * t;
        return u.Compose(t, q, 2 * t * q, 2 * q * (1 + 3 * t * t));
    }

    public static Jet Sinh(Jet u)
    {
        var (s, c) = (Math.Sinh(u.Value), Math.Cosh(u.Value));
        return u.Compose(s, c, s, c);
    }

    public static Jet Cosh(Jet u)
    {
        var (s, c) = (Math.Sinh(u.Value), Math.Cosh(u.Value));
        return u.Compose(c, s, c, s);
    }

    public static Jet Tanh(Jet u)
    {
        var t = Math.Tanh(u.Value);
        var q = RealMath.Square(RealMath.Sech(u.Value));
        return u.Compose(t, q, -2 * t * q, q * (4 - 6 * q));
    }

    public static Jet Sech(Jet u)
    {
        var v = RealMath.Sech(u.Value);
        var t = Math.Tanh(u.Value);
        return u.Compose(v, -v * t, v * (1 - 2 * v * v), -v * t * (1 - 6 * v * v));
    }

    public static Jet Erf(Jet u)
    {
        var slope = TwoOverRootPi * Math.Exp(-u.Value * u.Value);
        return u.Compose(RealMath.Erf(u.Value), slope, -2 * u.Value * slope, (4 * u.Value * u.Value - 2) * slope);
    }

    public static Jet Erfc(Jet u)
    {
        var slope = -TwoOverRootPi * Math.Exp(-u.Value * u.Value);
        return u.Compose(RealMath.Erfc(u.Value), slope, -2 * u.Value * slope, (4 * u.Value * u.Value - 2) * slope);
    }

    public static Jet Abs(Jet u) => u.Value < 0 ? -u : u;

    public static Jet Min(Jet a, Jet b) => a.Value <= b.Value || double.IsNaN(a.Value) ? a : b;

    public static Jet Max(Jet a, Jet b) => a.Value >= b.Value || double.IsNaN(a.Value) ? a : b;

    /// <summary>a·b as a call of its own: a compiled formula of hundreds of products would take long to compile if each were inlined.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    internal static Jet Product(Jet a, Jet b) => a * b;

    /// <summary>a/b as a call of its own, for the same reason.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    internal static Jet Quotient(Jet a, Jet b) => a / b;

    /// <summary>The derivative of x^p of the given order, p(p − 1)…·x^(p − order); zero, not 0·∞, once a factor vanishes.</summary>
    private static double Falling(double x, double power, int order)
    {
        var factor = 1.0;
        for (var i = 0; i < order; i++) factor *= power - i;
        return factor == 0 ? 0 : factor * Math.Pow(x, power - order);
    }
}
