using System.Collections.Immutable;

namespace GuideModes.Solvers.Wkb;

public sealed record WkbSolver
{
    public WkbSolution Solve(ModeProblem problem, CancellationToken cancellation = default) => throw new NotImplementedException();

    /// <summary>The asymptotic field of a mode: WKB away from turning points, uniform Airy through them, normalised.</summary>
    public SampledField Field(ModeProblem problem, WkbMode mode, ImmutableArray<double> xUm) => throw new NotImplementedException();
}
