using System.Text.Json.Nodes;
using Microsoft.AspNetCore.OpenApi;
using Microsoft.OpenApi;

namespace GuideModes.Web.Api;

/// <summary>What the interface says of itself where types cannot: the guide document, its examples, the options.</summary>
internal static class OpenApiText
{
    private const string GuideDescription =
        "A guide document, version 1 (schema guidemodes.guide/1). Lengths in µm, vacuum wavelength, real indices. "
        + "x is 0 at the cover interface and grows into the guide. An index is a number, { \"material\": name } or { \"formula\": text in lambda }. "
        + "Index laws: uniform, linear, power, gaussian, exponential, erfc, sech2, fermi, formula, table. At most 200 regions and 1 MB.";

    public static void Describe(OpenApiOptions options)
    {
        options.AddDocumentTransformer((document, _, _) =>
        {
            document.Info.Title = "GuideModes";
            document.Info.Description = "Guided modes of graded planar optical guides, from a WKB engine and a transfer-matrix engine that check each other.";
            return Task.CompletedTask;
        });
        options.AddOperationTransformer((operation, _, _) =>
        {
            if (operation.OperationId != "SolveModes") return Task.CompletedTask;
            operation.Description = "Nothing guided is an answer: 200 with modeCount 0 and a remark that says why.";
            operation.RequestBody = Body();
            foreach (var parameter in operation.Parameters ?? [])
            {
                parameter.Description = parameter.Name switch
                {
                    "fields" => "true adds the sampled field of every mode and the index profile.",
                    "xUm" => "With fields=true: where to sample, ascending, µm, parted by commas; left out, a grid of round numbers.",
                    _ => parameter.Description,
                };
            }

            return Task.CompletedTask;
        });
    }

    private static OpenApiRequestBody Body() => new()
    {
        Required = true,
        Description = GuideDescription,
        Content = new Dictionary<string, OpenApiMediaType>
        {
            ["application/json"] = new()
            {
                Schema = Schema(),
                Examples = new Dictionary<string, IOpenApiExample>
                {
                    ["gaussian"] = Example("A Gaussian guide under air", """
                        { "schema": "guidemodes.guide/1", "name": "Gaussian guide", "geometry": "planar", "wavelengthUm": 0.6328, "polarization": "TE",
                          "cover": { "n": 1.0 },
                          "regions": [ { "thicknessUm": null, "index": { "law": "gaussian", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5.0 } } ],
                          "substrate": { "n": 1.51 } }
                        """),
                    ["film"] = Example("A uniform film, TM", """
                        { "schema": "guidemodes.guide/1", "name": "Film", "geometry": "planar", "wavelengthUm": 1.55, "polarization": "TM",
                          "cover": { "n": 1.0 },
                          "regions": [ { "thicknessUm": 2.0, "index": { "law": "uniform", "n": 1.55 } } ],
                          "substrate": { "n": 1.45 } }
                        """),
                },
            },
        },
    };

    private static OpenApiExample Example(string summary, string json) => new() { Summary = summary, Value = JsonNode.Parse(json) };

    private static OpenApiSchema Schema() => new()
    {
        Type = JsonSchemaType.Object,
        Required = new HashSet<string> { "schema", "geometry", "wavelengthUm", "polarization", "cover", "regions", "substrate" },
        Properties = new Dictionary<string, IOpenApiSchema>
        {
            ["schema"] = new OpenApiSchema { Type = JsonSchemaType.String, Description = "guidemodes.guide/1" },
            ["name"] = new OpenApiSchema { Type = JsonSchemaType.String },
            ["geometry"] = new OpenApiSchema { Type = JsonSchemaType.String, Enum = [JsonValue.Create("planar")] },
            ["wavelengthUm"] = new OpenApiSchema { Type = JsonSchemaType.Number, Description = "Vacuum wavelength, µm." },
            ["polarization"] = new OpenApiSchema { Type = JsonSchemaType.String, Enum = [JsonValue.Create("TE"), JsonValue.Create("TM")] },
            ["cover"] = new OpenApiSchema { Description = "The medium at x < 0: a number, { n }, { material } or { formula }." },
            ["regions"] = new OpenApiSchema
            {
                Type = JsonSchemaType.Array,
                MaxItems = 200,
                Items = new OpenApiSchema
                {
                    Type = JsonSchemaType.Object,
                    Properties = new Dictionary<string, IOpenApiSchema>
                    {
                        ["thicknessUm"] = new OpenApiSchema { Type = JsonSchemaType.Number | JsonSchemaType.Null, Description = "µm; null for a last region that runs to infinity." },
                        ["index"] = new OpenApiSchema { Type = JsonSchemaType.Object, Description = "The index law: law and its quantities." },
                    },
                },
            },
            ["substrate"] = new OpenApiSchema { Description = "The medium beyond the last region, as cover." },
        },
    };
}
