using System.Text.Json.Nodes;
using GuideModes.Guides;

namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>What stands on the page before anyone has typed: one uniform film, so that nobody starts from nothing.</summary>
public static class NewGuide
{
    public static GuideDocument Document { get; } = GuideDocument.Parse(
        """
        {
          "schema": "guidemodes.guide/1",
          "name": "New guide",
          "geometry": "planar",
          "wavelengthUm": 0.6328,
          "polarization": "TE",
          "cover": { "n": 1.0 },
          "regions": [ { "thicknessUm": 2.0, "index": { "law": "uniform", "n": 1.53 } } ],
          "substrate": { "n": 1.51 }
        }
        """);

    public static JsonNode Region() => JsonNode.Parse("""{ "thicknessUm": 1.0, "index": { "law": "uniform", "n": 1.52 } }""")!;
}
