using System.Text.Json;

namespace GuideModes.Guides;

/// <summary>Looking into JSON without exceptions.</summary>
internal static class Json
{
    /// <summary>The text of a string value; null if it is none.</summary>
    public static string? Text(JsonElement value) => value.ValueKind == JsonValueKind.String ? value.GetString() : null;

    /// <summary>A number, finite; null for anything else, 1e400 included.</summary>
    public static double? Number(JsonElement value) =>
        value.ValueKind == JsonValueKind.Number && value.TryGetDouble(out var number) && double.IsFinite(number) ? number : null;

    /// <summary>A JSON text known to be well-formed, as an element of its own.</summary>
    public static JsonElement Parse(string json)
    {
        using var document = JsonDocument.Parse(json);
        return document.RootElement.Clone();
    }
}
