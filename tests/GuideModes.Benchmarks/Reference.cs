using System.Text.Json;
using GuideModes.Guides;

namespace GuideModes.Benchmarks;

/// <summary>The guides that are timed, and the effective indices the timed answers must have.</summary>
internal static class Reference
{
    /// <summary>The text of one of the guide documents in <c>Guides/</c>.</summary>
    public static string Document(string name)
    {
        using var reader = new StreamReader(Open(name));
        return reader.ReadToEnd();
    }

    /// <exception cref="InvalidOperationException">The document is not a guide.</exception>
    public static Guide Guide(string name)
    {
        var reading = GuideReader.Read(GuideDocument.Parse(Document(name)));
        return reading.Guide ?? throw new InvalidOperationException($"{name}: {string.Join("; ", reading.Faults)}");
    }

    /// <summary>The reference n_eff of a case of <c>tests/GuideModes.Tests/ReferenceData/modes.json</c>, by decreasing n_eff.</summary>
    public static double[] EffectiveIndices(string caseId)
    {
        using var stream = Open("reference-modes");
        using var file = JsonDocument.Parse(stream);
        var found = file.RootElement.GetProperty("cases").EnumerateArray().Single(c => c.GetProperty("id").GetString() == caseId);
        return [.. found.GetProperty("expected").GetProperty("modes").EnumerateArray().Select(m => m.GetProperty("nEff").GetDouble())];
    }

    private static Stream Open(string name) =>
        typeof(Reference).Assembly.GetManifestResourceStream(name)
        ?? throw new InvalidOperationException($"The resource {name} is missing.");
}
