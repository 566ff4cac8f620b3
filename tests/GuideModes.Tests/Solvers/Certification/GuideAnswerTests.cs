using GuideModes.Guides;
using GuideModes.Solvers;
using GuideModes.Solvers.Certification;
using GuideModes.Tests.ReferenceData;

namespace GuideModes.Tests.Solvers.Certification;

/// <summary>The verdicts on guides whose answers are known, and the sentences on guides that have none.</summary>
public class GuideAnswerTests
{
    public static TheoryData<string> Ids => ReferenceGuides.Ids;

    /// <remarks>modes.json gives the truth; the WKB uncertainty has to reach it, and the two engines must not contradict each other.</remarks>
    [Theory, MemberData(nameof(Ids))]
    public void Solve_ReferenceGuide_BothEnginesReachTheTruth(string id)
    {
        var reference = ReferenceGuides.Find(id);
        var answer = GuideAnswer.Solve(reference.Guide);

        Assert.Equal(reference.Modes.Length, answer.Modes.Length);
        foreach (var (mode, expected) in answer.Modes.Zip(reference.Modes))
        {
            Assert.Equal(expected.Label, mode.Label);
            Assert.NotEqual(Trust.Disagree, mode.Trust);
            Assert.NotNull(mode.Wkb);
            Assert.True(mode.Wkb.EffectiveIndex.Covers(expected.NEff), $"{id} {mode.Label}: {mode.Reason}");
            if (expected.Wkb1 is { } first)
                Deviation.Record($"WKB first order of the reference guides, {id} {mode.Label}", "modes.json", first, mode.Wkb.FirstOrderIndex!.Value, 1e-9);
            if (expected.Wkb3 is { } second)
                Deviation.Record($"WKB second order of the reference guides, {id} {mode.Label}", "modes.json", second, mode.Wkb.SecondOrderIndex!.Value, 1e-8);
        }
    }

    [Fact]
    public void Solve_ModeNextToCutoff_IsWatchedAndRemarked()
    {
        var last = GuideAnswer.Solve(ReferenceGuides.Find("s21").Guide).Modes[^1];

        Assert.Contains(Remark.NearCutoff, last.Remarks);
        Assert.Equal(Trust.Watch, last.Trust);
    }

    [Fact]
    public void Solve_PairSplitBy7e10_IsRemarkedAsNearDegenerate()
    {
        var modes = GuideAnswer.Solve(ReferenceGuides.Find("s18").Guide).Modes;

        Assert.Contains(Remark.NearDegenerate, modes[0].Remarks);
        Assert.Contains(Remark.NearDegenerate, modes[1].Remarks);
        Assert.All(modes.Take(2), mode => Assert.NotNull(mode.Wkb!.BarrierTransparency));
    }

    [Fact]
    public void Solve_NoRaisedIndex_SaysThatNothingExceedsTheSubstrate()
    {
        var answer = GuideAnswer.Solve(Slab(thickness: 2, index: 1.5, cover: 1.0));

        Assert.Empty(answer.Modes);
        Assert.Equal(SearchOutcome.Complete, answer.Outcome);
        Assert.Contains("no more than that of the substrate", Assert.Single(answer.Remarks));
    }

    [Fact]
    public void Solve_LayerBelowItsCutoff_SaysThatItIsTooThin()
    {
        var answer = GuideAnswer.Solve(Slab(thickness: 0.05, index: 1.52, cover: 1.0));

        Assert.Empty(answer.Modes);
        Assert.Contains("too weak or too thin", Assert.Single(answer.Remarks));
        Assert.InRange(answer.WkbModeNumber, 0, 1);
    }

    [Fact]
    public void Solve_TensOfThousandsOfModes_SaysHowManyAndListsNone()
    {
        var answer = GuideAnswer.Solve(Slab(thickness: 1e5, index: 1.55, cover: 1.0));

        Assert.Equal(SearchOutcome.TooManyModes, answer.Outcome);
        Assert.Empty(answer.Modes);
        Assert.Contains("more than 2000 modes", Assert.Single(answer.Remarks));
    }

    [Fact]
    public void Solve_ProfileOfHundredsOfRipples_LeavesItToTheExactSolver()
    {
        var answer = GuideAnswer.Solve(Read("""{ "thicknessUm": 8, "index": { "law": "formula", "n": "1.55+0.01*sin(150*x)" } }"""));

        Assert.NotEmpty(answer.Modes);
        Assert.True(double.IsNaN(answer.WkbModeNumber));
        Assert.All(answer.Modes, mode => Assert.Equal(Trust.Watch, mode.Trust));
    }

    [Fact]
    public void Fields_OfSeveralModes_AreThoseOfEach()
    {
        var answer = GuideAnswer.Solve(ReferenceGuides.Find("s13").Guide);
        double[] x = [-0.2, 0, 1.5, 4, 9, 40];

        var fields = answer.Fields([0, 3], [.. x]);

        for (var i = 0; i < x.Length; i++)
        {
            Assert.Equal(answer.Field(0, [.. x]).Value[i], fields[0].Value[i]);
            Assert.Equal(answer.Field(3, [.. x]).Value[i], fields[1].Value[i]);
        }

        Assert.Throws<ArgumentOutOfRangeException>(() => answer.Field(8, [.. x]));
    }

    private static Guide Slab(double thickness, double index, double cover) =>
        Read(FormattableString.Invariant($$"""{ "thicknessUm": {{thickness}}, "index": { "law": "uniform", "n": {{index}} } }"""), cover);

    private static Guide Read(string region, double cover = 1.0)
    {
        var reading = GuideReader.Read(GuideDocument.Parse(FormattableString.Invariant($$"""
            {
              "schema": "guidemodes.guide/1", "name": "", "geometry": "planar", "wavelengthUm": 0.6328, "polarization": "TE",
              "cover": { "n": {{cover}} }, "regions": [{{region}}], "substrate": { "n": 1.51 }
            }
            """)));
        return reading.Guide ?? throw new InvalidOperationException(string.Join(" ", reading.Faults));
    }
}
