using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Solvers.TransferMatrix;

/// <summary>ξ and η_m against their power series in 28-digit decimals, and against closed forms.</summary>
public sealed class StepFunctionsTests
{
    private const double Epsilon = 2.2e-16;

    /// <summary>From −200 to 200, both sides of |Z| = 4 and of 0 included.</summary>
    public static TheoryData<double> Arguments =>
    [
        -200, -123.4, -50, -9.869604401089358, -4.000001, -4, -3.999999, -1, -1e-8, 0, 1e-12, 0.3, 3.999999, 4, 4.000001, 17, 60, 143.7, 200,
    ];

    [Theory, MemberData(nameof(Arguments))]
    public void Evaluate_AnyArgument_AgreesWithTheSeries(double z)
    {
        var f = new double[StepFunctions.Count];
        var scale = Math.Exp(-StepFunctions.Evaluate(z, f));
        for (var m = -1; m <= StepFunctions.Top; m++)
            Assert.Equal((double)Series(m, (decimal)z) * scale, f[m + 1], 60 * Epsilon);
    }

    [Theory, MemberData(nameof(Arguments))]
    public void Evaluate_AnyArgument_AgreesWithSineAndCosine(double z)
    {
        var f = new double[StepFunctions.Count];
        var scale = Math.Exp(-StepFunctions.Evaluate(z, f));
        var root = Math.Sqrt(Math.Abs(z));
        Assert.Equal(z < 0 ? Math.Cos(root) : Math.Cosh(root) * scale, f[0], 20 * Epsilon);
        if (z != 0) Assert.Equal(z < 0 ? Math.Sin(root) / root : Math.Sinh(root) / root * scale, f[1], 20 * Epsilon);
    }

    [Theory]
    [InlineData(4)]
    [InlineData(-4)]
    public void Evaluate_WhereTheMethodChanges_HasNoStep(double z)
    {
        double[] below = new double[StepFunctions.Count], above = new double[StepFunctions.Count];
        var belowScale = Math.Exp(StepFunctions.Evaluate(Math.BitDecrement(Math.Abs(z)) * Math.Sign(z), below));
        var aboveScale = Math.Exp(StepFunctions.Evaluate(z, above));
        for (var i = 0; i < below.Length; i++) Assert.Equal(below[i] * belowScale, above[i] * aboveScale, 200 * Epsilon);
    }

    [Fact]
    public void Evaluate_ThickBarrier_StaysFinite()
    {
        var f = new double[StepFunctions.Count];
        Assert.Equal(1e4, StepFunctions.Evaluate(1e8, f));
        Assert.All(f, value => Assert.InRange(value, 0, 1));
    }

    /// <summary>η_m = Σ_q Z^q 2^m (q+m)!/(q!(2q+2m+1)!), η_−1 = ξ = Σ Z^q/(2q)!; term by term in decimals.</summary>
    private static decimal Series(int m, decimal z)
    {
        var term = 1m;
        for (var j = 1; j <= m; j++) term /= 2 * j + 1;
        var sum = 0m;
        for (var q = 0; q < 80; q++)
        {
            sum += term;
            term = term * z / (2m * (q + 1) * (2 * q + 2 * m + 3));
        }

        return sum;
    }
}
