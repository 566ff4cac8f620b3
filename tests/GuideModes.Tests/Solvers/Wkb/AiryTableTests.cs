using GuideModes.Solvers.Wkb;
using MathNet.Numerics;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>The tabulated Airy functions against MathNet.Numerics, their Wronskian, and the phase against its asymptotic series (NIST Handbook, §9.8).</summary>
public class AiryTableTests
{
    [Fact]
    public void At_OverItsRange_AgreesWithTheLibraryAndTheWronskian()
    {
        for (var x = -4.99; x < 11.9; x += 0.0137)
        {
            var airy = AiryTable.At(x);
            Assert.Equal(SpecialFunctions.AiryAi(x), airy.Ai, 1e-13 * Math.Max(1e-12, x < 0 ? 1 : Math.Abs(airy.Ai) * 10));
            Assert.Equal(SpecialFunctions.AiryBiPrime(x), airy.BiSlope, 1e-13 * (1 + Math.Abs(airy.BiSlope) * 10));
            Assert.Equal(1 / Math.PI, airy.Ai * airy.BiSlope - airy.AiSlope * airy.Bi, 1e-12);
        }
    }

    [Fact]
    public void Phase_FarFromTheTurningPoint_TendsToItsSeries()
    {
        Assert.Equal(-Math.PI / 3, AiryPhase.At(0).Theta, 1e-14);
        foreach (var zeta in new[] { 6.0, 10, 14 })
        {
            var next = 2.0 / 3 * 1105 / 6144 * Math.Pow(zeta, -4.5);
            Assert.Equal(AiryPhase.Asymptotic(zeta, true) + next, AiryPhase.At(zeta).Theta, 8 * next * Math.Pow(zeta, -3));
        }
    }
}
