using GuideModes.Solvers.Wkb;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>Weights against ∫₀¹ y^(a+n) dy = 1/(a + n + 1), continued in a (Hadamard's finite part).</summary>
public class HalfRangeRuleTests
{
    [Theory]
    [InlineData(0.0, 1e-14)]
    [InlineData(0.5, 1e-14)]
    [InlineData(-0.5, 1e-13)]
    [InlineData(-1.5, 1e-11)]
    [InlineData(-2.5, 1e-9)]
    [InlineData(-3.5, 1e-7)]
    public void Weighted_Monomials_AreExact(double a, double tolerance)
    {
        foreach (var rule in HalfRangeRule.Ladder.Where(r => r.Nodes.Length <= 32))
        {
            var weights = rule.Weighted(a);
            for (var n = 0; n < rule.Nodes.Length; n++)
            {
                var sum = 0.0;
                for (var i = 0; i < weights.Length; i++) sum += weights[i] * Math.Pow(rule.Nodes[i], n);
                Assert.Equal(1 / (a + n + 1), sum, tolerance);
            }
        }
    }

    /// <summary>∫₀¹ cos y/√y dy = √(2π)·C(√(2/π)), Fresnel's integral: 1.8090484758005441629 (mpmath).</summary>
    [Fact]
    public void MinusHalf_Cosine_ConvergesToRounding()
    {
        var rule = HalfRangeRule.Ladder[1];
        var sum = 0.0;
        for (var i = 0; i < rule.Nodes.Length; i++) sum += rule.MinusHalf[i] * Math.Cos(rule.Nodes[i]);
        Assert.Equal(1.8090484758005441629, sum, 1e-14);
    }
}
