using System.Collections.Immutable;

namespace GuideModes.Solvers;

/// <summary>A mode's transverse field on a list of coordinates.</summary>
/// <remarks>
/// TE: E_y scaled to ∫E² dx = 1; TM: H_y scaled to ∫H²/n² dx = 1 (both with x in µm, so in µm^−½).
/// The first lobe from the cover side is positive.
/// </remarks>
/// <param name="XUm">Coordinates, µm, ascending.</param>
/// <param name="Value">The field at each coordinate, µm^−½.</param>
public sealed record SampledField(ImmutableArray<double> XUm, ImmutableArray<double> Value);
