using System.Text;
using System.Text.Json;
using GuideModes.Guides;
using Microsoft.AspNetCore.Http.HttpResults;

namespace GuideModes.Web.Api;

/// <summary>A request's body as a guide: the document and the guide it holds, or the problem to answer with.</summary>
internal sealed record GuideBody(GuideDocument? Document, Guide? Guide, ProblemHttpResult? Problem)
{
    /// <summary>1 MB, in the sense of 2²⁰ bytes.</summary>
    public const int Largest = 1024 * 1024;

    private static readonly UTF8Encoding StrictUtf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    public static async Task<GuideBody> ReadAsync(HttpRequest request)
    {
        if (!IsJson(request.ContentType))
            return Refuse("$", $"The content type is “{Shown(request.ContentType)}”; a guide document is sent as application/json.");
        if (request.ContentLength > Largest) return TooLarge;

        var bytes = new byte[Largest + 1];
        var length = await request.Body.ReadAtLeastAsync(bytes, bytes.Length, throwOnEndOfStream: false, request.HttpContext.RequestAborted);
        return length > Largest ? TooLarge : Read(bytes.AsSpan(0, length));
    }

    /// <summary>Reads a document that has already come in some other way.</summary>
    public static GuideBody Read(GuideDocument document)
    {
        var reading = GuideReader.Read(document);
        return reading.Guide is { } guide ? new(document, guide, null) : new(document, null, Problems.Faults(reading.Faults));
    }

    private static GuideBody TooLarge => new(null, null, Problems.Because(
        StatusCodes.Status413PayloadTooLarge,
        "The guide is too large",
        "A guide document may have at most 1 MB (1 048 576 bytes)."));

    private static GuideBody Read(ReadOnlySpan<byte> body)
    {
        if (body.StartsWith(Encoding.UTF8.Preamble)) body = body[Encoding.UTF8.Preamble.Length..];
        if (body.IsEmpty) return Refuse("$", "The body is empty; it should be a guide document, a JSON object.");
        try
        {
            return Read(GuideDocument.Parse(StrictUtf8.GetString(body)));
        }
        catch (JsonException e)
        {
            return Refuse("$", $"The body is not JSON that can be read, at line {(e.LineNumber ?? 0) + 1}, byte {(e.BytePositionInLine ?? 0) + 1} of it. A guide document is one JSON object, nested at most 32 deep, no name twice in an object.");
        }
        catch (ArgumentException)
        {
            return Refuse("$", "The body is not UTF-8 text, or an object in it holds a name twice.");
        }
    }

    private static bool IsJson(string? contentType)
    {
        var kind = (contentType ?? "application/json").Split(';')[0].Trim();
        return kind.Equals("application/json", StringComparison.OrdinalIgnoreCase) || kind.EndsWith("+json", StringComparison.OrdinalIgnoreCase);
    }

    private static GuideBody Refuse(string path, string sentence) => new(null, null, Problems.Faults([new(path, sentence)]));

    private static string Shown(string? text) => text is { Length: > 60 } ? text[..60] + "…" : text ?? "";
}
