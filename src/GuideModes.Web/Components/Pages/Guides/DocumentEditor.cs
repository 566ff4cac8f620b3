using System.Collections.Immutable;
using System.Text.Json.Nodes;
using GuideModes.Guides;

namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>What an entry field needs: the document, its faults by path, and the way to make the next document.</summary>
public sealed record DocumentEditor(GuideDocument Document, ImmutableArray<Fault> Faults, Action<Func<GuideDocument, GuideDocument>> Edit)
{
    /// <summary>The faults at a path, as one text; null where there is none.</summary>
    public string? FaultAt(string path) => Join(Faults.Where(fault => fault.Path == path));

    /// <summary>The faults at a path and at anything below it.</summary>
    public string? FaultWithin(string path, string? except = null) =>
        Join(Faults.Where(fault => IsWithin(fault.Path, path) && fault.Path != except));

    public void Set(string path, JsonNode? value) => Edit(document => document.With(path, value));

    public void Remove(string path) => Edit(document => document.Without(path));

    /// <summary>The element id of the field that edits a path.</summary>
    public static string IdOf(string path) => "at-" + path.Replace('.', '-').Replace("[", "-", StringComparison.Ordinal).Replace("]", "", StringComparison.Ordinal);

    /// <summary>True for the path itself and for any path below it.</summary>
    public static bool IsWithin(string path, string root) =>
        path == root || (path.StartsWith(root, StringComparison.Ordinal) && path[root.Length] is '.' or '[');

    private static string? Join(IEnumerable<Fault> faults)
    {
        var text = string.Join(" ", faults.Select(fault => fault.Message));
        return text.Length == 0 ? null : text;
    }
}
