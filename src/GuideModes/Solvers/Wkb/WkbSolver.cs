using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;

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
    /// <remarks>A mode of one well among several has its field there alone: near-degenerate wells share theirs in truth.</remarks>
    [SuppressMessage("Performance", "CA1822:Mark members as static", Justification = "Beside Solve: a caller holds one solver.")]
    public SampledField Field(ModeProblem problem, WkbMode mode, ImmutableArray<double> xUm)
    {
        ArgumentNullException.ThrowIfNull(problem);
        ArgumentNullException.ThrowIfNull(mode);
        return new WkbField(problem, mode).Sample(xUm);
    }
}
