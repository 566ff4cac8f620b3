using System.Net;
using System.Text;
using System.Text.Json.Nodes;

namespace GuideModes.Web.Tests.Api;

/// <summary>The contract of POST /api/v1/modes: its shape, and every kind of bad input.</summary>
public sealed class ModesApiTests(WebHost host) : IClassFixture<WebHost>
{
    private readonly HttpClient _client = host.CreateClient();

    [Fact]
    public async Task Post_Slab_AnswersAsTheContractSays()
    {
        var answer = await Solve(Samples.Slab);

        Assert.Equal(4, answer["modeCount"]!.GetValue<int>());
        Assert.InRange(answer["wkbModeNumber"]!.GetValue<double>(), 4, 5);
        var modes = answer["modes"]!.AsArray();
        Assert.Equal(["TE0", "TE1", "TE2", "TE3"], modes.Select(mode => mode!["label"]!.GetValue<string>()));
        Assert.Equal([0, 1, 2, 3], modes.Select(mode => mode!["m"]!.GetValue<int>()));
        Assert.Empty(answer["remarks"]!.AsArray());
        foreach (var mode in modes)
        {
            Assert.True(Number(mode, "nEffLower") <= Number(mode, "nEff") && Number(mode, "nEff") <= Number(mode, "nEffUpper"));
            Assert.Equal(Math.Tau * Number(mode, "nEff"), Number(mode, "betaPerUm"), 1e-12);
            Assert.Equal(3, mode!["confinement"]!.AsArray().Count);
            Assert.Equal(1, mode["confinement"]!.AsArray().Sum(share => share!.GetValue<double>()), 1e-9);
            Assert.True(mode.AsObject().ContainsKey("dispersionPsPerNmKm"));
            Assert.Null(mode["dispersionPsPerNmKm"]);
            Assert.Contains(mode["trust"]!.GetValue<string>(), new[] { "agree", "watch", "disagree" });
            Assert.NotEmpty(mode["trustReason"]!.GetValue<string>());
            Assert.NotNull(mode["remarks"]);
            foreach (var name in new[] { "nGroup", "centroidUm", "rmsWidthUm", "coverPenetrationUm", "substratePenetrationUm" }) Assert.True(Number(mode, name) > 0, name);
            foreach (var name in new[] { "nEff", "uncertainty", "turningPointsUm", "firstOrderNEff", "secondOrderNEff", "orderKept", "orderReason", "well", "wellCount", "barrierTransparency", "nearDegenerate" })
                Assert.True(mode["wkb"]!.AsObject().ContainsKey(name), name);
            Assert.Null(mode["field"]);
        }

        // The bracket holds the 34-digit value of tests/GuideModes.Tests/ReferenceData/modes.json, case s01.
        Assert.InRange(Samples.SlabFirst, Number(modes[0], "nEffLower"), Number(modes[0], "nEffUpper"));
        Assert.InRange(Number(modes[0], "nEffUpper") - Number(modes[0], "nEffLower"), 0, 1e-10);
    }

    [Fact]
    public async Task Post_Fields_AddsProfileAndNormalisedFields()
    {
        var answer = await Solve(Samples.Slab, "?fields=true");

        var profile = answer["profile"]!;
        Assert.Equal(profile["xUm"]!.AsArray().Count, profile["n"]!.AsArray().Count);
        foreach (var mode in answer["modes"]!.AsArray())
        {
            var field = mode!["field"]!;
            Assert.Equal("E", field["quantity"]!.GetValue<string>());
            var x = Numbers(field["xUm"]!);
            var e = Numbers(field["value"]!);
            Assert.Equal(x.Length, e.Length);
            // ∫E² dx = 1 by the trapezoidal rule on 400 intervals or more, the tails beyond e^−12 left out, and at most a few times the guide's width kept.
            var norm = x.Zip(x.Skip(1)).Zip(e.Zip(e.Skip(1)), (dx, y) => (dx.Second - dx.First) * 0.5 * (y.First * y.First + y.Second * y.Second)).Sum();
            Assert.Equal(1, norm, 1e-3);
        }
    }

