using MathNet.Numerics;

namespace GuideModes.Numerics;

/// <summary>The real functions that formulas and profiles are made of, under one roof; <see cref="JetMath"/> has the same names.</summary>
/// <remarks>
/// erf and erfc are the rational approximations of MathNet.Numerics (after the Boost library's). The tests hold them to values of
/// 40 digits: erf to 1e-15 relative, erfc to 1e-15 + 1.2e-16·x², the rounding of x² inside its exponential, until it underflows near x = 26.
/// </remarks>
internal static class RealMath
{
    public static double Exp(double x) => Math.Exp(x);

    public static double Log(double x) => Math.Log(x);

    public static double Log10(double x) => Math.Log10(x);

    public static double Sqrt(double x) => Math.Sqrt(x);

    public static double Pow(double x, double power) => Math.Pow(x, power);

    public static double Square(double x) => x * x;

    public static double Sin(double x) => Math.Sin(x);

    public static double Cos(double x) => Math.Cos(x);

    public static double Tan(double x) => Math.Tan(x);

    public static double Sinh(double x) => Math.Sinh(x);

    public static double Cosh(double x) => Math.Cosh(x);

    public static double Tanh(double x) => Math.Tanh(x);

    /// <summary>1/cosh x, written so that it fades to 0 without passing through infinity.</summary>
    public static double Sech(double x)
    {
        var e = Math.Exp(-Math.Abs(x));
        return 2 * e / (1 + e * e);
    }

    public static double Erf(double x) => SpecialFunctions.Erf(x);

    public static double Erfc(double x) => SpecialFunctions.Erfc(x);

    public static double Abs(double x) => Math.Abs(x);

    public static double Min(double a, double b) => Math.Min(a, b);

    public static double Max(double a, double b) => Math.Max(a, b);
}
