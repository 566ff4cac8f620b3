using System.Collections.Immutable;
using System.Text.Json;
using System.Text.Json.Nodes;
using GuideModes.Guides;

namespace GuideModes.Tests.Guides;

/// <summary>One test per kind of fault: each names its path and says what is allowed.</summary>
public sealed class GuideReaderTest
{
    private const string Valid = """
        {
          "schema": "guidemodes.guide/1", "name": "Exchanged glass", "notes": "bath 3", "geometry": "planar",
          "wavelengthUm": 0.6328, "polarization": "TE", "cover": { "n": 1.0 },
          "regions": [
            { "thicknessUm": 2.0, "index": { "law": "uniform", "n": 1.53 } },
            { "thicknessUm": null, "index": { "law": "gaussian", "quantity": "n", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5.0, "centerUm": 2.0 } }
          ],
          "substrate": { "n": 1.51 }
        }
        """;

    [Fact]
    public void Read_AValidDocument_GivesTheGuide()
    {
        var reading = GuideReader.Read(GuideDocument.Parse(Valid));

        Assert.Empty(reading.Faults);
        var guide = reading.Guide!;
        Assert.Equal(("Exchanged glass", 0.6328, Polarization.TE), (guide.Name, guide.Wavelength.Micrometres, guide.Polarization));
        Assert.Equal(2, guide.Profile.RegionCount);
        Assert.True(guide.Profile.LastRegionIsUnbounded);
        Assert.Equal([0, 1], guide.Profile.Pieces.Select(piece => piece.Region));
        Assert.Equal(1.56 * 1.56, guide.Profile.Pieces[1].IndexSquared(2), 1e-15);
    }