    [Fact]
    public async Task Post_FieldsAtCoordinates_AnswersThere()
    {
        var answer = await Solve(Samples.Slab, "?fields=true&xUm=0,1,2,3,4");

        // fieldE of TE0, case s01 of modes.json (spectral, within 1e-8).
        double[] expected = [0.17257510396531361, 0.5109687787672612, 0.6414649659634984, 0.5109687787672571, 0.17257510396531206];
        var field = answer["modes"]![0]!["field"]!;
        Assert.Equal([0, 1, 2, 3, 4], Numbers(field["xUm"]!));
        Assert.All(Numbers(field["value"]!).Zip(expected), pair => Assert.Equal(pair.Second, pair.First, 1e-8));
    }

    [Fact]
    public async Task Post_NothingGuided_IsAnAnswerThatSaysWhy()
    {
        var answer = await Solve(Samples.Nothing);

        Assert.Equal(0, answer["modeCount"]!.GetValue<int>());
        Assert.Empty(answer["modes"]!.AsArray());
        Assert.NotEmpty(answer["remarks"]![0]!.GetValue<string>());
    }

    [Theory]
    [InlineData("", "$")]
    [InlineData("{\"schema\":", "$")]
    [InlineData("[1]", "$")]
    [InlineData("7", "$")]
    [InlineData("null", "$")]
    [InlineData("{\"a\":1,}", "$")]
    [InlineData("{}", "schema")]
    public async Task Post_NoGuide_NamesThePlace(string body, string path)
    {
        var problem = await Refused(body, HttpStatusCode.BadRequest);
        Assert.Contains(path, problem["errors"]!.AsObject().Select(error => error.Key));
    }

    [Theory]
    [InlineData("wavelengthUm", "-1")]
    [InlineData("wavelengthUm", "\"0.6\"")]
    [InlineData("wavelengthUm", "1e999")]
    [InlineData("polarization", "\"TEM\"")]
    [InlineData("geometry", "\"fiber\"")]
    [InlineData("cover.n", "0.2")]
    [InlineData("regions[0].thicknessUm", "-4")]
    [InlineData("regions[0].index.n", "true")]
    [InlineData("regions[0].index.law", "\"secret\"")]
    [InlineData("regions", "[]")]
    public async Task Post_Fault_NamesItsPathInASentence(string path, string value)
    {
        var body = Samples.Document(Samples.Slab).With(path, "VALUE").ToString().Replace("\"VALUE\"", value);

        var problem = await Refused(body, HttpStatusCode.BadRequest);

        var (key, sentences) = Assert.Single(problem["errors"]!.AsObject());
        Assert.Equal(path, key);
        Assert.All(sentences!.AsArray(), sentence => Assert.EndsWith(".", sentence!.GetValue<string>()));
    }

    [Theory]
    [InlineData("text/plain")]
    [InlineData("application/x-www-form-urlencoded")]
    public async Task Post_WrongContentType_NamesTheRightOne(string type)
    {
        var problem = await Refused(Samples.Slab, HttpStatusCode.BadRequest, type);
        Assert.Contains("application/json", problem["errors"]!["$"]![0]!.GetValue<string>());
    }

    [Fact]
    public async Task Post_NotUtf8_IsRefused()
    {
        using var content = new ByteArrayContent([0x7b, 0x22, 0xff, 0xfe, 0x22, 0x3a, 0x31, 0x7d]) { Headers = { ContentType = new("application/json") } };
        var response = await _client.PostAsync("/api/v1/modes", content);
        Assert.Equal(HttpStatusCode.BadRequest, response.StatusCode);
    }

    [Fact]
    public async Task Post_DeepNesting_IsRefused() =>
        await Refused(string.Concat(Enumerable.Repeat("{\"a\":", 5000)) + "1" + new string('}', 5000), HttpStatusCode.BadRequest);

    [Theory]
    [InlineData(1024 * 1024 + 1)]
    [InlineData(5_000_000)]
    public async Task Post_OverOneMegabyte_IsTooLarge(int length)
    {
        var problem = await Refused("{\"name\":\"" + new string('a', length) + "\"}", HttpStatusCode.RequestEntityTooLarge);
        Assert.Contains("1 MB", problem["detail"]!.GetValue<string>());
    }

