using System.Collections.Immutable;

namespace GuideModes.Solvers.Wkb;

/// <summary>One mode as asymptotics sees it.</summary>
public sealed record WkbMode
{
    /// <summary>The mode number m among all modes of the guide, by decreasing n_eff.</summary>
    public required int Order { get; init; }

    /// <summary>The best asymptotic effective index, with the size of the last term kept as its error.</summary>
    public required Estimate EffectiveIndex { get; init; }

    /// <summary>The textbook first-order value: ∫κ dx = mπ + φ_left + φ_right, π/4 at a smooth turning point, arctan of decay over phase rate at an index step; null where it has no solution.</summary>
    public double? FirstOrderIndex { get; init; }

    /// <summary>With Dunham's second-order term, joints ignored; null unless the well lies between two smooth turning points of one analytic piece.</summary>
    public double? SecondOrderIndex { get; init; }

    /// <summary>The order of the last term kept: 1, 2 or 4.</summary>
    public required int OrderKept { get; init; }

    /// <summary>Why the series was cut there, in a sentence.</summary>
    public required string OrderReason { get; init; }

    /// <summary>Where κ² changes sign, µm, ascending, all wells of the guide at this n_eff.</summary>
    public required ImmutableArray<double> TurningPointsUm { get; init; }

    /// <summary>The well that holds the mode, counted from the cover, and how many there are at this n_eff.</summary>
    public required int Well { get; init; }

    public required int WellCount { get; init; }

    /// <summary>The mode's number inside its own well.</summary>
    public required int OrderInWell { get; init; }

    /// <summary>exp(−2∫|κ|dx) of the barrier to the nearest other well (or of the leakiest one); null for a single well.</summary>
    public double? BarrierTransparency { get; init; }

    /// <summary>True when another well holds a mode within the uncertainty or within the splitting the barrier allows.</summary>
    public bool IsNearDegenerate { get; init; }
}
