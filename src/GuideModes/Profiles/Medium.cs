using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>A uniform medium at one wavelength.</summary>
/// <param name="IndexSquared">n²</param>
/// <param name="GroupTerm">n·N = n² − (λ/2)·∂n²/∂λ, with N the material's group index; equal to n² where there is no dispersion.</param>
public readonly record struct Medium(double IndexSquared, double GroupTerm)
{
    public double Index => Math.Sqrt(IndexSquared);

    /// <summary>A medium without dispersion.</summary>
    public static Medium FromIndex(double index) => new(index * index, index * index);

    /// <summary>A medium from n² with its derivative in the wavelength.</summary>
    public static Medium From(Jet indexSquared, Wavelength wavelength) =>
        new(indexSquared.Value, indexSquared.Value - 0.5 * wavelength.Micrometres * indexSquared.DLambda);
}