    [Theory]
    [InlineData("schema", "\"guidemodes.guide/2\"", "schema", "guidemodes.guide/1")]
    [InlineData("schema", "7", "schema", "guidemodes.guide/1")]
    [InlineData("name", "7", "name", "Expected a text")]
    [InlineData("notes", "[]", "notes", "Expected a text")]
    [InlineData("geometry", "\"fiber\"", "geometry", "only \"planar\" is available so far")]
    [InlineData("geometry", "\"channel\"", "geometry", "only \"planar\" is available so far")]
    [InlineData("geometry", "\"Planar\"", "geometry", "\"planar\"")]
    [InlineData("polarization", "\"te\"", "polarization", "\"TE\", \"TM\"")]
    [InlineData("polarization", "null", "polarization", "\"TE\", \"TM\"")]
    [InlineData("wavelengthUm", "0", "wavelengthUm", "from 0.05 to 1000 µm")]
    [InlineData("wavelengthUm", "1e400", "wavelengthUm", "from 0.05 to 1000 µm")]
    [InlineData("wavelengthUm", "\"NaN\"", "wavelengthUm", "from 0.05 to 1000 µm")]
    [InlineData("cover", "{ \"n\": 0.99 }", "cover.n", "from 1 to 10")]
    [InlineData("cover", "{ \"N\": 1.5 }", "cover", "Expected a number, { \"n\"")]
    [InlineData("cover", "{ \"n\": 1.5, \"k\": 0.1 }", "cover.k", "Known are: n")]
    [InlineData("cover", "11", "cover", "from 1 to 10")]
    [InlineData("cover", "true", "cover", "but found true")]
    [InlineData("cover", "{ \"material\": \"unobtainium\" }", "cover.material", "fused-silica")]
    [InlineData("cover", "{ \"material\": 3 }", "cover.material", "fused-silica")]
    [InlineData("cover", "{ \"material\": \"gallium-arsenide\" }", "cover.material", "known from 0.97 to 17 µm, but the wavelength is 0.6328 µm")]
    [InlineData("cover", "{ \"material\": \"fused-silica\", \"molePercentGeO2\": -1 }", "cover.molePercentGeO2", "from 0 to 100 mol %")]
    [InlineData("cover", "{ \"material\": \"polystyrene\", \"molePercentGeO2\": 1 }", "cover.molePercentGeO2", "Known are: material")]
    [InlineData("cover", "{ \"formula\": \"1.5+\" }", "cover.formula", "(column 5)")]
    [InlineData("cover", "{ \"formula\": \"1.5+x\" }", "cover.formula", "'x' is unknown")]
    [InlineData("cover", "{ \"formula\": \"ln(lambda)\" }", "cover.formula", "from 1 to 10")]
    [InlineData("cover", "{ \"formula\": 1 }", "cover.formula", "Expected a formula")]
    [InlineData("substrate", "{ \"n\": 1.5100001 }", "regions[1].thicknessUm", "its index is 1.51, but the substrate's is 1.5100001")]
    [InlineData("regions", "[]", "regions", "1 to 200 regions, but found 0")]
    [InlineData("regions", "{}", "regions", "but found an object")]
    [InlineData("regions[0]", "3", "regions[0]", "Expected a region")]
    [InlineData("regions[0].thicknessUm", "-1", "regions[0].thicknessUm", "from 0 to 100000 µm")]
    [InlineData("regions[0].thicknessUm", "null", "regions[0].thicknessUm", "Only the last region")]
    [InlineData("regions[0].thicknessUm", "\"2\"", "regions[0].thicknessUm", "but found \"2\"")]
    [InlineData("regions[0].index", "null", "regions[0].index", "an object with a law")]
    [InlineData("regions[0].index.law", "\"step\"", "regions[0].index.law", "\"uniform\", \"linear\", \"power\"")]
    [InlineData("regions[0].index.law", "{}", "regions[0].index.law", "but found an object")]
    [InlineData("regions[0].index.n", "[1]", "regions[0].index.n", "but found a list")]
    [InlineData("regions[0].index.n", "0.5", "regions[0].index.n", "from 1 to 10")]
    [InlineData("regions[1].index.depthUm", "0", "regions[1].index.depthUm", "from 0.001 to 100000 µm")]
    [InlineData("regions[1].index.centerUm", "1e9", "regions[1].index.centerUm", "from -100000 to 100000 µm")]
    [InlineData("regions[1].index.deltaN", "{ \"material\": \"fused-silica\" }", "regions[1].index.deltaN", "a number or { \"formula\"")]
    [InlineData("regions[1].index.deltaN", "-0.6", "regions[1].index", "at x = 2 µm; from 1 to 10 is allowed")]
    [InlineData("regions[1].index.depthUm", "90000", "regions[1].thicknessUm", "has not reached the substrate's")]
    [InlineData("regions[1].index.quantity", "\"n3\"", "regions[1].index.quantity", "one of n, n2")]
    [InlineData("regions[1].index", "{ \"law\": \"linear\", \"nStart\": 1.5, \"nEnd\": 1.51 }", "regions[1].thicknessUm", "cannot run to infinity")]
    [InlineData("regions[1].index", "{ \"law\": \"power\", \"nCenter\": 1.5, \"nEdge\": 1.51, \"halfWidthUm\": 1, \"alpha\": 2 }", "regions[1].thicknessUm", "cannot run to infinity")]
    [InlineData("regions[1].index", "{ \"law\": \"uniform\", \"n\": 1.52 }", "regions[1].thicknessUm", "its index is 1.52")]
    [InlineData("regions[1].index", "{ \"law\": \"formula\", \"n\": \"1.52+1/(1+x)\" }", "regions[1].thicknessUm", "must agree within")]
    [InlineData("regions[1].index", "{ \"law\": \"formula\", \"n\": \"1.51+0.001*sin(1000*pi*x)\" }", "regions[1].thicknessUm", "substrate")]
    [InlineData("regions[1].index", "{ \"law\": \"formula\", \"n\": 1.51 }", "regions[1].index.n", "Expected a formula as text")]
    [InlineData("regions[0].index", "{ \"law\": \"formula\", \"n\": \"1.5+y\" }", "regions[0].index.n", "(column 5)")]
    [InlineData("regions[0].index", "{ \"law\": \"formula\", \"n\": \"1.5+sqrt(1-x)\" }", "regions[0].index", "not a real number at x = 1.0")]
    [InlineData("regions[0].index", "{ \"law\": \"formula\", \"n\": \"1.5+0.01/(x-1)\" }", "regions[0].index", "at x = ")]
    [InlineData("regions[0].index", "{ \"law\": \"formula\", \"n\": \"1.5+0.01*abs(sin(1000*x))\" }", "regions[0].index.n", "at most 200")]
    [InlineData("regions[0].index", "{ \"law\": \"power\", \"nCenter\": 1.53, \"nEdge\": 1.5, \"halfWidthUm\": 1, \"alpha\": 0.1 }", "regions[0].index.alpha", "from 0.5 to 1000")]
    [InlineData("regions[0].index", "{ \"law\": \"power\", \"nCenter\": 1.53, \"nEdge\": 1.2, \"halfWidthUm\": 1, \"alpha\": 2 }", "regions[0].index", "from 1 to 10 is allowed")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5]] }", "regions[0].index.points", "2 to 5000 points")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": 5 }", "regions[0].index.points", "2 to 5000 points")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], 3] }", "regions[0].index.points[1]", "Expected a point")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], [1, 1.5, 2]] }", "regions[0].index.points[1]", "a list of 3")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], [3, 0.5]] }", "regions[0].index.points[1][1]", "from 1 to 10")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], [\"3\", 1.5]] }", "regions[0].index.points[1][0]", "µm")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], [3, 1.5], [3, 1.6]] }", "regions[0].index.points[2]", "must ascend")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], [1.9, 1.5]] }", "regions[0].index.points", "The points run from 0 to 1.9 µm, but the region runs from 0 to 2 µm")]
    [InlineData("regions[0].index", "{ \"law\": \"table\", \"points\": [[0, 1.5], [2, 1.5]], \"interpolation\": \"spline\" }", "regions[0].index.interpolation", "linear, monotone-cubic")]
    public void Read_AFaultyValue_IsAFaultAtItsField(string path, string json, string at, string saying)
    {
        var faults = Faults(GuideDocument.Parse(Valid).With(path, JsonNode.Parse(json)));

        var fault = Assert.Single(faults);
        Assert.Equal(at, fault.Path);
        Assert.Contains(saying, fault.Message, StringComparison.Ordinal);
        Assert.EndsWith(".", fault.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("schema", "guidemodes.guide/1")]
    [InlineData("geometry", "planar")]
    [InlineData("wavelengthUm", "from 0.05 to 1000 µm")]
    [InlineData("polarization", "TE")]
    [InlineData("cover", "{ \"n\": 1.0 }")]
    [InlineData("regions", "1 to 200")]
    [InlineData("substrate", "{ \"n\": 1.0 }")]
    [InlineData("regions[0].thicknessUm", "from 0 to 100000 µm")]
    [InlineData("regions[1].thicknessUm", "or null for a region to infinity")]
    [InlineData("regions[0].index", "uniform")]
    [InlineData("regions[0].index.law", "uniform")]
    [InlineData("regions[0].index.n", "an index: a number from 1 to 10")]
    [InlineData("regions[1].index.nBase", "an index")]
    [InlineData("regions[1].index.deltaN", "from -9 to 9")]
    [InlineData("regions[1].index.depthUm", "from 0.001 to 100000 µm")]
    public void Read_WithoutARequiredField_SaysWhatToGive(string path, string saying)
    {
        var fault = Assert.Single(Faults(GuideDocument.Parse(Valid).Without(path)));

        Assert.Equal(path, fault.Path);
        Assert.Contains("missing", fault.Message, StringComparison.Ordinal);
        Assert.Contains(saying, fault.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("name")]
    [InlineData("notes")]
    [InlineData("regions[1].index.centerUm")]
    [InlineData("regions[1].index.quantity")]
    public void Read_WithoutAnOptionalField_IsFine(string path) => Assert.Empty(Faults(GuideDocument.Parse(Valid).Without(path)));

    [Theory]
    [InlineData("WavelengthUm", "Did you mean wavelengthUm?")]
    [InlineData("cladding", "Known are: schema, name")]
    [InlineData("regions[0].thickness", "Known are: thicknessUm, index")]
    [InlineData("regions[0].index.depthUm", "Known are: law, n, quantity")]
    public void Read_AnUnknownField_IsAFaultThatNamesTheKnownOnes(string path, string saying)
    {
        var fault = Assert.Single(Faults(GuideDocument.Parse(Valid).With(path, 1)));

        Assert.Equal(path, fault.Path);
        Assert.Contains(saying, fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_SeveralFaults_ReportsThemAll()
    {
        var document = GuideDocument.Parse(Valid)
            .With("wavelengthUm", -1).With("polarization", "TEM").With("cover.n", 0).With("regions[0].index.n", 99)
            .With("regions[1].index.depthUm", -5).Without("substrate");

        Assert.Equal(
            ["polarization", "wavelengthUm", "cover.n", "regions[0].index.n", "regions[1].index.depthUm", "substrate"],
            Faults(document).Select(fault => fault.Path));
    }

    [Theory]
    [InlineData("null")]
    [InlineData("[]")]
    [InlineData("3")]
    [InlineData("\"guide\"")]
    public void Read_ARootThatIsNoObject_IsAFaultOfTheDocument(string json) =>
        Assert.Equal("$", Assert.Single(Faults(GuideDocument.Parse(json))).Path);

    [Theory]
    [InlineData("{ \"name\": \"a\", \"name\": \"b\" }")]
    [InlineData("{ \"name\": \"\\ud800\" }")]
    [InlineData("{ \"\\udfff\": 1 }")]
    [InlineData("{ \"name\": }")]
    [InlineData("")]
    public void Parse_WhatNoDocumentCanHold_IsRefusedAsJson(string json) => Assert.ThrowsAny<JsonException>(() => GuideDocument.Parse(json));

    [Fact]
    public void Read_TooManyRegions_IsRefused()
    {
        var region = "{ \"thicknessUm\": 1, \"index\": { \"law\": \"uniform\", \"n\": 1.5 } }";
        string With(int count) => $"[{string.Join(",", Enumerable.Repeat(region, count))}]";
        var document = GuideDocument.Parse(Valid);

        Assert.Empty(Faults(document.With("regions", JsonNode.Parse(With(200)))));
        Assert.Equal("regions", Assert.Single(Faults(document.With("regions", JsonNode.Parse(With(201))))).Path);
    }

    [Fact]
    public void Read_RegionsThickerThanAllowedTogether_IsRefused()
    {
        var document = GuideDocument.Parse(Valid).With("regions[0].thicknessUm", 6e4).WithRegionInserted(0, JsonNode.Parse(
            "{ \"thicknessUm\": 6e4, \"index\": { \"law\": \"uniform\", \"n\": 1.5 } }")!);

        var fault = Assert.Single(Faults(document));
        Assert.Equal("regions", fault.Path);
        Assert.Contains("120000 µm thick together", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_TooManyPieces_IsRefused()
    {
        static string Table(int start)
        {
            var points = Enumerable.Range(0, 5000).Select(i => FormattableString.Invariant($"[{start + i / 4999.0}, 1.5]"));
            return $"{{ \"thicknessUm\": 1, \"index\": {{ \"law\": \"table\", \"points\": [{string.Join(",", points)}] }} }}";
        }

        var document = GuideDocument.Parse(Valid);
        Assert.Empty(Faults(document.With("regions", JsonNode.Parse($"[{Table(0)},{Table(1)}]"))));
        var fault = Assert.Single(Faults(document.With("regions", JsonNode.Parse($"[{Table(0)},{Table(1)},{Table(2)}]"))));
        Assert.Equal("regions", fault.Path);
        Assert.Contains("more than 10000 smooth pieces", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_FormulasTooLargeTogether_IsRefused()
    {
        var formula = string.Join("+", Enumerable.Repeat("x", 240)) + "-239*x";
        var region = $"{{ \"thicknessUm\": 0.01, \"index\": {{ \"law\": \"formula\", \"n\": \"1.5+{formula}\" }} }}";
        var document = GuideDocument.Parse(Valid).With("regions", JsonNode.Parse($"[{string.Join(",", Enumerable.Repeat(region, 12))}]"));

        var fault = Faults(document)[0];
        Assert.Equal("regions[10].index.n", fault.Path);
        Assert.Contains("at most 5000", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_TooManyBranches_IsRefused()
    {
        var formula = "1.5+" + string.Join("+", Enumerable.Repeat("0*abs(x-1)", 21));
        var fault = Assert.Single(Faults(GuideDocument.Parse(Valid).With("regions[0].index", JsonNode.Parse($"{{ \"law\": \"formula\", \"n\": \"{formula}\" }}"))));

        Assert.Equal("regions[0].index.n", fault.Path);
        Assert.Contains("has 21 abs, min, max and roots of x; at most 20", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_TooManyBranchChangesForTheFormulasLength_IsRefused()
    {
        static string Region(int terms)
        {
            var filler = string.Concat(Enumerable.Repeat("+x-x", terms));
            return $"{{ \"thicknessUm\": 1, \"index\": {{ \"law\": \"formula\", \"n\": \"1.5+0.01*abs(sin(500*x)){filler}\" }} }}";
        }

        var document = GuideDocument.Parse(Valid);
        var one = Assert.Single(Faults(document.With("regions", JsonNode.Parse($"[{Region(60)}]"))));
        Assert.Equal("regions[0].index.n", one.Path);
        Assert.Contains("too often for its length", one.Message, StringComparison.Ordinal);

        var many = Assert.Single(Faults(document.With("regions", JsonNode.Parse($"[{string.Join(",", Enumerable.Repeat(Region(20), 6))}]"))));
        Assert.Equal("regions", many.Path);
        Assert.Contains("too often for their length", many.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_BranchesNestedTooLong_IsRefused()
    {
        var inner = string.Concat(Enumerable.Repeat("+x-x", 50));
        var nested = string.Concat(Enumerable.Repeat("abs(", 10)) + "x" + inner + new string(')', 10);
        var document = GuideDocument.Parse(Valid).With("regions[0].index", JsonNode.Parse($"{{ \"law\": \"formula\", \"n\": \"1.5+0*{nested}\" }}"));

        var fault = Assert.Single(Faults(document));
        Assert.Equal("regions[0].index.n", fault.Path);
        Assert.Contains("is too long: at most 500", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Read_MoreFaultsThanAreListed_StopsAndSaysSo()
    {
        var points = string.Join(",", Enumerable.Repeat("[0, 0]", 1000));
        var faults = Faults(GuideDocument.Parse(Valid).With("regions[0].index", JsonNode.Parse(
            $"{{ \"law\": \"table\", \"points\": [{points}] }}")));

        Assert.Equal(201, faults.Length);
        Assert.Equal("$", faults[^1].Path);
    }

    [Fact]
    public void Read_ARegionWithoutThickness_KeepsItsPlace()
    {
        var profile = GuideReader.Read(GuideDocument.Parse(Valid).With("regions[0].thicknessUm", 0)).Guide!.Profile;

        Assert.Equal(2, profile.RegionCount);
        Assert.Equal([1], profile.Pieces.Select(piece => piece.Region));
    }

    [Fact]
    public void Read_OnlyRegionsWithoutThickness_IsAnInterfaceOfTwoMedia()
    {
        var document = GuideDocument.Parse(Valid).Without("regions[1]").With("regions[0].thicknessUm", 0);
        var profile = GuideReader.Read(document).Guide!.Profile;

        Assert.Equal(profile.Substrate.IndexSquared, Assert.Single(profile.Pieces).IndexSquared(0));
    }

    [Fact]
    public void Read_ATailThatIsFlatFromTheStart_IsAnInterfaceOfTwoMedia()
    {
        var document = GuideDocument.Parse(Valid).Without("regions[0]").With("regions[0].index.deltaN", 0);
        var profile = GuideReader.Read(document).Guide!.Profile;

        Assert.True(profile.LastRegionIsUnbounded);
        Assert.Equal(1.51 * 1.51, Assert.Single(profile.Pieces).IndexSquared(0), 1e-15);
    }

    [Fact]
    public void Read_Materials_GiveIndexAndGroupTerm()
    {
        var document = GuideDocument.Parse(Valid).With("wavelengthUm", 1.55)
            .With("cover", JsonNode.Parse("{ \"material\": \"fused-silica\" }"))
            .With("regions[0].index.n", JsonNode.Parse("{ \"formula\": \"1.5 + 0.01/lambda^2\" }"));
        var profile = GuideReader.Read(document).Guide!.Profile;

        // Malitson's silica at 1.55 µm, recomputed: n 1.444023622, N 1.462596484.
        Assert.Equal(1.444023622 * 1.444023622, profile.Cover.IndexSquared, 1e-8);
        Assert.Equal(1.444023622 * 1.462596484, profile.Cover.GroupTerm, 1e-8);
        var n = 1.5 + 0.01 / (1.55 * 1.55);
        Assert.Equal(2 * n * -0.02 / Math.Pow(1.55, 3), profile.Pieces[0].Jet(1).DLambda, 1e-15);
    }

    private static ImmutableArray<Fault> Faults(GuideDocument document)
    {
        var reading = GuideReader.Read(document);
        Assert.Equal(reading.Faults.IsEmpty, reading.Guide is not null);
        return reading.Faults;
    }
}
