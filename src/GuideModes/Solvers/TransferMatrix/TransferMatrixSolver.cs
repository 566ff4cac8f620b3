using System.Collections.Immutable;
using GuideModes.Profiles;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The exact engine: every guided mode of a planar profile, by 2×2 transfer matrices.</summary>
/// <remarks>
/// Method: the profile is cut into steps; on each the matrix is exact for the polynomial that fits the potential there
/// (<see cref="StepSeries"/>); the decaying solutions of the two end media are carried to where the mode is largest and joined
/// by Newton's method on the sum of their Prüfer angles (<see cref="ModeSearch"/>). Everything is done twice, the second time
/// with every step halved; the answer is the second, and its error the difference of the two and a floor for rounding.
/// Limits: a feature much narrower than an eighth of the wavelength can be missed by both.
/// </remarks>
/// <param name="IndexTolerance">What a step of the coarser mesh may contribute to the error of n_eff.</param>
/// <param name="MaximumModes">More modes than this are not looked for.</param>
public sealed record TransferMatrixSolver(double IndexTolerance = 2e-14, int MaximumModes = 2000)
{
    /// <summary>Finds every guided mode.</summary>
    /// <exception cref="OperationCanceledException">The caller lost interest.</exception>
    public TransferMatrixSolution Solve(ModeProblem problem, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(problem);
        (problem, var capError) = SingularEnds.Capped(problem);
        var plan = StepPlan.For(problem, IndexTolerance, cancellation);
        if (!plan.IsComplete) return new(SearchOutcome.Unresolved, [], []);
        if (plan.LowestPotential >= 0) return new(SearchOutcome.Complete, [], []);
        var coarse = new Sweep(new StepMesh(plan, problem));
        var search = new ModeSearch(coarse, plan.LowestPotential);
        if (search.Count > MaximumModes) return new(SearchOutcome.TooManyModes, [], []);
        if (search.Count == 0) return new(SearchOutcome.Complete, [], []);

        var fine = new Sweep(new StepMesh(plan.Halved(), problem));
        using var integrals = new ModeIntegrals(coarse);
        var found = search.FindAll(cancellation);
        var modes = ImmutableArray.CreateBuilder<GuidedMode>(found.Length);
        for (var m = 0; m < found.Length; m++)
        {
            cancellation.ThrowIfCancellationRequested();
            var (energy, step) = ModeSearch.Polish(fine, m, found[m].Energy, 2 * found[m].Match, found[m].Scale);
            modes.Add(integrals.Describe(m, found[m], Index(energy, step + found[m].Error, problem.Profile, fine.Mesh.Count, capError)));
        }

        return new(SearchOutcome.Complete, modes.MoveToImmutable(), [.. found], coarse.Mesh);
    }

    /// <summary>n_eff from E, with the two meshes' difference and a floor for what rounding does over many steps.</summary>
    private static Estimate Index(double energy, double difference, IndexProfile profile, int steps, double capError)
    {
        var k = profile.Wavelength.Wavenumber;
        var index = Math.Sqrt(profile.CutoffIndexSquared - energy / (k * k));
        var rounding = (8 + Math.Sqrt(steps)) * 2.3e-16 * index;
        return new(index, difference / (2 * k * k * index) + rounding + capError);
    }
}
