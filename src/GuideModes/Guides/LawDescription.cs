using System.Collections.Immutable;
using System.Text.Json.Nodes;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>An index law as people choose it: its name, its formula and its parameters.</summary>
public sealed record LawDescription
{
    internal LawDescription(Func<LawArguments, IndexLaw> create) => Create = create;

    /// <summary>Its name in the guide document.</summary>
    public required string Name { get; init; }

    /// <summary>What people read.</summary>
    public required string Label { get; init; }

    /// <summary>Its formula, for people.</summary>
    public required string Formula { get; init; }

    /// <summary>What it is used for, in a sentence.</summary>
    public required string Summary { get; init; }

    /// <summary>In the order in which an editor shows them.</summary>
    public required ImmutableArray<LawParameter> Parameters { get; init; }

    /// <summary>True if a region to infinity may have this law.</summary>
    public bool CanRunToInfinity { get; init; }

    internal Func<LawArguments, IndexLaw> Create { get; }

    /// <summary>The <c>index</c> object of a new region with this law.</summary>
    public JsonObject NewBody()
    {
        var body = new JsonObject { ["law"] = Name };
        foreach (var parameter in Parameters) body[parameter.Name] = JsonNode.Parse(parameter.Default.GetRawText());
        return body;
    }
}
