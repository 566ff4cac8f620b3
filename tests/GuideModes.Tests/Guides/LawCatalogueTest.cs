using GuideModes.Guides;
using GuideModes.Tests.ReferenceData;

namespace GuideModes.Tests.Guides;

public sealed class LawCatalogueTest
{
    public static TheoryData<string> Names => [.. LawCatalogue.Laws.Select(law => law.Name)];

    [Fact]
    public void Laws_ByName_AreThoseOfTheGuideDocument() => Assert.Equal(
        ["uniform", "linear", "power", "gaussian", "exponential", "erfc", "sech2", "fermi", "formula", "table"],
        LawCatalogue.Laws.Select(law => law.Name));

    [Theory]
    [MemberData(nameof(Names))]
    public void NewBody_OfEachLaw_MakesAValidRegion(string name)
    {
        var document = ReferenceGuides.Find("s01").Document.With("regions[0].index", LawCatalogue.Find(name)!.NewBody());
        Assert.Empty(GuideReader.Read(document).Faults);
    }

    /// <summary>Each field left out is either a fault at its path that says what to give, or optional and then the default.</summary>
    [Theory]
    [MemberData(nameof(Names))]
    public void NewBody_WithoutAField_FollowsTheCatalogue(string name)
    {
        var law = LawCatalogue.Find(name)!;
        foreach (var parameter in law.Parameters)
        {
            var body = law.NewBody();
            body.Remove(parameter.Name);
            var faults = GuideReader.Read(ReferenceGuides.Find("s01").Document.With("regions[0].index", body)).Faults;
            if (!parameter.IsRequired)
            {
                Assert.Empty(faults);
                continue;
            }

            Assert.Equal($"regions[0].index.{parameter.Name}", Assert.Single(faults).Path);
            Assert.Contains(parameter.Expected, faults[0].Message, StringComparison.Ordinal);
        }
    }

    /// <summary>Values just outside a numeric parameter's range are faults at its path.</summary>
    [Theory]
    [MemberData(nameof(Names))]
    public void NewBody_OutsideARange_IsAFault(string name)
    {
        var law = LawCatalogue.Find(name)!;
        var numeric = law.Parameters.Where(p => p.Kind is LawParameterKind.Length or LawParameterKind.Number or LawParameterKind.Index or LawParameterKind.IndexDifference);
        foreach (var parameter in numeric)
        {
            foreach (var value in new[] { Math.BitDecrement(parameter.Range.Minimum), Math.BitIncrement(parameter.Range.Maximum) })
            {
                var body = law.NewBody();
                body[parameter.Name] = value;
                var fault = Assert.Single(GuideReader.Read(ReferenceGuides.Find("s01").Document.With("regions[0].index", body)).Faults);
                Assert.Equal($"regions[0].index.{parameter.Name}", fault.Path);
            }
        }
    }

    /// <summary>A law that may run to infinity does so when its base is the substrate's index, and another says that it may not.</summary>
    [Theory]
    [MemberData(nameof(Names))]
    public void NewBody_ToInfinity_FollowsTheCatalogue(string name)
    {
        var law = LawCatalogue.Find(name)!;
        var substrate = name == "uniform" ? 1.53 : 1.51;
        var document = ReferenceGuides.Find("s01").Document
            .With("substrate.n", substrate).With("regions[0].index", law.NewBody()).With("regions[0].thicknessUm", null);

        var reading = GuideReader.Read(document);
        Assert.Equal(law.CanRunToInfinity, reading.Guide is not null);
        if (reading.Guide is not null) Assert.True(reading.Guide.Profile.LastRegionIsUnbounded);
    }

    [Fact]
    public void Parameters_WithAUnit_CarryItInTheirName()
    {
        foreach (var parameter in LawCatalogue.Laws.SelectMany(law => law.Parameters))
            Assert.Equal(parameter.Unit == "µm", parameter.Name.EndsWith("Um", StringComparison.Ordinal));
    }
}
