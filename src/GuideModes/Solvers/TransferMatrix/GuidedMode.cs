using System.Collections.Immutable;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>One exact mode of a planar guide.</summary>
public sealed record GuidedMode
{
    /// <summary>m: the number of zeros of the field.</summary>
    public required int Order { get; init; }

    /// <summary>n_eff, with a bound that the exact value of the stated profile does not leave.</summary>
    public required Estimate EffectiveIndex { get; init; }

    /// <summary>n_eff − λ·dn_eff/dλ, from field integrals, material dispersion included.</summary>
    public required double GroupIndex { get; init; }

    /// <summary>The share of the guided power in the cover, each region in order, and the substrate: of ∫E² dx for TE, of ∫H²/n² dx for TM.</summary>
    public required ImmutableArray<double> Confinement { get; init; }

    /// <summary>The power's centre ⟨x⟩, µm.</summary>
    public required double CentroidUm { get; init; }

    /// <summary>The power's rms half-width √(⟨x²⟩ − ⟨x⟩²), µm.</summary>
    public required double RmsWidthUm { get; init; }

    /// <summary>1/γ in the cover: the distance over which the field falls to 1/e, µm.</summary>
    public required double CoverPenetrationUm { get; init; }

    /// <summary>1/γ in the substrate, µm.</summary>
    public required double SubstratePenetrationUm { get; init; }
}
