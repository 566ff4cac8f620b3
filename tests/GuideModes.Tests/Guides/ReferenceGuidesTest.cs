using GuideModes.Numerics;
using GuideModes.Tests.ReferenceData;

namespace GuideModes.Tests.Guides;

/// <summary>The translated reference guides against the formulas the reference file itself states.</summary>
public sealed class ReferenceGuidesTest
{
    public static TheoryData<string> Ids => ReferenceGuides.Ids;

    [Fact]
    public void All_PlanarCases_AreTwentyTwo() => Assert.Equal(22, ReferenceGuides.All.Length);

    [Theory]
    [MemberData(nameof(Ids))]
    public void Profile_OfEachCase_IsTheStatedFormula(string id)
    {
        var reference = ReferenceGuides.Find(id);
        var guide = reference.Guide;
        foreach (var piece in guide.Profile.Pieces)
        {
            if (reference.RegionFormulas[piece.Region] is not { } text) continue;
            var formula = Formula.Parse(text, "x");
            for (var i = 0; i <= 50; i++)
            {
                var x = piece.Extent.Start + piece.Extent.Length * i / 50;
                var n = formula.Value(x, guide.Wavelength.Micrometres);
                Assert.Equal(n * n, piece.IndexSquared(x), 4e-15);
            }
        }
    }

    [Fact]
    public void Profile_OfTheTable_PassesThroughItsPoints()
    {
        var pieces = ReferenceGuides.Find("s20").Guide.Profile.Pieces;
        Assert.Equal(7, pieces.Length);
        Assert.Equal(1.552 * 1.552, pieces[0].IndexSquared(0), 4e-15);
        Assert.Equal(1.541 * 1.541, pieces[2].IndexSquared(1.6), 4e-15);
        Assert.Equal(1.513 * 1.513, pieces[6].IndexSquared(8), 4e-15);
    }

    [Theory]
    [InlineData("s09")]
    [InlineData("s10")]
    [InlineData("s12")]
    [InlineData("s16")]
    [InlineData("s21")]
    public void Profile_ToInfinity_JoinsTheSubstrate(string id)
    {
        var profile = ReferenceGuides.Find(id).Guide.Profile;
        Assert.True(profile.LastRegionIsUnbounded);
        var end = profile.Pieces[^1].IndexSquared(profile.Extent.End);
        Assert.InRange(Math.Abs(end - profile.Substrate.IndexSquared), 0, 4.1e-16 * end);
    }
}
