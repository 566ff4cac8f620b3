using MathNet.Numerics;

namespace GuideModes.Solvers.Wkb;

/// <summary>Ai, Bi and their slopes at one argument.</summary>
internal readonly record struct AiryValues(double Ai, double AiSlope, double Bi, double BiSlope);

/// <summary>Airy functions at some tens of nanoseconds a call.</summary>
/// <remarks>
/// Method: values at multiples of 1/16 from MathNet.Numerics, and from the nearest of them the Taylor series that y″ = xy gives:
/// a₂ = x₀a₀/2, aₙ₊₂ = (x₀aₙ + aₙ₋₁)/((n + 1)(n + 2)). Source: Olver et al., NIST Handbook (2010), §9.2 and 3.7(ii).
/// Limits: relative error 1e-14 away from zeros; arguments outside −5 … 12 go to MathNet.Numerics.
/// </remarks>
internal static class AiryTable
{
    private const double Least = -5, Most = 12;
    private const int PerUnit = 16, Terms = 11;
    private static readonly AiryValues[] Nodes = [.. Enumerable.Range(0, (int)((Most - Least) * PerUnit) + 1).Select(i => Direct(Least + (double)i / PerUnit))];

    public static AiryValues At(double x)
    {
        if (!(x >= Least && x <= Most)) return Direct(x);
        var i = (int)Math.Round((x - Least) * PerUnit);
        var origin = Least + (double)i / PerUnit;
        ref readonly var node = ref Nodes[i];
        var (ai, aiSlope) = Advance(node.Ai, node.AiSlope, origin, x - origin);
        var (bi, biSlope) = Advance(node.Bi, node.BiSlope, origin, x - origin);
        return new(ai, aiSlope, bi, biSlope);
    }

    private static AiryValues Direct(double x) => new(
        SpecialFunctions.AiryAi(x), SpecialFunctions.AiryAiPrime(x), SpecialFunctions.AiryBi(x), SpecialFunctions.AiryBiPrime(x));

    private static (double Value, double Slope) Advance(double value, double slope, double origin, double t)
    {
        var (before, current, next) = (value, slope, 0.5 * origin * value);
        var (sum, sumSlope, power) = (value + slope * t, slope, t);
        for (var n = 2; n < Terms; n++)
        {
            sumSlope += n * next * power;
            power *= t;
            sum += next * power;
            (before, current, next) = (current, next, (origin * current + before) / (n * (n + 1)));
        }

        return (sum, sumSlope);
    }
}
