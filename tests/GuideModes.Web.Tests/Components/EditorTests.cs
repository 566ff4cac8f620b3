using Bunit;
using GuideModes.Guides;
using GuideModes.Web.Components.Pages.Guides;
using Microsoft.AspNetCore.Components.Forms;

namespace GuideModes.Web.Tests.Components;

/// <summary>The entry side as a person uses it: every edit makes a new document, and faults stand at their field.</summary>
public sealed class EditorTests : MudTestContext
{
    private GuideDocument _document = Samples.Document(Samples.TwoRegions);

    [Fact]
    public void AddRegion_BeforeARegionToInfinity_KeepsThatOneLast()
    {
        var editor = Editor();

        editor.FindAll("button").Single(button => button.TextContent.Contains("Add a region")).Click();

        Assert.Equal(3, _document.RegionCount);
        Assert.Null(_document.Number("regions[2].thicknessUm"));
        Assert.Empty(GuideReader.Read(_document).Faults);
    }

    [Fact]
    public void RemoveRegion_First_LeavesTheOther()
    {
        var editor = Editor();

        editor.Find("[aria-label='Remove region 1']").Click();

        Assert.Equal(1, _document.RegionCount);
        Assert.Equal("gaussian", _document.Text("regions[0].index.law"));
        Assert.Single(editor.FindAll(".region"));
    }

    [Fact]
    public void DuplicateRegion_First_StandsTwice()
    {
        var editor = Editor();

        editor.Find("[aria-label='Duplicate region 1']").Click();

        Assert.Equal(3, _document.RegionCount);
        Assert.Equal("uniform", _document.Text("regions[1].index.law"));
    }

    [Fact]
    public void DuplicateRegion_ToInfinity_OnlyTheLastStaysSo()
    {
        var editor = Editor();

        editor.Find("[aria-label='Duplicate region 2']").Click();

        Assert.NotNull(_document.Number("regions[1].thicknessUm"));
        Assert.Null(_document.Number("regions[2].thicknessUm"));
    }

    [Fact]
    public void MoveRegion_Down_ChangesTheOrder()
    {
        var editor = Editor();

        editor.Find("[aria-label='Move region 1 down']").Click();

        Assert.Equal("gaussian", _document.Text("regions[0].index.law"));
        Assert.Equal("uniform", _document.Text("regions[1].index.law"));
        Assert.True(editor.Find("[aria-label='Move region 1 up']").HasAttribute("disabled"));
    }

    [Fact]
    public void Fault_AnywhereInADocument_StandsAtItsField()
    {
        _document = _document.With("regions[0].thicknessUm", -1).With("wavelengthUm", 5000).With("regions[1].index.depthUm", 0).With("cover.n", 0.5);
        var editor = Editor();

        foreach (var path in new[] { "regions[0].thicknessUm", "wavelengthUm", "regions[1].index.depthUm", "cover" })
        {
            var input = editor.Find("#" + DocumentEditor.IdOf(path));
            Assert.Equal("true", input.GetAttribute("aria-invalid"));
            Assert.NotEmpty(editor.Find("#" + DocumentEditor.IdOf(path) + "-error").TextContent);
        }
    }

    [Theory]
    [InlineData("""{"schema":"other/7"}""")]
    [InlineData("""{"schema":"guidemodes.guide/1","geometry":"planar","wavelengthUm":1,"polarization":"TE","cover":{"n":1},"regions":[{"thicknessUm":1,"index":{"law":"uniform","n":1.5},"colour":"red"}],"substrate":{"n":1}}""")]
    [InlineData("""{"schema":"guidemodes.guide/1","geometry":"planar","wavelengthUm":1,"polarization":"TE","cover":{"n":1},"regions":[{"thicknessUm":1,"index":{"law":"uniform","n":1.5,"quantity":"n3"}}],"substrate":{"n":1}}""")]
    [InlineData("""{"schema":"guidemodes.guide/1","geometry":"planar","wavelengthUm":1,"polarization":"TE","cover":{"n":1},"regions":[3],"substrate":{"n":1}}""")]
    [InlineData("""{"schema":"guidemodes.guide/1","geometry":"planar","wavelengthUm":1,"polarization":"TE","cover":{"n":1},"regions":"none","substrate":{"n":1}}""")]
    [InlineData("""{"schema":"guidemodes.guide/1","geometry":"planar","wavelengthUm":1,"polarization":"TE","cover":{"formula":"1+"},"regions":[{"thicknessUm":1,"index":{"law":"formula","n":"1.5+*x"}}],"substrate":{"material":"unobtainium"}}""")]
    public void Fault_WhereverItStands_IsShown(string json)
    {
        _document = Samples.Document(json);
        var text = System.Net.WebUtility.HtmlDecode(Editor().Markup);

        var faults = GuideReader.Read(_document).Faults;
        Assert.NotEmpty(faults);
        foreach (var fault in faults) Assert.Contains(fault.Message, text);
    }

