using System.Buffers.Text;
using System.Diagnostics.CodeAnalysis;
using System.IO.Compression;
using System.Text;
using System.Text.Json;
using GuideModes.Guides;

namespace GuideModes.Web.State;

/// <summary>A guide as the query of a link: <c>g=</c> the guide itself, deflated; <c>d=</c> the name of a saved draft.</summary>
public sealed class GuideLinks(DraftStore drafts)
{
    /// <summary>A longer <c>g</c> becomes a draft: browsers and servers differ in what they carry beyond this.</summary>
    public const int LongestInline = 6000;

    /// <summary>No link unpacks to more than this many bytes.</summary>
    public const int LargestGuide = 1024 * 1024;

    /// <summary>The query that names a guide, such as <c>g=…</c>; null where it is too long and no draft can be kept.</summary>
    public string? Query(GuideDocument document)
    {
        var packed = Pack(document);
        if (packed.Length <= LongestInline) return "g=" + packed;
        return drafts.Save(document) is { } id ? "d=" + id : null;
    }

    /// <summary>The guide that a link's <c>g</c> or <c>d</c> names.</summary>
    public bool TryRead(string? g, string? d, [NotNullWhen(true)] out GuideDocument? document)
    {
        document = g is { Length: > 0 } ? Unpack(g) : d is { Length: > 0 } ? drafts.Find(d) : null;
        return document is not null;
    }

    public static string Pack(GuideDocument document)
    {
        using var packed = new MemoryStream();
        using (var deflate = new DeflateStream(packed, CompressionLevel.SmallestSize, leaveOpen: true))
            deflate.Write(Encoding.UTF8.GetBytes(document.ToString()));
        return Base64Url.EncodeToString(packed.GetBuffer().AsSpan(0, (int)packed.Length));
    }

    private static GuideDocument? Unpack(string packed)
    {
        try
        {
            using var deflate = new DeflateStream(new MemoryStream(Base64Url.DecodeFromChars(packed)), CompressionMode.Decompress);
            var bytes = new byte[LargestGuide + 1];
            var length = deflate.ReadAtLeast(bytes, bytes.Length, throwOnEndOfStream: false);
            if (length > LargestGuide) return null;
            var document = GuideDocument.Parse(Encoding.UTF8.GetString(bytes, 0, length));
            return document.Root.ValueKind == JsonValueKind.Object ? document : null;
        }
        catch (Exception e) when (e is FormatException or InvalidDataException or JsonException or ArgumentException)
        {
            return null;
        }
    }
}
