using System.Collections.Immutable;
using System.Text.Json;
using GuideModes.Guides;
using GuideModes.Web.State;

namespace GuideModes.Web.Components.Pages.Gallery;

/// <summary>An invented guide to start from.</summary>
/// <param name="Document">The guide; its notes say what it is.</param>
/// <param name="Query">The guide as a link's query.</param>
/// <param name="Picture">Its index profile as an SVG path over 240 × 84 units.</param>
public sealed record ExampleGuide(GuideDocument Document, string Query, string Picture)
{
    public string Name => Document.Text("name") ?? "";

    public string Notes => Document.Text("notes") ?? "";
}

/// <summary>The example guides, all invented, in the order of their file names.</summary>
public static class ExampleGuides
{
    private const string Folder = "Examples/";

    public static ImmutableArray<ExampleGuide> All { get; } =
    [
        .. typeof(ExampleGuides).Assembly.GetManifestResourceNames()
            .Where(name => name.StartsWith(Folder, StringComparison.Ordinal))
            .Order(StringComparer.Ordinal)
            .Select(Read),
    ];

    private static ExampleGuide Read(string resource)
    {
        using var reader = new StreamReader(typeof(ExampleGuides).Assembly.GetManifestResourceStream(resource)!);
        var document = GuideDocument.Parse(reader.ReadToEnd());
        var guide = GuideReader.Read(document).Guide ?? throw new JsonException($"The example {resource} is no guide.");
        return new(document, "g=" + GuideLinks.Pack(document), ProfilePicture.Of(guide.Profile));
    }
}
