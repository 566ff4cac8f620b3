using GuideModes.Solvers.TransferMatrix;
using GuideModes.Tests.Properties;

namespace GuideModes.Tests.Solvers.TransferMatrix;

public sealed class GalerkinTests
{
    /// <remarks>
    /// Modes whose tail has not died within the box (e^(−30γλ) above 1e-10) are left out: the box pushes them. Steep edges, much
    /// finer than an element, set the tolerance.
    /// </remarks>
    [Fact]
    public void Solve_RandomGuides_AgreesWithAMatrixEigenvalueProblem()
    {
        var compared = 0;
        Property.Holds(
            RandomGuides.Bounded,
            guide =>
            {
                if (guide.ThicknessUm > 6 * guide.WavelengthUm) return;
                var problem = Documents.Problem(guide.Document);
                var brute = Galerkin.Indices(problem);
                foreach (var mode in new TransferMatrixSolver().Solve(problem).Modes)
                {
                    var reach = Math.Max(mode.CoverPenetrationUm, mode.SubstratePenetrationUm);
                    if (30 * guide.WavelengthUm / reach < 23) continue;
                    compared++;
                    Deviation.Record($"random guide, n_eff of {guide.Polarization}{mode.Order}", "matrix eigenvalues in the test", brute[mode.Order], mode.EffectiveIndex.Value, 1e-6);
                }
            },
            30);

        Assert.True(compared > 40, $"{compared} compared");
    }
}
