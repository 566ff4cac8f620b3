using System.Net;
using System.Text;
using System.Text.Json.Nodes;
using GuideModes.Guides;
using GuideModes.Web.State;

namespace GuideModes.Web.Tests.Api;

/// <summary>Each file is parsed and held against the interface's own answer.</summary>
public sealed class DownloadsTests(WebHost host) : IClassFixture<WebHost>
{
    private static readonly string Query = "g=" + GuideLinks.Pack(Samples.Document(Samples.TwoRegions));

    private readonly HttpClient _client = host.CreateClient();

    [Fact]
    public async Task Modes_Csv_AgreesWithTheInterface()
    {
        var table = CsvTable.Parse(await _client.GetStringAsync($"/files/modes.csv?{Query}"));
        var answer = await Answer();

        AssertHeader(table);
        var modes = answer["modes"]!.AsArray();
        Assert.Equal(modes.Count, table.Rows.Length);
        foreach (var (column, name) in new[] { ("n_eff", "nEff"), ("n_eff_lower", "nEffLower"), ("n_eff_upper", "nEffUpper"), ("beta_rad_per_um", "betaPerUm"), ("n_group", "nGroup"), ("centroid_um", "centroidUm") })
            Assert.Equal(modes.Select(mode => mode![name]!.GetValue<double>()), table.Numbers(column));
        Assert.Equal(modes.Select(mode => mode!["wkb"]!["nEff"]!.GetValue<double>()), table.Numbers("wkb_n_eff"));
        Assert.Equal(modes.Select(mode => mode!["label"]!.GetValue<string>()), table.Rows.Select(row => row[0]));
    }

    [Fact]
    public async Task Fields_Csv_HoldsTheModesAskedForAndAgreesWithTheInterface()
    {
        var table = CsvTable.Parse(await _client.GetStringAsync($"/files/fields.csv?{Query}&m=0,2"));

        AssertHeader(table);
        Assert.Equal(["x_um", "E_TE0_um^-1/2", "E_TE2_um^-1/2"], table.Columns);
        var x = table.Numbers("x_um");
        var answer = await Answer("?fields=true&xUm=" + string.Join(',', table.Rows.Select(row => row[0])));
        Assert.Equal(answer["modes"]![2]!["field"]!["value"]!.AsArray().Select(value => value!.GetValue<double>()), table.Numbers("E_TE2_um^-1/2"));
        Assert.True(x[0] < 0 && x.Length > 400);
    }

    [Fact]
    public async Task Guide_Json_IsTheGuide()
    {
        var response = await _client.GetAsync($"/files/guide.json?{Query}");

        Assert.Equal("attachment; filename=two.json; filename*=UTF-8''two.json", response.Content.Headers.ContentDisposition!.ToString());
        Assert.Equal(Samples.Document(Samples.TwoRegions), GuideDocument.Parse(await response.Content.ReadAsStringAsync()));
    }

    [Fact]
    public async Task Everything_Json_IsGuideAndAnswer()
    {
        var everything = JsonNode.Parse(await _client.GetStringAsync($"/files/everything.json?{Query}"))!;

        Assert.Equal("guidemodes.everything/1", everything["schema"]!.GetValue<string>());
        Assert.Equal(Samples.Document(Samples.TwoRegions), GuideDocument.Parse(everything["guide"]!.ToJsonString()));
        Assert.True(JsonNode.DeepEquals(await Answer("?fields=true"), everything["answer"]));
    }

    [Theory]
    [InlineData("/files/modes.csv?g=rubbish")]
    [InlineData("/files/fields.csv")]
    [InlineData("/files/guide.json?d=../../x")]
    public async Task File_OfABrokenLink_IsAProblem(string address)
    {
        var response = await _client.GetAsync(address);
        Assert.Equal(HttpStatusCode.BadRequest, response.StatusCode);
        Assert.Equal("application/problem+json", response.Content.Headers.ContentType!.MediaType);
    }

    [Fact]
    public async Task File_OfAFaultyGuide_NamesTheFault()
    {
        var faulty = "g=" + GuideLinks.Pack(Samples.Document(Samples.Slab).With("wavelengthUm", -1));
        var response = await _client.GetAsync($"/files/modes.csv?{faulty}");
        Assert.Contains("wavelengthUm", await response.Content.ReadAsStringAsync());
        Assert.Equal(HttpStatusCode.BadRequest, response.StatusCode);
    }

    private static void AssertHeader(CsvTable table)
    {
        var header = string.Join('\n', table.Header);
        Assert.Contains("guide: Two", header);
        Assert.Contains("vacuum wavelength: 0.6328 um", header);
        Assert.Contains("polarization: TE", header);
        Assert.Contains("engine: GuideModes 0.1.0", header);
        Assert.Contains("units:", header);
    }

    private async Task<JsonNode> Answer(string query = "")
    {
        using var content = new StringContent(Samples.TwoRegions, Encoding.UTF8, "application/json");
        var response = await _client.PostAsync("/api/v1/modes" + query, content);
        return JsonNode.Parse(await response.Content.ReadAsStringAsync())!;
    }
}
