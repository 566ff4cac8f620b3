namespace GuideModes;

/// <summary>A vacuum wavelength: positive and finite.</summary>
/// <remarks>
/// Held in micrometres, the unit people type, so that 1.55 reads back as 1.55.
/// <c>default</c> is not a wavelength, and every public entry point refuses it.
/// </remarks>
public readonly record struct Wavelength
{
    private Wavelength(double micrometres) => Micrometres = micrometres;

    /// <exception cref="ArgumentOutOfRangeException">The value is not positive and finite.</exception>
    public static Wavelength FromMicrometres(double micrometres) => new(Require.PositiveFinite(micrometres));

    public double Micrometres { get; }

    /// <summary>The vacuum wavenumber k₀ = 2π/λ, in rad/µm.</summary>
    public double Wavenumber => Math.Tau / Micrometres;
}
