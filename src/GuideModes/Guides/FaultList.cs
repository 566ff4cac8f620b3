using System.Collections.Immutable;
using System.Globalization;
using System.Text.Json;

namespace GuideModes.Guides;

/// <summary>The faults met while reading a document; a hostile one cannot make the list grow beyond <see cref="Most"/>.</summary>
internal sealed class FaultList
{
    public const int Most = 200;

    private readonly List<Fault> _faults = [];

    public bool IsEmpty => _faults.Count == 0;

    public void Add(string path, FormattableString message) => Add(path, message.ToString(CultureInfo.InvariantCulture));

    public void Add(string path, string message)
    {
        if (_faults.Count < Most) _faults.Add(new(path.Length == 0 ? "$" : path, message));
        else if (_faults.Count == Most) _faults.Add(new("$", $"There are more faults than these; the first {Most} are listed."));
    }

    public ImmutableArray<Fault> ToImmutable() => [.. _faults];

    /// <summary>A JSON value as an error message shows it.</summary>
    public static string Shown(JsonElement value) => value.ValueKind switch
    {
        JsonValueKind.Object => "an object",
        JsonValueKind.Array => "a list",
        _ => Shortened(value.GetRawText()),
    };

    public static string Shortened(string text) => text.Length <= 60 ? text : text[..60] + "…";
}
