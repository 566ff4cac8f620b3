using System.Globalization;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace GuideModes.Guides;

/// <summary>
/// A guide as people write it: the JSON guide document, immutable, whatever its faults. An edit makes a new one,
/// so that undo is a list of documents; <c>GuideReader</c> turns a document into a <see cref="Guide"/> or a list of faults.
/// </summary>
/// <remarks>
/// A path names a value the way error messages do: <c>regions[0].index.depthUm</c>. Equality is by text.
/// </remarks>
public sealed class GuideDocument : IEquatable<GuideDocument>
{
    public const string Schema = "guidemodes.guide/1";

    private static readonly JsonSerializerOptions Indented = new()
    {
        WriteIndented = true,
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    };

    private static readonly JsonSerializerOptions Compact = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    private static readonly JsonDocumentOptions Strict = new() { MaxDepth = 32, AllowDuplicateProperties = false };

    private readonly string _text;

    private GuideDocument(string text, JsonElement root)
    {
        _text = text;
        Root = root;
    }

    /// <summary>The document's JSON object.</summary>
    public JsonElement Root { get; }

    /// <exception cref="JsonException">The text is not JSON, nests deeper than 32 levels, names a field twice or holds half a surrogate pair.</exception>
    public static GuideDocument Parse(string json)
    {
        try
        {
            using var parsed = JsonDocument.Parse(json, Strict);
            DecodeAll(parsed.RootElement);
            return From(JsonNode.Parse(parsed.RootElement.GetRawText(), documentOptions: Strict));
        }
        catch (Exception broken) when (broken is InvalidOperationException or ArgumentException)
        {
            throw new JsonException("The text is not valid Unicode.", broken);
        }
    }

    /// <summary>The value at a path, or null where there is none.</summary>
    public JsonElement? this[string path]
    {
        get
        {
            var at = Root;
            foreach (var step in Steps(path))
            {
                if (step is int index)
                {
                    if (at.ValueKind != JsonValueKind.Array || index >= at.GetArrayLength()) return null;
                    at = at[index];
                }
                else if (at.ValueKind != JsonValueKind.Object || !at.TryGetProperty((string)step, out at))
                {
                    return null;
                }
            }

            return at;
        }
    }

    /// <summary>The number at a path, or null where there is none.</summary>
    public double? Number(string path) =>
        this[path] is { ValueKind: JsonValueKind.Number } value && value.TryGetDouble(out var number) ? number : null;

    /// <summary>The string at a path, or null where there is none.</summary>
    public string? Text(string path) => this[path] is { ValueKind: JsonValueKind.String } value ? value.GetString() : null;

    /// <summary>How many regions the document lists.</summary>
    public int RegionCount => this["regions"] is { ValueKind: JsonValueKind.Array } regions ? regions.GetArrayLength() : 0;

    /// <summary>The document with another value at a path; the object that holds it must exist.</summary>
    public GuideDocument With(string path, JsonNode? value) => Edit(path, (parent, step) =>
    {
        if (step is int index) parent.AsArray()[index] = value;
        else parent.AsObject()[(string)step] = value;
    });

    /// <summary>The document without the value at a path.</summary>
    public GuideDocument Without(string path) => Edit(path, (parent, step) =>
    {
        if (step is int index) parent.AsArray().RemoveAt(index);
        else parent.AsObject().Remove((string)step);
    });

    /// <summary>The document with a region put in before position <paramref name="index"/>.</summary>
    public GuideDocument WithRegionInserted(int index, JsonNode region) =>
        Edit($"regions[{index.ToString(CultureInfo.InvariantCulture)}]", (parent, _) => parent.AsArray().Insert(index, region));

    /// <summary>The document with a region moved to another place.</summary>
    public GuideDocument WithRegionMoved(int from, int to) => Edit($"regions[{from.ToString(CultureInfo.InvariantCulture)}]", (parent, _) =>
    {
        var regions = parent.AsArray();
        var region = regions[from];
        regions.RemoveAt(from);
        regions.Insert(to, region);
    });

    /// <summary>The JSON text, indented for people.</summary>
    public string ToIndentedJson() => JsonNode.Parse(_text)!.ToJsonString(Indented);

    /// <summary>The JSON text without spaces.</summary>
    public override string ToString() => _text;

    public bool Equals(GuideDocument? other) => other is not null && _text == other._text;

    public override bool Equals(object? obj) => Equals(obj as GuideDocument);

    public override int GetHashCode() => _text.GetHashCode(StringComparison.Ordinal);

    /// <summary>Decodes every string once, so that none can fail later.</summary>
    private static void DecodeAll(JsonElement element)
    {
        if (element.ValueKind == JsonValueKind.String) _ = element.GetString();
        if (element.ValueKind == JsonValueKind.Array)
        {
            foreach (var item in element.EnumerateArray()) DecodeAll(item);
        }

        if (element.ValueKind != JsonValueKind.Object) return;
        foreach (var property in element.EnumerateObject())
        {
            _ = property.Name;
            DecodeAll(property.Value);
        }
    }

    private static GuideDocument From(JsonNode? node)
    {
        var text = node?.ToJsonString(Compact) ?? "null";
        using var document = JsonDocument.Parse(text, Strict);
        return new(text, document.RootElement.Clone());
    }

    private GuideDocument Edit(string path, Action<JsonNode, object> edit)
    {
        var root = JsonNode.Parse(_text)!;
        var steps = Steps(path).ToArray();
        var parent = root;
        foreach (var step in steps[..^1])
            parent = (step is int index ? parent.AsArray()[index] : parent.AsObject()[(string)step])
                     ?? throw new ArgumentException($"There is nothing at {path}.", nameof(path));
        edit(parent, steps[^1]);
        return From(root);
    }

    private static IEnumerable<object> Steps(string path)
    {
        foreach (var part in path.Split('.', StringSplitOptions.RemoveEmptyEntries))
        {
            var bracket = part.IndexOf('[', StringComparison.Ordinal);
            if (bracket != 0) yield return bracket < 0 ? part : part[..bracket];
            while (bracket >= 0)
            {
                var close = part.IndexOf(']', bracket);
                yield return int.Parse(part.AsSpan(bracket + 1, close - bracket - 1), NumberStyles.None, CultureInfo.InvariantCulture);
                bracket = part.IndexOf('[', close);
            }
        }
    }
}
