using GuideModes.Numerics;

namespace GuideModes.Tests.Numerics;

/// <summary>Special functions against values computed with mpmath 1.3 at 40 digits, at the double nearest to x.</summary>
public sealed class RealMathTest
{
    public static TheoryData<double, double, double> ErrorFunctions => new()
    {
        { -5, -0.99999999999846254, 1.99999999999846254 },
        { -2.3, -0.998856823402643348, 1.99885682340264335 },
        { -0.7, -0.677801193837418442, 1.67780119383741844 },
        { -1e-8, -1.12837916709551256e-8, 1.00000001128379167 },
        { 1e-10, 1.12837916709551262e-10, 0.999999999887162083 },
        { 0.03, 0.0338412223417354321, 0.966158777658264568 },
        { 0.3, 0.328626759459127416, 0.671373240540872584 },
        { 0.49, 0.511668261188523091, 0.488331738811476909 },
        { 0.5, 0.520499877813046538, 0.479500122186953462 },
        { 0.51, 0.529243619841170437, 0.470756380158829563 },
        { 0.9, 0.79690821242283214, 0.20309178757716786 },
        { 1.2, 0.910313978229635368, 0.0896860217703646316 },
        { 1.5, 0.966105146475310727, 0.0338948535246892729 },
        { 1.7, 0.983790458590774561, 0.0162095414092254392 },
        { 2.1, 0.997020533343667016, 0.00297946665633298429 },
        { 2.5, 0.999593047982555041, 0.00040695201744495894 },
        { 3, 0.999977909503001415, 0.0000220904969985854414 },
        { 3.6, 0.999999644137006992, 3.55862993007685063e-7 },
        { 4.4, 0.999999999510828973, 4.89171027060587275e-10 },
        { 4.6, 0.999999999922504004, 7.74959959744185779e-11 },
        { 5.5, 0.999999999999992642, 7.35784791797439806e-15 },
        { 6.2, 0.999999999999999998, 1.81667561723812702e-18 },
        { 8.4, 1.0, 1.51461535279730188e-32 },
        { 8.6, 1.0, 4.93876957077420861e-34 },
        { 11, 1.0, 1.44086613794369468e-54 },
        { 15, 1.0, 7.21299417245120667e-100 },
        { 19, 1.0, 4.91772283925647545e-159 },
        { 23, 1.0, 4.44126594808805724e-232 },
        { 26, 1.0, 5.66319240885614285e-296 },
    };

    [Theory]
    [MemberData(nameof(ErrorFunctions))]
    public void ErfAndErfc_OverTheirRange_AreGoodToAFewRoundings(double x, double erf, double erfc)
    {
        AssertRelative(erf, RealMath.Erf(x), 1e-15);
        AssertRelative(erfc, RealMath.Erfc(x), 1e-15 + 1.2e-16 * x * x);   // exp(−x²) carries the rounding of x², relative
    }

    [Theory]
    [InlineData(0, 1)]
    [InlineData(1, 0.64805427366388539957)]
    [InlineData(-1, 0.64805427366388539957)]
    [InlineData(40, 8.4967085105831784e-18)]
    [InlineData(800, 0)]
    public void Sech_OverItsRange_IsOneOverCosh(double x, double expected) => AssertRelative(expected, RealMath.Sech(x), 4e-16);

    private static void AssertRelative(double expected, double actual, double tolerance) =>
        Assert.True(
            Math.Abs(actual - expected) <= tolerance * Math.Abs(expected),
            $"off by {(actual - expected) / expected:E2} relative");
}
