using System.Globalization;
using System.Text.Json.Nodes;

namespace GuideModes.Tests.Published;

/// <summary>The numbers of <c>worked_examples.json</c>; how the file was made is told in README.md beside it.</summary>
internal static class WorkedExamples
{
    private static readonly Lazy<JsonNode> Loaded = new(() =>
        JsonNode.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "ReferenceData", "worked_examples.json")))!);

    public static JsonNode Root => Loaded.Value;

    /// <summary>A list of numbers under closed_form_profiles.</summary>
    public static double[] ClosedForm(string name) => Numbers(Root["closed_form_profiles"]![name]!);

    public static double[] Numbers(JsonNode list) => [.. list.AsArray().Select(item => Number(item!))];

    /// <summary>The file keeps long numbers as text.</summary>
    public static double Number(JsonNode node) =>
        node.GetValueKind() == System.Text.Json.JsonValueKind.String
            ? double.Parse((string)node!, CultureInfo.InvariantCulture)
            : (double)node;

    /// <summary>The number of decimals as written, as a bound on what the last one hides.</summary>
    public static double HalfLastDigit(JsonNode node)
    {
        var text = node.ToString();
        var point = text.IndexOf('.', StringComparison.Ordinal);
        return point < 0 ? 0.5 : 0.5 * Math.Pow(10, -(text.Length - point - 1));
    }

    /// <summary>Records every b of a guide; the count must agree as well.</summary>
    public static void Compare(string check, string source, IReadOnlyList<double> expected, IReadOnlyList<double> got, double tolerance)
    {
        Assert.Equal(expected.Count, got.Count);
        for (var m = 0; m < expected.Count; m++) Deviation.Record($"{check}, b of m={m}", source, expected[m], got[m], tolerance);
    }
}
