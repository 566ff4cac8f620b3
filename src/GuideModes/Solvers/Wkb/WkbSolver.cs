using System.Collections.Immutable;

namespace GuideModes.Solvers.Wkb;

/// <summary>The asymptotic engine: every guided mode from the phase integral of its well, with an uncertainty.</summary>
/// <remarks>
/// See <see cref="WkbMode"/> for what a mode carries. Thread-safe: the solver holds no state.
/// </remarks>
public sealed record WkbSolver
{
    /// <summary>The most modes that a search returns.</summary>
    public int MostModes { get; init; } = 5000;

    /// <summary>All modes by decreasing n_eff; a guide that guides nothing gives none.</summary>
    public WkbSolution Solve(ModeProblem problem, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(problem);
        return new ModeSearch(problem, MostModes, cancellation).Run();
    }

    /// <summary>The asymptotic field of a mode: WKB away from turning points, uniform Airy through them, normalised.</summary>
    public SampledField Field(ModeProblem problem, WkbMode mode, ImmutableArray<double> xUm) => throw new NotImplementedException();
}
