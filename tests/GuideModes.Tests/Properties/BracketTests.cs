using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Properties;

/// <summary>The bracket that every answer carries, against answers of the same solver at greater cost, and the limits of two problems.</summary>
public sealed class BracketTests
{
    [Theory]
    [InlineData(2e-16)]
    [InlineData(1e-14)]
    public void Bracket_OfTheDefaultSolver_HoldsTheAnswerOfASharperOne(double tolerance) => Property.Holds(
        RandomGuides.Any,
        guide =>
        {
            TransferMatrixSolution usual = Documents.Solve(guide.Document), sharper = Documents.Solve(guide.Document, new(tolerance));
            Assert.Equal(usual.Modes.Length, sharper.Modes.Length);
            foreach (var (one, other) in usual.Modes.Select(mode => mode.EffectiveIndex).Zip(sharper.Modes.Select(mode => mode.EffectiveIndex)))
            {
                Assert.True(one.Covers(other.Value), $"off by {one.Value - other.Value:E2}, bound {one.Error:E2}");
                Assert.InRange(one.Error, 0, 5e-11);
            }
        });

    /// <remarks>The two problems differ by terms in n′/n, so that their indices part by no more than about Δn²/n.</remarks>
    [Fact]
    public void Polarizations_OfAFaintGuide_Agree() => Property.Holds(
        RandomGuides.Faint,
        guide =>
        {
            var document = guide.Document;
            var te = Documents.Solve(document.With("polarization", "TE")).Modes;
            var tm = Documents.Solve(document.With("polarization", "TM")).Modes;
            var contrast = Math.Sqrt(Fields.Greatest(Documents.Read(document).Profile)) - guide.Substrate;
            Assert.InRange(te.Length - tm.Length, 0, 1);
            foreach (var (one, other) in te.Zip(tm))
                Assert.InRange(one.EffectiveIndex.Value - other.EffectiveIndex.Value, -2 * contrast * contrast / guide.Substrate, 2 * contrast * contrast / guide.Substrate);
        });
}
