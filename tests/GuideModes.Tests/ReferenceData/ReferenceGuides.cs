using System.Collections.Immutable;
using System.Text.Json;
using System.Text.Json.Nodes;
using GuideModes.Guides;

namespace GuideModes.Tests.ReferenceData;

/// <summary>One reference mode; what the data does not give is null.</summary>
/// <remarks>
/// Wkb1 is the first-order WKB value, as <c>WkbMode.FirstOrderIndex</c> states it; Wkb3 the value with Dunham's second-order term;
/// Field is [x in µm, E in µm^−½], normalised to ∫E² dx = 1.
/// </remarks>
public sealed record ReferenceMode(
    string Label,
    int Order,
    double NEff,
    double NGroup,
    double? Wkb1,
    double? Wkb3,
    ImmutableArray<double>? Confinement,
    ImmutableArray<(double X, double E)>? Field);

/// <summary>A planar guide of <c>modes.json</c> as a guide document, with what the reference says of it.</summary>
/// <remarks>RegionFormulas: n(x) of each region in this project's formula language, rewritten from the file's Python; null for the table.</remarks>
public sealed record ReferenceGuide(
    string Id,
    string Title,
    GuideDocument Document,
    ImmutableArray<string?> RegionFormulas,
    ImmutableArray<ReferenceMode> Modes)
{
    /// <summary>The guide that the document describes.</summary>
    public Guide Guide
    {
        get
        {
            var reading = GuideReader.Read(Document);
            return reading.Guide ?? throw new InvalidOperationException(Id + ": " + string.Join(" ", reading.Faults));
        }
    }

    public override string ToString() => Id;
}

/// <summary>The planar cases of <c>modes.json</c>, s01–s21 and s29. How that file was made is told in README.md beside it.</summary>
public static class ReferenceGuides
{
    private static readonly Lazy<ImmutableArray<ReferenceGuide>> Loaded = new(Load);

    public static ImmutableArray<ReferenceGuide> All => Loaded.Value;

    /// <summary>The ids, for <c>[MemberData]</c>.</summary>
    public static TheoryData<string> Ids => [.. All.Select(guide => guide.Id)];

    /// <summary>A case by its id or the start of it, such as s09.</summary>
    public static ReferenceGuide Find(string id) => All.First(guide => guide.Id.StartsWith(id, StringComparison.Ordinal));

    /// <summary>The file's Python in this project's formula language.</summary>
    public static string FromPython(string formula) => formula.Replace("**", "^").Replace("lam", "lambda");

    private static ImmutableArray<ReferenceGuide> Load()
    {
        var path = Path.Combine(AppContext.BaseDirectory, "ReferenceData", "modes.json");
        var cases = JsonNode.Parse(File.ReadAllText(path))!["cases"]!.AsArray();
        return [.. cases.Where(one => (string)one!["geometry"]! == "planar").Select(one => Translate(one!.AsObject()))];
    }

    private static ReferenceGuide Translate(JsonObject source)
    {
        var regions = source["regions"]!.AsArray().Select(region => region!.AsObject()).ToArray();
        var document = new JsonObject
        {
            ["schema"] = GuideDocument.Schema,
            ["name"] = (string)source["title"]!,
            ["geometry"] = "planar",
            ["wavelengthUm"] = (double)source["wavelengthUm"]!,
            ["polarization"] = (string)source["polarization"]!,
            ["cover"] = new JsonObject { ["n"] = (double)source["cover"]! },
            ["regions"] = new JsonArray([.. regions.Select(Region)]),
            ["substrate"] = new JsonObject { ["n"] = (double)source["substrate"]! },
        };
        return new(
            (string)source["id"]!,
            (string)source["title"]!,
            GuideDocument.Parse(document.ToJsonString()),
            [.. regions.Select(region => (string)region["law"]! == "table" ? null : FromPython((string)region["formula"]!))],
            [.. source["expected"]!["modes"]!.AsArray().Select(mode => Mode(mode!.Deserialize<JsonElement>()))]);
    }

    private static JsonObject Region(JsonObject source) => new()
    {
        ["thicknessUm"] = source["thicknessUm"]?.DeepClone(),
        ["index"] = (string)source["law"]! switch
        {
            "parabolic" when source.ContainsKey("lengthUm") => WideParabola(source),
            "parabolic" => Copy(source, "power", "quantity", "nCenter", "nEdge", "halfWidthUm", "alpha", "centerUm"),
            "sech2" => Diffused(source, "nPeak", "widthUm"),
            "exponential" => Diffused(source, "nSurface", "depthUm"),
            "linear" => Copy(source, "linear", "quantity", "nStart", "nEnd"),
            "formula" => new() { ["law"] = "formula", ["n"] = FromPython((string)source["formula"]!) },
            "table" => Copy(source, "table", "points"),
            "uniform" => Copy(source, "uniform", "n"),
            "power" => Copy(source, "power", "quantity", "nCenter", "nEdge", "halfWidthUm", "alpha", "centerUm"),
            var law => Copy(source, law, "quantity", "nBase", "deltaN", "depthUm", "centerUm"),
        },
    };

    private static JsonObject Copy(JsonObject source, string law, params string[] fields)
    {
        var body = new JsonObject { ["law"] = law };
        foreach (var field in fields.Where(source.ContainsKey)) body[field] = source[field]!.DeepClone();
        return body;
    }

    /// <summary>The file states base and peak; the document states base and rise.</summary>
    private static JsonObject Diffused(JsonObject source, string peak, string length)
    {
        var body = Copy(source, (string)source["law"]!, "quantity", "nBase", "centerUm");
        body["deltaN"] = (double)source[peak]! - (double)source["nBase"]!;
        body["depthUm"] = (double)source[length]!;
        return body;
    }

    /// <summary>n = nCenter·√(1 − ((x − c)/L)²) falls to 0 at L, which no document may state: its edge is put at half the region's thickness.</summary>
    private static JsonObject WideParabola(JsonObject source)
    {
        var halfWidth = (double)source["thicknessUm"]! / 2;
        var share = halfWidth / (double)source["lengthUm"]!;
        var body = Copy(source, "power", "quantity", "nCenter", "centerUm");
        body["nEdge"] = (double)source["nCenter"]! * Math.Sqrt(1 - share * share);
        body["halfWidthUm"] = halfWidth;
        body["alpha"] = 2;
        return body;
    }

    private static ReferenceMode Mode(JsonElement mode) => new(
        mode.GetProperty("label").GetString()!,
        mode.GetProperty("order").GetInt32(),
        mode.GetProperty("nEff").GetDouble(),
        mode.GetProperty("nGroup").GetDouble(),
        Number(mode, "wkb1"),
        Number(mode, "wkb3"),
        mode.TryGetProperty("confinement", out var shares) ? [.. shares.EnumerateArray().Select(share => share.GetDouble())] : null,
        mode.TryGetProperty("fieldE", out var field)
            ? [.. field.EnumerateArray().Select(point => (point[0].GetDouble(), point[1].GetDouble()))]
            : null);

    private static double? Number(JsonElement mode, string name) =>
        mode.TryGetProperty(name, out var value) && value.ValueKind == JsonValueKind.Number ? value.GetDouble() : null;
}
