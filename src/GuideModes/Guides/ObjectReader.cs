using System.Text.Json;

namespace GuideModes.Guides;

/// <summary>Reads the fields of one JSON object and notes a fault for each that is not as it should be.</summary>
internal sealed class ObjectReader
{
    private readonly Dictionary<string, JsonElement> _fields = [];
    private readonly FaultList _faults;

    private ObjectReader(JsonElement element, string path, FaultList faults)
    {
        Path = path;
        _faults = faults;
        foreach (var property in element.EnumerateObject()) _fields[property.Name] = property.Value;
    }

    public string Path { get; }

    /// <summary>Opens an object; anything else is a fault.</summary>
    public static ObjectReader? Open(JsonElement element, string path, string expected, FaultList faults)
    {
        if (element.ValueKind == JsonValueKind.Object) return new(element, path, faults);
        faults.Add(path, $"Expected {expected}, but found {FaultList.Shown(element)}.");
        return null;
    }

    public string At(string field)
    {
        var name = FaultList.Shortened(field);
        return Path.Length == 0 ? name : $"{Path}.{name}";
    }

    public bool Has(string field) => _fields.ContainsKey(field);

    /// <summary>A field's value; a fault if it is missing.</summary>
    public JsonElement? Find(string field, string expected)
    {
        if (_fields.TryGetValue(field, out var value)) return value;
        _faults.Add(At(field), $"This field is missing; give {expected}.");
        return null;
    }

    /// <summary>A number within a range.</summary>
    public double? Number(string field, NumberRange range) =>
        Find(field, range.Description) is { } value ? range.Read(value, At(field), _faults) : null;

    /// <summary>One of a few words.</summary>
    public string? Word(string field, params string[] allowed)
    {
        var expected = allowed.Length == 1 ? $"\"{allowed[0]}\"" : $"one of {string.Join(", ", allowed.Select(word => $"\"{word}\""))}";
        if (Find(field, expected) is not { } value) return null;
        var text = Json.Text(value);
        if (text is not null && allowed.Contains(text)) return text;
        _faults.Add(At(field), $"Expected {expected}, but found {FaultList.Shown(value)}.");
        return null;
    }

    /// <summary>A text that may be left out.</summary>
    public string OptionalText(string field, int longest)
    {
        if (!_fields.TryGetValue(field, out var value)) return "";
        var text = Json.Text(value);
        if (text is not null && text.Length <= longest) return text;
        _faults.Add(At(field), text is null
            ? $"Expected a text, but found {FaultList.Shown(value)}."
            : $"This text has {text.Length} characters; at most {longest} are allowed.");
        return "";
    }

    /// <summary>A fault for every field that is not one of the known ones.</summary>
    public void RefuseUnknown(IReadOnlyCollection<string> known)
    {
        foreach (var name in _fields.Keys.Where(name => !known.Contains(name)))
        {
            var near = known.FirstOrDefault(field => string.Equals(field, name, StringComparison.OrdinalIgnoreCase));
            var hint = near is null ? "" : $" Did you mean {near}?";
            _faults.Add(At(name), $"This field is unknown here.{hint} Known are: {string.Join(", ", known)}.");
        }
    }
}
