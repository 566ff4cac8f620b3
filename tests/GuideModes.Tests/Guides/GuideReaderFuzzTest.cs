using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using GuideModes.Guides;
using GuideModes.Tests.ReferenceData;

namespace GuideModes.Tests.Guides;

/// <summary>Damaged documents, seeded: the reader answers with a guide or with faults, never with an exception.</summary>
public sealed class GuideReaderFuzzTest
{
    private const int Count = 20_000;

    private static readonly TimeSpan Limit = TimeSpan.FromMilliseconds(100);

    private static readonly string[] Values =
    [
        "null", "true", "0", "-1", "1", "1.5", "2", "1e-320", "1e400", "-1e400", "1e5", "99999", "0.001", "12345678901234567890", "\"\"", "\"n2\"", "\"TM\"", "\"formula\"",
        "[]", "[[]]", "{}", "{\"n\":1.5}", "{\"n\":{\"n\":1.5}}", "{\"material\":\"fused-silica\"}", "{\"material\":\"fused-silica\",\"molePercentGeO2\":3.1}",
        "{\"formula\":\"1.45+0.01/lambda^2\"}", "{\"formula\":\"1/0\"}", "{\"law\":\"uniform\",\"n\":1.5}", "{\"law\":\"formula\",\"n\":\"1.5+0.1*abs(sin(x))\"}",
        "{\"law\":\"formula\",\"n\":\"1.5+1/x\"}", "[[0,1.5],[2,1.52],[9,1.5]]", "\"1.5+0.1*exp(-x)\"", "\"\\ud800\"", "\"\\u0000\"", "{\"\\udfff\":1}",
        "{\"law\":\"\\ud800\"}", "\"monotone-cubic\"", "1.51", "1.6", "0.5",
    ];

    [Fact]
    public void Read_OfMutatedDocuments_NeverThrowsOrHangs()
    {
        var seeds = Seeds();
        var random = new Random(20240612);
        var (guides, slowest, slowestText) = (0, TimeSpan.Zero, "");
        foreach (var seed in seeds) GuideReader.Read(GuideDocument.Parse(seed));
        for (var i = 0; i < Count; i++)
        {
            var text = Mutated(random, seeds[i % seeds.Length]);
            GuideReading? reading = null;
            var time = Timing.Of(() => reading = Parse(text) is { } document ? GuideReader.Read(document) : null, Limit);
            if (time > slowest) (slowest, slowestText) = (time, text);
            if (reading is null) continue;
            Assert.True(reading.Guide is null != reading.Faults.IsEmpty, text);
            Assert.All(reading.Faults, fault => Assert.True(fault.Path.Length > 0 && fault.Message.EndsWith('.'), fault.ToString()));
            if (reading.Guide is not null) guides++;
        }

        Assert.InRange(guides, Count / 20, Count);
        Assert.True(slowest < Limit, $"slowest {slowest.TotalMilliseconds} ms: {slowestText}");
    }

    /// <summary>Text damaged byte by byte is either no JSON, which the parser says, or a document the reader answers.</summary>
    [Fact]
    public void Parse_OfDamagedText_IsRefusedOrRead()
    {
        var seeds = Seeds();
        var random = new Random(5);
        var refused = 0;
        for (var i = 0; i < Count; i++)
        {
            var text = new StringBuilder(seeds[i % seeds.Length]);
            for (var k = random.Next(1, 4); k > 0; k--) text[random.Next(text.Length)] = (char)random.Next(random.Next(3) == 0 ? 65536 : 127);
            try
            {
                GuideReader.Read(GuideDocument.Parse(text.ToString()));
            }
            catch (JsonException)
            {
                refused++;
            }
        }

        Assert.InRange(refused, Count / 4, Count - 1);
    }

    /// <summary>Null for half a surrogate pair, the one thing here that no document can hold.</summary>
    private static GuideDocument? Parse(string text)
    {
        try
        {
            return GuideDocument.Parse(text);
        }
        catch (JsonException) when (text.Contains("\\ud", StringComparison.Ordinal))
        {
            return null;
        }
    }

    private static string[] Seeds() =>
    [
        .. ReferenceGuides.All.Select(guide => guide.Document.ToString()),
        .. LawCatalogue.Laws.Select(law => ReferenceGuides.Find("s01").Document.With("regions[0].index", law.NewBody()).ToString()),
    ];

    private static string Mutated(Random random, string seed)
    {
        var root = JsonNode.Parse(seed)!;
        for (var k = random.Next(1, 3); k > 0; k--) Mutate(random, root);
        return root.ToJsonString().Replace("\"@", "", StringComparison.Ordinal).Replace("@\"", "", StringComparison.Ordinal).Replace("\\u0022", "\"", StringComparison.Ordinal).Replace("\\\\", "\\", StringComparison.Ordinal);
    }

    /// <summary>Puts a value in the place of a random node, takes the node away, or doubles it; raw JSON is carried as text between @ signs.</summary>
    private static void Mutate(Random random, JsonNode root)
    {
        var parents = Descendants(root).Where(node => node is JsonObject { Count: > 0 } or JsonArray { Count: > 0 }).ToArray();
        if (parents.Length == 0) return;
        var parent = parents[random.Next(parents.Length)];
        var value = JsonValue.Create("@" + Values[random.Next(Values.Length)] + "@");
        if (parent is JsonArray array)
        {
            var at = random.Next(array.Count);
            if (random.Next(4) == 0) array.RemoveAt(at);
            else if (random.Next(3) == 0) array.Add(array[at]?.DeepClone());
            else array[at] = value;
            return;
        }

        var fields = parent.AsObject();
        var name = fields.ElementAt(random.Next(fields.Count)).Key;
        if (random.Next(6) == 0) fields.Remove(name);
        else if (random.Next(6) == 0) fields[name.ToUpperInvariant()] = value;
        else fields[name] = value;
    }

    private static IEnumerable<JsonNode> Descendants(JsonNode node) => node switch
    {
        JsonObject fields => fields.Select(field => field.Value).OfType<JsonNode>().SelectMany(Descendants).Prepend(node),
        JsonArray items => items.OfType<JsonNode>().SelectMany(Descendants).Prepend(node),
        _ => [node],
    };
}
