using System.Collections.Immutable;
using System.Text.Json.Nodes;

namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>A material as the page offers it.</summary>
public sealed record MaterialChoice(string Name, string Title, string Note);

/// <summary>A number that a material asks for beside its name.</summary>
public sealed record MaterialExtra(string Key, string Label, string? Unit, string? Blank, double Start);

/// <summary>The catalogue of materials, put for people.</summary>
public static class MaterialList
{
    public static ImmutableArray<MaterialChoice> All { get; } = [new("fused-silica", "Fused silica", "")];

    public static IEnumerable<MaterialExtra> ExtrasOf(string? name) => [];

    /// <summary>An index object that names a material.</summary>
    public static JsonNode Start(string? name) => new JsonObject { ["material"] = name };
}
