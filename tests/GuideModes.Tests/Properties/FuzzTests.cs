using System.Diagnostics;
using CsCheck;
using GuideModes.Guides;
using GuideModes.Solvers;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Properties;

/// <summary>Guides that pass the door but that nobody would build.</summary>
public sealed class FuzzTests
{
    /// <summary>Wavelengths from the ultraviolet to the far infrared, contrasts from none to 3, thicknesses from nothing to a centimetre.</summary>
    private static readonly Gen<RandomGuide> Wild =
        from seed in RandomGuides.Any
        from stretch in Gen.Double[-3, 3]
        from wavelength in Gen.Double[-0.5, 2]
        from cover in Gen.Double[1, 4]
        from substrate in Gen.Double[1, 4]
        select Stretched(seed, Math.Pow(10, stretch), Math.Pow(10, wavelength), cover, substrate);

    [Fact]
    public void Solve_WildGuides_NeverThrowsAndEnds()
    {
        var (guided, refused, slowest, slow) = (0, 0, TimeSpan.Zero, "");
        Property.Holds(
            Wild,
            guide =>
            {
                var reading = GuideReader.Read(guide.Document);
                if (reading.Guide is not { } read)
                {
                    refused++;
                    Assert.NotEmpty(reading.Faults);
                    return;
                }

                var watch = Stopwatch.StartNew();
                var solution = new TransferMatrixSolver(MaximumModes: 200).Solve(new ModeProblem(read.Profile, read.Polarization));
                if (watch.Elapsed > slowest) (slowest, slow) = (watch.Elapsed, $"{solution.Outcome}, {solution.Modes.Length} modes of {guide}");
                if (!solution.Modes.IsEmpty) guided++;
                Assert.All(solution.Modes, mode => Assert.True(double.IsFinite(mode.EffectiveIndex.Error) && double.IsFinite(mode.GroupIndex), $"{mode}"));
            },
            300);

        Assert.InRange(guided, 50, 300);
        Assert.InRange(refused, 0, 150);
        Assert.True(slowest < TimeSpan.FromSeconds(10), $"slowest {slowest}: {slow}");
    }

    private static RandomGuide Stretched(RandomGuide guide, double stretch, double wavelength, double cover, double substrate)
    {
        var stretched = guide.Scaled(stretch) with { WavelengthUm = wavelength };
        return guide.Regions[^1].ThicknessUm is null
            ? stretched with { Cover = Math.Min(cover, guide.Substrate) }
            : stretched with { Cover = cover, Substrate = substrate };
    }
}