    [Fact]
    public async Task Post_OverTwoHundredRegions_IsAFault()
    {
        var document = Samples.Document(Samples.Slab);
        var region = document["regions[0]"]!.Value.GetRawText();
        var body = document.With("regions", JsonNode.Parse("[" + string.Join(',', Enumerable.Repeat(region, 201)) + "]")).ToString();

        var problem = await Refused(body, HttpStatusCode.BadRequest);

        Assert.Contains("200", problem["errors"]!["regions"]![0]!.GetValue<string>());
    }

    /// <summary>A guide a centimetre thick would hold tens of thousands of modes: more than is looked for.</summary>
    [Fact]
    public async Task Post_TooMuchWork_IsRefusedWithASentence()
    {
        var body = Samples.Document(Samples.Slab).With("regions[0].thicknessUm", 50_000.0).ToString();

        var problem = await Refused(body, HttpStatusCode.UnprocessableEntity);

        Assert.EndsWith(".", problem["detail"]!.GetValue<string>());
    }

    [Theory]
    [InlineData("?fields=maybe", "?fields")]
    [InlineData("?fields=true&xUm=0,b", "?xUm")]
    [InlineData("?fields=true&xUm=1,0", "?xUm")]
    public async Task Post_BadOption_IsNamed(string query, string path)
    {
        using var content = new StringContent(Samples.Slab, Encoding.UTF8, "application/json");
        var response = await _client.PostAsync("/api/v1/modes" + query, content);
        Assert.Equal(HttpStatusCode.BadRequest, response.StatusCode);
        Assert.Contains(path, JsonNode.Parse(await response.Content.ReadAsStringAsync())!["errors"]!.AsObject().Select(error => error.Key));
    }

    [Fact]
    public async Task Health_Live_IsWell() => Assert.Equal(HttpStatusCode.OK, (await _client.GetAsync("/health/live")).StatusCode);

    [Fact]
    public async Task OpenApi_Document_DescribesTheInterfaceWithExamplesThatWork()
    {
        var document = JsonNode.Parse(await _client.GetStringAsync("/openapi/v1.json"))!;
        var post = document["paths"]!["/api/v1/modes"]!["post"]!;

        Assert.NotEmpty(post["summary"]!.GetValue<string>());
        Assert.Equal(["200", "400", "413", "422"], post["responses"]!.AsObject().Select(response => response.Key).Order());
        foreach (var (_, example) in post["requestBody"]!["content"]!["application/json"]!["examples"]!.AsObject())
            Assert.True((await Solve(example!["value"]!.ToJsonString()))["modeCount"]!.GetValue<int>() > 0);
        var number = document["components"]!["schemas"]!["ModeAnswer"]!["properties"]!["nEff"]!;
        Assert.Equal("number", number["type"]!.GetValue<string>());
        Assert.NotEmpty(number["description"]!.GetValue<string>());
    }

    [Fact]
    public async Task Answer_Doubles_RoundTrip()
    {
        var answer = await Solve(Samples.TwoRegions);
        var expected = Samples.Solve(Samples.TwoRegions).Modes[0].Exact.EffectiveIndex.Value;
        Assert.Equal(expected, Number(answer["modes"]![0], "nEff"));
    }

    private static double Number(JsonNode? node, string name) => node![name]!.GetValue<double>();

    private static double[] Numbers(JsonNode node) => [.. node.AsArray().Select(number => number!.GetValue<double>())];

    private async Task<JsonNode> Solve(string body, string query = "")
    {
        using var content = new StringContent(body, Encoding.UTF8, "application/json");
        var response = await _client.PostAsync("/api/v1/modes" + query, content);
        var text = await response.Content.ReadAsStringAsync();
        Assert.True(response.StatusCode == HttpStatusCode.OK, text);
        return JsonNode.Parse(text)!;
    }

    private async Task<JsonNode> Refused(string body, HttpStatusCode status, string type = "application/json")
    {
        using var content = new StringContent(body, Encoding.UTF8, type);
        var response = await _client.PostAsync("/api/v1/modes", content);
        Assert.Equal(status, response.StatusCode);
        Assert.Equal("application/problem+json", response.Content.Headers.ContentType!.MediaType);
        var problem = JsonNode.Parse(await response.Content.ReadAsStringAsync())!;
        Assert.Equal((int)status, problem["status"]!.GetValue<int>());
        Assert.NotEmpty(problem["title"]!.GetValue<string>());
        return problem;
    }
}
