using GuideModes.Numerics;

namespace GuideModes.Materials;

/// <summary>The extraordinary index of congruent lithium niobate with temperature: Jundt 1997, Opt. Lett. 22, 1553.</summary>
/// <remarks>
/// n² = a₁ + b₁f + (a₂ + b₂f)/(λ² − (a₃ + b₃f)²) + (a₄ + b₄f)/(λ² − a₅²) − a₆λ², f = (T − 24.5)(T + 570.82), T in °C.
/// The product in f is from memory: the copy that the coefficients were read from has a division there.
/// </remarks>
internal static class LithiumNiobate
{
    public static Jet ExtraordinarySquared(Jet lambda, double temperature)
    {
        var f = (temperature - 24.5) * (temperature + 570.82);
        var squared = JetMath.Square(lambda);
        var pole = 0.20692 - 0.89e-8 * f;
        return 5.35583 + 4.629e-7 * f
            + (Jet)(0.100473 + 3.862e-8 * f) / (squared - pole * pole)
            + (Jet)(100 + 2.657e-5 * f) / (squared - 11.34927 * 11.34927)
            - 0.015334 * squared;
    }
}
