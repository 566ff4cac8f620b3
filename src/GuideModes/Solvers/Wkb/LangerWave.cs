namespace GuideModes.Solvers.Wkb;

/// <summary>The Airy function in the shape that Langer's field needs: √π |ζ|^¼ Ai(∓|ζ|) as a function of the phase ξ = ⅔|ζ|^(3/2).</summary>
/// <remarks>
/// For large ξ the oscillating one tends to cos(ξ − π/4), the decaying one to ½e^(−ξ). From ξ = 7 on the asymptotic series
/// is used: five terms, relative error below 1e-5. Source: Olver et al., NIST Handbook (2010), §9.7.
/// </remarks>
internal static class LangerWave
{
    private const double Switch = 7;
    private const double U1 = 5.0 / 72, U2 = 385.0 / 10368, U3 = 85085.0 / 2239488, U4 = 37182145.0 / 644972544;

    public static double Oscillating(double xi)
    {
        if (xi > Switch)
        {
            var (sin, cos) = Math.SinCos(xi - Math.PI / 4);
            var r = 1 / xi;
            return cos * (1 - r * r * (U2 - r * r * U4)) + sin * r * (U1 - r * r * U3);
        }

        var zeta = Math.Pow(1.5 * xi, 2.0 / 3);
        return Math.Sqrt(Math.PI * Math.Sqrt(zeta)) * AiryTable.At(-zeta).Ai;
    }

    public static double Decaying(double xi)
    {
        if (xi > Switch)
        {
            var r = 1 / xi;
            return 0.5 * Math.Exp(-xi) * (1 - r * (U1 - r * (U2 - r * (U3 - r * U4))));
        }

        var zeta = Math.Pow(1.5 * xi, 2.0 / 3);
        return Math.Sqrt(Math.PI * Math.Sqrt(zeta)) * AiryTable.At(zeta).Ai;
    }
}
