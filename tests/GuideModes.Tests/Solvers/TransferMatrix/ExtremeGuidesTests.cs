using GuideModes.Solvers;
using GuideModes.Solvers.TransferMatrix;
using MathNet.Numerics.RootFinding;
using static GuideModes.Tests.Documents;

namespace GuideModes.Tests.Solvers.TransferMatrix;

/// <summary>Guides at the edges of what a document may say.</summary>
public sealed class ExtremeGuidesTests
{
    [Theory]
    [InlineData(200)]
    [InlineData(1000)]
    public void Solve_IdenticalWellsFarApart_GivesAPairLabelledZeroAndOne(double distance)
    {
        var well = Region(1, Uniform(1.5));
        var modes = Solve(Planar(1, Polarization.TE, 1.45, 1.45, well, Region(distance, Uniform(1.45)), well)).Modes;
        var alone = Solve(Planar(1, Polarization.TE, 1.45, 1.45, well)).Modes;

        Assert.Single(alone);
        Assert.Equal([0, 1], modes.Select(mode => mode.Order));
        Assert.All(modes, mode => Assert.True(mode.EffectiveIndex.Covers(alone[0].EffectiveIndex.Value)));
        Assert.All(modes, mode => Assert.Equal(1, mode.Confinement.Sum(), 1e-12));
    }

    [Fact]
    public void Solve_DifferentWellsBehindAMillimetre_FindsEachInItsPlace()
    {
        var modes = Solve(Planar(1, Polarization.TM, 1.45, 1.45, Region(1, Uniform(1.5)), Region(1000, Uniform(1.45)), Region(1.2, Uniform(1.5)))).Modes;

        Assert.Equal(2, modes.Length);
        Assert.InRange(modes[0].CentroidUm, 1001, 1002.2);
        Assert.InRange(modes[1].CentroidUm, 0, 1);
    }

    [Fact]
    public void Solve_Cancelled_Stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();

        Assert.Throws<OperationCanceledException>(() =>
            new TransferMatrixSolver().Solve(Problem(Planar(1, Polarization.TE, 1, 1.45, Region(5, Uniform(1.5)))), source.Token));
    }

    [Fact]
    public void Solve_MoreModesThanAllowed_SaysSo()
    {
        var solution = new TransferMatrixSolver().Solve(Problem(Planar(0.5, Polarization.TE, 1, 1, Region(1000, Uniform(3)))));

        Assert.Equal(SearchOutcome.TooManyModes, solution.Outcome);
        Assert.Empty(solution.Modes);
    }

    [Fact]
    public void Solve_NothingHigherThanTheSubstrate_GuidesNothing()
    {
        var solution = Solve(Planar(1, Polarization.TE, 1, 1.5, Region(2, Uniform(1.45))));

        Assert.Equal(SearchOutcome.Complete, solution.Outcome);
        Assert.Empty(solution.Modes);
    }

    /// <remarks>Half the film thickness d: κ tan κd/2 = γ (TE); n_eff − n_b is about 1e-6 here, n_b² itself the leading part.</remarks>
    [Fact]
    public void Solve_ANanometreFilm_GuidesOneMode()
    {
        const double thickness = 1e-3, film = 1.6, cladding = 1.5;
        var mode = Assert.Single(Solve(Planar(1, Polarization.TE, cladding, cladding, Region(thickness, Uniform(film)))).Modes);
        var k = Math.Tau;
        var gamma = Brent.FindRoot(
            g =>
            {
                var kappa = Math.Sqrt(k * k * (film * film - cladding * cladding) - g * g);
                return kappa * Math.Tan(0.5 * kappa * thickness) - g;
            },
            1e-6,
            0.1,
            1e-16);

        Deviation.Record("1 nm film, 1/γ", "slab equation", 1 / gamma, mode.SubstratePenetrationUm, 1e-10 / gamma, "µm");
        Assert.True(mode.EffectiveIndex.Covers(Math.Sqrt(cladding * cladding + gamma * gamma / (k * k))));
    }

    /// <summary>V = 4 and a = 0 again, from a film of ten centimetres whose index is 3e-11 above its surroundings.</summary>
    [Fact]
    public void Solve_ADecimetreFilm_HasTheBOfItsV()
    {
        const double cladding = 1.5, thickness = 1e5;
        var rise = Math.Pow(4 / (Math.Tau * thickness), 2);
        var modes = Solve(Planar(1, Polarization.TE, cladding, cladding, Region(thickness, Uniform(Math.Sqrt(cladding * cladding + rise))))).Modes;

        Assert.Equal(2, modes.Length);
        var index = Math.Sqrt(cladding * cladding + 0.7348437329454 * rise);
        Assert.True(modes[0].EffectiveIndex.Covers(index), $"{modes[0].EffectiveIndex.Value - index:E2}");
    }

    /// <remarks>In TM the equation for u is singular at the centre for alpha &lt; 2; the shooting works on H and H′/n², which are not.</remarks>
    [Theory]
    [InlineData(0.8, Polarization.TE)]
    [InlineData(0.8, Polarization.TM)]
    [InlineData(1, Polarization.TE)]
    [InlineData(1, Polarization.TM)]
    [InlineData(1.2, Polarization.TE)]
    [InlineData(1.2, Polarization.TM)]
    [InlineData(1.8, Polarization.TE)]
    [InlineData(1.8, Polarization.TM)]
    [InlineData(2.5, Polarization.TM)]
    public void Solve_SingularPowerLaw_BracketHoldsTheShootingValue(double alpha, Polarization polarization)
    {
        var problem = Problem(Planar(0.8, polarization, 1.45, 1.45, Region(2, Power(1.7, 1.45, 1, alpha, 1))));
        var modes = new TransferMatrixSolver().Solve(problem).Modes;
        Assert.True(modes.Length >= 2);
        foreach (var mode in modes)
        {
            var index = mode.EffectiveIndex;
            var shot = Shooting.Index(problem, index.Value, [1]);
            Deviation.Record($"power law, alpha {alpha}, {polarization}{mode.Order}", "shooting in the test", shot, index.Value, 2e-11);
            Assert.True(Math.Abs(shot - index.Value) <= index.Error + 1e-13, $"{polarization}{mode.Order}: off by {shot - index.Value:E2}, bound {index.Error:E2}");
        }
    }

    [Theory]
    [InlineData(Polarization.TE)]
    [InlineData(Polarization.TM)]
    public void Solve_PowerLawOfOne_IsTwoLinearPieces(Polarization polarization)
    {
        var power = Solve(Planar(0.8, polarization, 1.45, 1.45, Region(2, Power(1.7, 1.45, 1, 1, 1)))).Modes;
        var linear = Solve(Planar(0.8, polarization, 1.45, 1.45, Region(1, Linear(1.45, 1.7, "n2")), Region(1, Linear(1.7, 1.45, "n2")))).Modes;

        Assert.Equal(power.Length, linear.Length);
        foreach (var (one, other) in power.Zip(linear)) Assert.True(one.EffectiveIndex.Covers(other.EffectiveIndex.Value));
    }
}
