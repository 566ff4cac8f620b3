using CsCheck;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Properties;

/// <summary>Order and bounds: what Sturm's theory and the minimum principle say of every guide.</summary>
public sealed class OrderTests
{
    /// <remarks>In both polarizations β² is the stationary value of a quotient that grows with n² everywhere; TM: of ∫(k²H² − H′²/n²)/∫H²/n².</remarks>
    [Fact]
    public void Raise_OneRegion_RaisesEveryIndexAndLosesNoMode() => Property.Holds(
        Gen.Select(RandomGuides.Bounded, Gen.Double[1e-4, 0.05], Gen.Int[0, 3]),
        one =>
        {
            var (guide, rise, pick) = one;
            TransferMatrixSolution before = Documents.Solve(guide.Document), after = Documents.Solve(guide.Raised(pick % guide.Regions.Length, rise).Document);
            Assert.True(after.Modes.Length >= before.Modes.Length);
            foreach (var (low, high) in before.Modes.Select(mode => mode.EffectiveIndex).Zip(after.Modes.Select(mode => mode.EffectiveIndex)))
                Assert.True(high.Value > low.Value - low.Error - high.Error, $"fell from {low.Value:R} to {high.Value:R}");
        });

    [Fact]
    public void Modes_OfAnyGuide_AreOrderedAndBetweenCutoffAndTheGreatestIndex() => Property.Holds(
        RandomGuides.Any,
        guide =>
        {
            var problem = Documents.Problem(guide.Document);
            var modes = new TransferMatrixSolver().Solve(problem).Modes;
            var greatest = Fields.Greatest(problem.Profile);
            var above = Math.Sqrt(greatest);
            for (var m = 0; m < modes.Length; m++)
            {
                Assert.Equal(m, modes[m].Order);
                Assert.InRange(modes[m].EffectiveIndex.Value, Math.Sqrt(problem.Profile.CutoffIndexSquared), above);
                Assert.True(m == 0 || modes[m].EffectiveIndex.Value < modes[m - 1].EffectiveIndex.Value);
                above = modes[m].EffectiveIndex.Value;
            }
        });

    [Fact]
    public void Field_OfModeM_HasMZeros() => Property.Holds(
        RandomGuides.Any,
        guide =>
        {
            var problem = Documents.Problem(guide.Document);
            var solution = new TransferMatrixSolver().Solve(problem);
            var xs = Fields.Nodes(problem.Profile, 0.05 * guide.WavelengthUm).X;
            foreach (var mode in solution.Modes)
                Assert.Equal(mode.Order, Fields.SignChanges(solution.Field(mode.Order, xs).Value));
        });

    [Fact]
    public void Shares_OfEveryMode_AddUpToOne() => Property.Holds(
        RandomGuides.Any,
        guide =>
        {
            foreach (var mode in Documents.Solve(guide.Document).Modes)
            {
                Assert.Equal(guide.Regions.Length + 2, mode.Confinement.Length);
                Assert.All(mode.Confinement, share => Assert.InRange(share, 0, 1));
                Assert.Equal(1, mode.Confinement.Sum(), 1e-12);
            }
        });

    /// <summary>∫E_iE_j dx (TE) and ∫H_iH_j/n² dx (TM), by Gauss–Legendre quadrature over the guide and in closed form outside.</summary>
    [Fact]
    public void Fields_OfTwoModes_AreOrthonormal() => Property.Holds(
        RandomGuides.Any,
        guide =>
        {
            var problem = Documents.Problem(guide.Document);
            var solution = new TransferMatrixSolver().Solve(problem);
            var (xs, weights) = Fields.Nodes(problem.Profile, 0.25 * guide.WavelengthUm);
            var weighed = Fields.Weighed(problem, xs, weights);
            var fields = solution.Modes.Select(mode => solution.Field(mode.Order, xs).Value).ToArray();
            for (var i = 0; i < fields.Length; i++)
            {
                for (var j = 0; j <= i; j++)
                {
                    var overlap = Fields.Tails(problem, solution, i, j);
                    for (var p = 0; p < xs.Length; p++) overlap += weighed[p] * fields[i][p] * fields[j][p];
                    Assert.True(Math.Abs(overlap - (i == j ? 1 : 0)) < 1e-9, $"modes {i} and {j}: {overlap:R}");
                }
            }
        });
}
