using GuideModes.Materials;
using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>Where an index, or an index difference, comes from: asked at a wavelength, it answers with n and ∂n/∂λ.</summary>
public abstract record IndexSource
{
    /// <summary>n at a wavelength; the derivative in λ is the material's dispersion, those in x are zero.</summary>
    public abstract Jet At(Wavelength wavelength);

    public static implicit operator IndexSource(double index) => new ConstantIndex(index);

    public static IndexSource FromDouble(double index) => new ConstantIndex(index);
}

/// <summary>A number: no dispersion.</summary>
public sealed record ConstantIndex(double Index) : IndexSource
{
    public override Jet At(Wavelength wavelength) => Jet.Constant(Index);
}

/// <summary>A formula in lambda alone.</summary>
public sealed record FormulaIndex(Formula Formula) : IndexSource
{
    public override Jet At(Wavelength wavelength) => Formula.Jet(0, wavelength.Micrometres);
}

/// <summary>A material of the catalogue, with its composition or temperature where it has one.</summary>
public sealed record MaterialIndex(Material Material, double? Variable) : IndexSource
{
    public override Jet At(Wavelength wavelength) => Material.Index(wavelength, Variable);
}
