using CsCheck;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Properties;

/// <summary>What may be done to a guide without changing its modes. Identities of the wave equation; no source needed.</summary>
public sealed class InvarianceTests
{
    [Fact]
    public void Scaling_LengthsAndWavelength_KeepsEveryIndex() => Property.Holds(
        Gen.Select(RandomGuides.Any, Gen.Double[0.3, 3]),
        one => AssertSame(Documents.Solve(one.Item1.Document), Documents.Solve(one.Item1.Scaled(one.Item2).Document)));

    [Fact]
    public void MirrorImage_BoundedGuide_KeepsEveryIndex() => Property.Holds(
        RandomGuides.Bounded,
        guide =>
        {
            TransferMatrixSolution plain = Documents.Solve(guide.Document), mirrored = Documents.Solve(guide.Mirrored().Document);
            AssertSame(plain, mirrored);
            foreach (var (one, other) in plain.Modes.Zip(mirrored.Modes))
                Assert.Equal(one.GroupIndex, other.GroupIndex, 1e-9);
        });

    [Fact]
    public void Split_ARegionInTwo_KeepsEveryIndexAndItsShare() => Property.Holds(
        Gen.Select(RandomGuides.Bounded, Gen.Double[0.05, 0.95], Gen.Int[0, 3]),
        one =>
        {
            var (guide, share, pick) = one;
            var at = pick % guide.Regions.Length;
            TransferMatrixSolution whole = Documents.Solve(guide.Document), cut = Documents.Solve(guide.Split(at, share).Document);
            AssertSame(whole, cut);
            foreach (var (mode, parts) in whole.Modes.Zip(cut.Modes).Where(pair => IsAlone(pair.First, whole)))
                Assert.Equal(mode.Confinement[at + 1], parts.Confinement[at + 1] + parts.Confinement[at + 2], 1e-9);
        });

    [Fact]
    public void Insertion_OfARegionWithoutThickness_KeepsEveryIndexAndHasNoShare() => Property.Holds(
        Gen.Select(RandomGuides.Any, Gen.Int[0, 4]),
        one =>
        {
            var (guide, pick) = one;
            var at = pick % guide.Regions.Length;
            var other = Documents.Solve(guide.Inserted(at, new(0, Documents.Uniform(3))).Document);
            AssertSame(Documents.Solve(guide.Document), other);
            Assert.All(other.Modes, mode => Assert.Equal(0, mode.Confinement[at + 1]));
        });

    /// <summary>Shares are well defined only where no other mode is so near that rounding mixes the two.</summary>
    private static bool IsAlone(GuidedMode mode, TransferMatrixSolution solution) =>
        solution.Modes.All(other => other == mode || Math.Abs(other.EffectiveIndex.Value - mode.EffectiveIndex.Value) > 1e-6);

    /// <summary>The same count, and every index within the two solvers' own bounds.</summary>
    private static void AssertSame(TransferMatrixSolution one, TransferMatrixSolution other)
    {
        Assert.Equal(one.Modes.Length, other.Modes.Length);
        foreach (var (a, b) in one.Modes.Select(mode => mode.EffectiveIndex).Zip(other.Modes.Select(mode => mode.EffectiveIndex)))
            Assert.True(Math.Abs(a.Value - b.Value) <= a.Error + b.Error, $"off by {a.Value - b.Value:E2}, bounds {a.Error:E2} and {b.Error:E2}");
    }
}
