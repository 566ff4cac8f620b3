using GuideModes.Guides;
using GuideModes.Solvers.TransferMatrix;
using static GuideModes.Tests.Documents;

namespace GuideModes.Tests.Solvers.TransferMatrix;

/// <summary>The discipline of the matrices: unit determinant, a constant Wronskian, the order of convergence, no allocation.</summary>
public sealed class StepMatrixTests
{
    private static readonly GuideDocument Graded = Planar(
        0.8, Polarization.TM, 1.0, 1.5, Region(0.7, Linear(1.7, 1.62, "n")), Region(null, Diffused("gaussian", 1.5, 0.2, 2, 1.5, "n")));

    [Fact]
    public void Matrices_OfEveryStep_HaveDeterminantOne()
    {
        var (sweep, lowest) = Sweep(Graded, 2e-13);
        for (var i = 0; i < sweep.Mesh.Count; i++)
        {
            for (var share = 0.0; share <= 1; share += 0.1)
            {
                var (t, _, log) = sweep.Matrices(i, share * lowest);
                Assert.Equal(Math.Exp(-2 * log), t[0] * t[3] - t[1] * t[2], 1e-13);
            }
        }
    }

    [Fact]
    public void Sweeps_FromBothSides_HaveOneWronskian()
    {
        var (sweep, lowest) = Sweep(Graded, 2e-13);
        var count = sweep.Mesh.Count;
        var energy = 0.4 * lowest;
        sweep.FromCover(energy, count);
        var left = sweep.States.ToArray();
        double Log(int at)
        {
            var (right, _) = sweep.FromSubstrate(energy, at);
            var one = left[at];
            var wronskian = one.Value * right.Slope - one.Slope * right.Value;
            return Math.Log(Math.Abs(wronskian)) + one.Log + right.Log;
        }

        var expected = Log(count / 2);
        for (var i = 0; i < count; i++) Assert.Equal(expected, Log(i), 1e-11);
    }

    /// <remarks>The coarsest mesh that the sweep can use, halved twice; the reference is the default solver's answer.</remarks>
    [Theory]
    [InlineData(Polarization.TE)]
    [InlineData(Polarization.TM)]
    public void Error_StepsHalved_FallsByEightOrdersOrMore(Polarization polarization)
    {
        var problem = Problem(Planar(1, polarization, 1.5, 1.5, Region(null, Diffused("sech2", 1.5, 0.3, 0.5, 14, "n2"))));
        var plan = StepPlan.For(problem, 1e3, default);
        var exact = new ModeSearch(new Sweep(new StepMesh(StepPlan.For(problem, 1e-15, default), problem)), plan.LowestPotential).FindAll(default)[0].Energy;
        var errors = new List<double>();
        for (var i = 0; i < 3; i++, plan = plan.Halved())
        {
            var search = new ModeSearch(new Sweep(new StepMesh(plan, problem)), plan.LowestPotential);
            errors.Add(Math.Abs(search.FindAll(default)[0].Energy - exact) / Math.Abs(exact));
        }

        Assert.True(errors[0] > 1e-9, $"nothing to measure: {errors[0]:E2}");
        for (var i = 1; i < errors.Count; i++)
            Assert.True(errors[i] <= Math.Max(errors[i - 1] / 256, 1e-13), $"errors {string.Join(", ", errors.Select(error => error.ToString("E2")))}");
    }

    [Fact]
    public void Sweeping_AThousandTimes_AllocatesNothing()
    {
        var (sweep, lowest) = Sweep(Graded, 2e-13);
        sweep.FromCover(0.5 * lowest, sweep.Mesh.Count);
        sweep.FromSubstrate(0.5 * lowest, 0);
        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 1000; i++)
        {
            sweep.FromCover(0.5 * lowest, sweep.Mesh.Count);
            sweep.FromSubstrate(0.5 * lowest, 0);
        }

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    private static (Sweep Sweep, double Lowest) Sweep(GuideDocument document, double tolerance)
    {
        var problem = Problem(document);
        var plan = StepPlan.For(problem, tolerance, default);
        return (new Sweep(new StepMesh(plan, problem)), plan.LowestPotential);
    }
}
