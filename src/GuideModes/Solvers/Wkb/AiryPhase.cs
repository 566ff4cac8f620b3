namespace GuideModes.Solvers.Wkb;

/// <summary>The phase of the Airy functions on the oscillating side: Ai(−ζ) = M cos θ, Bi(−ζ) = −M sin θ.</summary>
/// <remarks>
/// θ(0) = −π/3, θ′ = 1/(πM²), and for large ζ θ → ⅔ζ^(3/2) − π/4 − (5/48)ζ^(−3/2).
/// Source: Olver et al., NIST Handbook of Mathematical Functions (2010), §9.8; Langer, Phys. Rev. 51 (1937) 669.
/// </remarks>
/// <param name="Theta">θ</param>
/// <param name="Rate">dθ/dζ</param>
/// <param name="HalfLogSlope">½ d ln(dθ/dζ)/dζ</param>
internal readonly record struct AiryPhase(double Theta, double Rate, double HalfLogSlope)
{
    public static AiryPhase At(double zeta)
    {
        var (ai, aiSlope, bi, biSlope) = AiryTable.At(-zeta);
        var modulusSquared = ai * ai + bi * bi;
        var theta = -Math.Atan2(bi, ai);
        var expected = 2.0 / 3 * zeta * Math.Sqrt(zeta) - Math.PI / 4;
        theta += Math.Tau * Math.Round((expected - theta) / Math.Tau);
        return new(theta, 1 / (Math.PI * modulusSquared), (ai * aiSlope + bi * biSlope) / modulusSquared);
    }

    /// <summary>The first terms of θ at large ζ, the second one only where asked for.</summary>
    public static double Asymptotic(double zeta, bool second)
    {
        var power = zeta * Math.Sqrt(zeta);
        return 2.0 / 3 * power - Math.PI / 4 - (second ? 5.0 / 48 / power : 0);
    }
}
