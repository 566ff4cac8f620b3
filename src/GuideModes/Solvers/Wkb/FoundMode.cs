namespace GuideModes.Solvers.Wkb;

/// <summary>A mode of one well, before the other wells are looked at; levels are n_eff².</summary>
internal sealed record FoundMode
{
    public required WellNode Node { get; init; }

    public required int OrderInWell { get; init; }

    /// <summary>The best n_eff².</summary>
    public required double Level { get; init; }

    /// <summary>The uncertainty of n_eff.</summary>
    public required double Error { get; init; }

    /// <summary>∂(n_eff²)/∂phase, to leading order, positive.</summary>
    public required double LevelPerRadian { get; init; }

    public required double? FirstOrder { get; init; }

    public required double? SecondOrder { get; init; }

    public required int OrderKept { get; init; }

    public required string Reason { get; init; }
}
