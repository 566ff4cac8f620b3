using System.Collections.Immutable;

namespace GuideModes.Solvers.Wkb;

/// <summary>What the WKB engine says of a guide.</summary>
/// <param name="Modes">By decreasing n_eff.</param>
/// <param name="ModeNumberAtCutoff">The continuous mode count at cutoff: ν + 1 summed over wells, so that 8.31 means eight modes and a third of a ninth; not a number when the outcome is Unresolved.</param>
/// <param name="Outcome">Why the search ended; Unresolved when the profile ripples too often for asymptotics.</param>
public sealed record WkbSolution(ImmutableArray<WkbMode> Modes, double ModeNumberAtCutoff, SearchOutcome Outcome);
