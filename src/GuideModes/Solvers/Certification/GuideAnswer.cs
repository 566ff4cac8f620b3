using System.Collections.Immutable;
using GuideModes.Guides;
using GuideModes.Solvers.TransferMatrix;
using GuideModes.Solvers.Wkb;

namespace GuideModes.Solvers.Certification;

/// <summary>How well the two engines bear each other out.</summary>
public enum Trust
{
    /// <summary>The asymptotic value lies within its own uncertainty of the exact one.</summary>
    Agree,

    /// <summary>Something deserves a look; the reason says what.</summary>
    Watch,

    /// <summary>The two engines contradict each other.</summary>
    Disagree,
}

/// <summary>A mode that both engines have spoken on.</summary>
/// <param name="Label">Such as TE0.</param>
/// <param name="Exact">The transfer-matrix mode.</param>
/// <param name="Wkb">The asymptotic mode of the same order; null where the WKB engine finds none.</param>
/// <param name="Trust">The verdict.</param>
/// <param name="Reason">The verdict's reason, in a sentence.</param>
/// <param name="BetaPerUm">β = k₀·n_eff, rad/µm.</param>
/// <param name="Remarks">Short machine-readable remarks, such as <c>near-cutoff</c>.</param>
public sealed record CertifiedMode(
    string Label,
    GuidedMode Exact,
    WkbMode? Wkb,
    Trust Trust,
    string Reason,
    double BetaPerUm,
    ImmutableArray<string> Remarks);

/// <summary>Everything the product says of one guide.</summary>
public sealed class GuideAnswer
{
    public Guide Guide => throw new NotImplementedException();

    public ImmutableArray<CertifiedMode> Modes => throw new NotImplementedException();

    /// <summary>The WKB engine's continuous mode count at cutoff.</summary>
    public double WkbModeNumber => throw new NotImplementedException();

    /// <summary>Remarks on the guide as a whole: sentences.</summary>
    public ImmutableArray<string> Remarks => throw new NotImplementedException();

    public SearchOutcome Outcome => throw new NotImplementedException();

    /// <summary>The exact field of mode m at ascending coordinates, µm.</summary>
    public SampledField Field(int order, ImmutableArray<double> xUm) => throw new NotImplementedException();

    /// <summary>Solves with both engines.</summary>
    public static GuideAnswer Solve(Guide guide, CancellationToken cancellation = default) => throw new NotImplementedException();
}
