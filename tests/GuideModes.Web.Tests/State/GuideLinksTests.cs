using System.Buffers.Text;
using System.IO.Compression;
using System.Text;
using GuideModes.Guides;
using GuideModes.Web.State;
using Microsoft.Extensions.Configuration;

namespace GuideModes.Web.Tests.State;

public sealed class GuideLinksTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("guidemodes-drafts-").FullName;
    private readonly DraftStore _drafts;
    private readonly GuideLinks _links;

    public GuideLinksTests()
    {
        _drafts = new(new ConfigurationBuilder().AddInMemoryCollection([new("GuideModes:DataFolder", _folder)]).Build());
        _links = new(_drafts);
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public void Query_ShortGuide_HoldsTheWholeGuide()
    {
        var document = Samples.Document(Samples.TwoRegions);

        var query = _links.Query(document)!;

        Assert.StartsWith("g=", query);
        Assert.Equal(query, "g=" + Uri.EscapeDataString(query[2..]));
        Assert.True(_links.TryRead(query[2..], null, out var back));
        Assert.Equal(document, back);
    }

    [Fact]
    public void Query_LongGuide_BecomesADraftNamedByItsContent()
    {
        var document = Long();

        var query = _links.Query(document)!;

        Assert.StartsWith("d=", query);
        Assert.Equal(query, _links.Query(Long()));
        Assert.True(_links.TryRead(null, query[2..], out var back));
        Assert.Equal(document, back);
    }

    [Theory]
    [InlineData("notbase64!!")]
    [InlineData("AAAA")]
    [InlineData("")]
    [InlineData("q1YqLkksSVWyUlBKSixOTVHSUSpLLSrOzM8DCgAA")]
    public void TryRead_Rubbish_IsNoGuide(string packed) => Assert.False(_links.TryRead(packed, null, out _));

    [Theory]
    [InlineData("../../etc/passwd")]
    [InlineData("00000000000000000000000000000000")]
    [InlineData("ZZZ")]
    public void TryRead_UnknownDraft_IsNoGuide(string id) => Assert.False(_links.TryRead(null, id, out _));

    [Theory]
    [InlineData("[1,2]")]
    [InlineData("7")]
    [InlineData("{\"a\":")]
    public void TryRead_NoGuideInside_IsNoGuide(string json) => Assert.False(_links.TryRead(Pack(Encoding.UTF8.GetBytes(json)), null, out _));

    /// <summary>A few kilobytes that unpack to a hundred megabytes are refused after the first one.</summary>
    [Fact]
    public void TryRead_Bomb_IsNoGuide() => Assert.False(_links.TryRead(Pack(new byte[100_000_000]), null, out _));

    [Fact]
    public void Save_WhereNothingCanBeWritten_SaysSo()
    {
        File.WriteAllText(Path.Combine(_folder, "blocked"), "");
        var blocked = new DraftStore(new ConfigurationBuilder().AddInMemoryCollection([new("GuideModes:DataFolder", Path.Combine(_folder, "blocked"))]).Build());

        Assert.Null(blocked.Save(Long()));
        Assert.Null(blocked.Find("00000000000000000000000000000000"));
    }

    private static GuideDocument Long()
    {
        var random = new Random(1);
        var points = string.Join(',', Enumerable.Range(0, 2000).Select(i => FormattableString.Invariant($"[{i},{1.5 + 0.1 * random.NextDouble()}]")));
        return GuideDocument.Parse($$$"""{"regions":[{"index":{"law":"table","points":[{{{points}}}]}}]}""");
    }

    private static string Pack(byte[] bytes)
    {
        using var packed = new MemoryStream();
        using (var deflate = new DeflateStream(packed, CompressionLevel.SmallestSize, leaveOpen: true)) deflate.Write(bytes);
        return Base64Url.EncodeToString(packed.ToArray());
    }
}
