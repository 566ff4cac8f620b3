using System.Collections.Immutable;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The transfer-matrix answer: modes by decreasing n_eff.</summary>
public sealed class TransferMatrixSolution
{
    public ImmutableArray<GuidedMode> Modes => throw new NotImplementedException();

    public SearchOutcome Outcome => throw new NotImplementedException();

    /// <summary>The field of mode m at ascending coordinates in µm, cover and substrate included.</summary>
    public SampledField Field(int order, ImmutableArray<double> xUm) => throw new NotImplementedException();
}

public sealed record TransferMatrixSolver
{
    public TransferMatrixSolution Solve(ModeProblem problem, CancellationToken cancellation = default) => throw new NotImplementedException();
}
