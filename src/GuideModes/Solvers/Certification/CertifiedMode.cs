using System.Collections.Immutable;
using GuideModes.Solvers.TransferMatrix;
using GuideModes.Solvers.Wkb;

namespace GuideModes.Solvers.Certification;

/// <summary>A mode that both engines have spoken on.</summary>
/// <param name="Label">Such as TE0.</param>
/// <param name="Exact">The transfer-matrix mode.</param>
/// <param name="Wkb">The asymptotic mode of the same order; null where the WKB engine finds none.</param>
/// <param name="Trust">The verdict.</param>
/// <param name="Reason">The verdict's reason, in a sentence.</param>
/// <param name="BetaPerUm">β = k₀·n_eff, rad/µm.</param>
/// <param name="Remarks">Short remarks for machines, those of <see cref="Remark"/>.</param>
public sealed record CertifiedMode(
    string Label,
    GuidedMode Exact,
    WkbMode? Wkb,
    Trust Trust,
    string Reason,
    double BetaPerUm,
    ImmutableArray<string> Remarks);
