using GuideModes.Numerics;

namespace GuideModes.Tests.Numerics;

/// <summary>Derivatives by jets against closed forms worked out by hand.</summary>
public sealed class JetMathTest
{
    private const double X = 0.7;

    public static TheoryData<string, double[]> ClosedForms()
    {
        var (s, c) = Math.SinCos(X);
        var (sh, ch, t) = (Math.Sinh(X), Math.Cosh(X), Math.Tan(X));
        var (e, q, th) = (Math.Exp(X), 1 / (Math.Cosh(X) * Math.Cosh(X)), Math.Tanh(X));
        var bell = 2 / Math.Sqrt(Math.PI) * Math.Exp(-X * X);
        return new()
        {
            { "exp(x)", [e, e, e, e] },
            { "ln(x)", [Math.Log(X), 1 / X, -1 / (X * X), 2 / (X * X * X)] },
            { "log10(x)", [Math.Log10(X), 1 / X / Math.Log(10), -1 / (X * X) / Math.Log(10), 2 / (X * X * X) / Math.Log(10)] },
            { "sqrt(x)", [Math.Sqrt(X), 0.5 * Math.Pow(X, -0.5), -0.25 * Math.Pow(X, -1.5), 0.375 * Math.Pow(X, -2.5)] },
            { "sin(x)", [s, c, -s, -c] },
            { "cos(x)", [c, -s, -c, s] },
            { "tan(x)", [t, 1 / (c * c), 2 * t / (c * c), (2 + 4 * s * s) / (c * c * c * c)] },
            { "sinh(x)", [sh, ch, sh, ch] },
            { "cosh(x)", [ch, sh, ch, sh] },
            { "tanh(x)", [th, q, -2 * th * q, 4 * th * th * q - 2 * q * q] },
            { "sech(x)", [1 / ch, -sh / (ch * ch), (sh * sh - 1) / (ch * ch * ch), sh * (5 - sh * sh) / Math.Pow(ch, 4)] },
            { "erf(x)", [0.67780119383741847298, bell, -2 * X * bell, (4 * X * X - 2) * bell] },
            { "erfc(x)", [0.32219880616258152702, -bell, 2 * X * bell, (2 - 4 * X * X) * bell] },
            { "abs(x)", [X, 1, 0, 0] },
            { "abs(-x)", [X, 1, 0, 0] },
            { "min(x, x^2)", [X * X, 2 * X, 2, 0] },
            { "max(x, x^2)", [X, 1, 0, 0] },
            { "x^3", [X * X * X, 3 * X * X, 6 * X, 6] },
            { "x^-1", [1 / X, -1 / (X * X), 2 / (X * X * X), -6 / (X * X * X * X)] },
            { "1/(x*x)", [1 / (X * X), -2 * Math.Pow(X, -3), 6 * Math.Pow(X, -4), -24 * Math.Pow(X, -5)] },
            { "2^x", [Math.Pow(2, X), Math.Log(2) * Math.Pow(2, X), Math.Pow(Math.Log(2), 2) * Math.Pow(2, X), Math.Pow(Math.Log(2), 3) * Math.Pow(2, X)] },
            { "exp(-(x/2)^2)", [Math.Exp(-X * X / 4), -X / 2 * Math.Exp(-X * X / 4), (X * X / 4 - 0.5) * Math.Exp(-X * X / 4), (0.75 * X - X * X * X / 8) * Math.Exp(-X * X / 4)] },
        };
    }

    [Theory]
    [MemberData(nameof(ClosedForms))]
    public void Jet_OfEachFunction_IsItsClosedForm(string text, double[] expected)
    {
        var jet = Formula.Parse(text, "x").Jet(X, 1);
        AssertClose(expected[0], jet.Value);
        AssertClose(expected[1], jet.D1);
        AssertClose(expected[2], jet.D2);
        AssertClose(expected[3], jet.D3);
        Assert.Equal(0, jet.DLambda);
    }

    /// <summary>∂/∂λ of x·λ² + sin(λ)/λ at λ = 1.3: 2xλ + cos λ/λ − sin λ/λ².</summary>
    [Fact]
    public void Jet_InTheWavelength_IsItsClosedForm()
    {
        const double l = 1.3;
        var jet = Formula.Parse("x*lambda^2 + sin(lambda)/lambda", "x").Jet(X, l);
        AssertClose(2 * X * l + Math.Cos(l) / l - Math.Sin(l) / (l * l), jet.DLambda);
        AssertClose(l * l, jet.D1);
    }

    [Theory]
    [InlineData("x^2", 0, 2, 0)]
    [InlineData("x^3", 0, 0, 6)]
    [InlineData("x^4", 0, 0, 0)]
    [InlineData("x^1", 1, 0, 0)]
    [InlineData("x^0", 0, 0, 0)]
    public void Jet_OfAPowerAtZero_HasTheDerivativesThatExist(string text, double d1, double d2, double d3)
    {
        var jet = Formula.Parse(text, "x").Jet(0, 1);
        Assert.Equal((d1, d2, d3), (jet.D1, jet.D2, jet.D3));
    }

    private static void AssertClose(double expected, double actual) => Assert.Equal(expected, actual, 4e-15 * Math.Max(1, Math.Abs(expected)));
}