    [Fact]
    public void Law_Chosen_KeepsWhatBothHaveInCommon()
    {
        var editor = Editor();

        editor.Find("#at-regions-1-law").Change("exponential");

        Assert.Equal("exponential", _document.Text("regions[1].index.law"));
        Assert.Equal(0.05, _document.Number("regions[1].index.deltaN"));
        Assert.Equal(2, _document.Number("regions[1].index.centerUm"));
        Assert.Empty(GuideReader.Read(_document).Faults);
    }

    [Fact]
    public void EveryLaw_Chosen_IsReadWithoutFault()
    {
        foreach (var law in LawCatalogue.Laws)
        {
            _document = Samples.Document(Samples.Slab).With("regions[0].thicknessUm", 3.0);
            var editor = Editor();
            editor.Find("#at-regions-0-law").Change(law.Name);
            Assert.Empty(GuideReader.Read(_document).Faults);
            Assert.Contains(law.Formula, System.Net.WebUtility.HtmlDecode(editor.Find(".formula").InnerHtml));
        }
    }

    [Fact]
    public void IndexField_Material_IsWrittenAndShown()
    {
        var editor = Editor();

        editor.Find("#at-cover-kind").Change("Material");
        editor.Find("#at-cover").Change("sapphire-ordinary");

        Assert.Equal("sapphire-ordinary", _document.Text("cover.material"));
        Assert.Contains("Malitson", editor.Markup);
    }

    [Fact]
    public void IndexField_Formula_IsWrittenAndItsFaultShown()
    {
        var editor = Editor();

        editor.Find("#at-cover-kind").Change("Formula");
        Assert.Equal("1", _document.Text("cover.formula"));
        editor.Find("#at-cover-formula").Change("1 + 0.01*");

        Assert.Equal("true", editor.Find("#at-cover-formula").GetAttribute("aria-invalid"));
        Assert.Contains("column", editor.Find("#at-cover-formula-error").TextContent, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void Points_FromAFile_ArePreviewedThenTaken()
    {
        _document = Samples.Document(Samples.Slab).With("regions[0].index", LawCatalogue.Find("table")!.NewBody());
        var editor = Editor();
        editor.Find("#at-regions-0-index-points-paste").Click();

        editor.FindComponent<InputFile>().UploadFiles(InputFileContent.CreateFromText("x;n\n0;1.52\n1.5;1.51\n4;1.5\n", "bench.csv"));

        editor.WaitForAssertion(() => Assert.Contains("3 points read, 1 heading", editor.Markup));
        Assert.Equal(1.53, _document.Number("regions[0].index.points[0][1]"));
        editor.FindAll("button").Single(button => button.TextContent == "Use these points").Click();
        Assert.Equal(1.52, _document.Number("regions[0].index.points[0][1]"));
        Assert.Equal(4, _document.Number("regions[0].index.points[2][0]"));
    }

    [Fact]
    public void Points_WithFaults_AreRefusedLineByLine()
    {
        _document = Samples.Document(Samples.Slab).With("regions[0].index", LawCatalogue.Find("table")!.NewBody());
        var editor = Editor();
        editor.Find("#at-regions-0-index-points-paste").Click();

        editor.FindComponent<InputFile>().UploadFiles(InputFileContent.CreateFromText("0\t1.52\n1\tnothing\n0.5\t1.5\n", "bench.txt"));

        editor.WaitForAssertion(() => Assert.Contains("Line 2:", editor.Markup));
        Assert.True(editor.FindAll("button").Single(button => button.TextContent == "Use these points").HasAttribute("disabled"));
    }

    private IRenderedComponent<GuideEditor> Editor()
    {
        IRenderedComponent<GuideEditor>? rendered = null;
        rendered = Render<GuideEditor>(parameters => parameters.Add(p => p.Editor, Now()));
        return rendered;

        DocumentEditor Now() => new(_document, GuideReader.Read(_document).Faults, edit =>
        {
            _document = edit(_document);
            rendered!.Render(parameters => parameters.Add(p => p.Editor, Now()));
        });
    }
}
