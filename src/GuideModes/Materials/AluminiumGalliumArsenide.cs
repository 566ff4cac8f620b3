using GuideModes.Numerics;

namespace GuideModes.Materials;

/// <summary>AlxGa1−xAs below its gap at 300 K: Gehrsitz et al. 2000, J. Appl. Phys. 87, 7825, Tables II and IV, Eq. 11.</summary>
/// <remarks>
/// n² = A + C₀/(E₀² − E²) + C₁/(E₁² − E²) + R with E = 1/λ in µm⁻¹; R is the lattice's share.
/// The model diverges at the direct gap E₀, so its range is kept 5 % of the wavelength above it.
/// </remarks>
internal static class AluminiumGalliumArsenide
{
    private const double Temperature = 300;

    /// <summary>Where the source's own limits are not known to us, this ends the range.</summary>
    private const double LongestUm = 2;

    public static WavelengthRange RangeAt(double x) => new(1.05 / Gap(x), LongestUm);

    public static Jet IndexSquared(Jet lambda, double x)
    {
        var energySquared = JetMath.Pow(lambda, -2.0);
        var gap = Gap(x);
        return Background(x)
            + (1 / InverseC0(x)) / (gap * gap - energySquared)
            + (21.5647 + x * (113.74 + x * (-122.5 + x * (108.401 - x * 47.318)))) / (SecondSquared(x) - energySquared)
            + (1 - x) * 1.55e-3 / (0.724e-3 - energySquared)
            + x * 2.61e-3 / (1.331e-3 - energySquared);
    }

    /// <summary>E₀, µm⁻¹.</summary>
    private static double Gap(double x)
    {
        const double boltzmann = 0.0861708e-3;
        const double micrometreElectronvolts = 1.239856;
        static double Bose(double energy) => energy * (1 - 1 / Math.Tanh(energy / (2 * boltzmann * Temperature)));
        var gallium = (1.5192 + 1.8 * Bose(15.9e-3) + 1.1 * Bose(33.6e-3)) / micrometreElectronvolts;
        return gallium + x * (1.1308 + x * 0.1436);
    }

    private static double Background(double x) =>
        5.9613 + 7.178e-4 * Temperature - 0.953e-6 * Temperature * Temperature
        + x * (-16.159 + x * (43.511 + x * (-71.317 + x * (57.535 - x * 17.451))));

    private static double InverseC0(double x) => 50.535 + x * (-150.7 + x * (-62.209 + x * (797.16 + x * (-1125 + x * 503.79))));

    private static double SecondSquared(double x) =>
        4.7171 - 3.237e-4 * Temperature - 1.358e-6 * Temperature * Temperature + x * (11.006 - x * 3.08);
}
