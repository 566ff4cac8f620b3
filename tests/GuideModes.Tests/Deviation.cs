using System.Globalization;

namespace GuideModes.Tests;

/// <summary>The one comparison with a published value: asserts the tolerance, prints the deviation reached, and can write it down.</summary>
/// <remarks>
/// When the environment variable <c>GUIDEMODES_WRITE_VALIDATION</c> names a file, every comparison of the run is added
/// to it as one row of a Markdown table; <c>docs/validation.md</c> says how the page is made from it.
/// </remarks>
internal static class Deviation
{
    private const string Variable = "GUIDEMODES_WRITE_VALIDATION";

    private static readonly Lock Gate = new();

    /// <summary>Compares a computed number with a published one.</summary>
    /// <param name="check">What is compared, such as <c>slab b, V=6, a=10, m=1</c>.</param>
    /// <param name="source">Who published it: author, year, place.</param>
    /// <param name="expected">The published value.</param>
    /// <param name="got">The computed one.</param>
    /// <param name="tolerance">The largest absolute deviation allowed.</param>
    /// <param name="unit">The unit of both; empty for a pure number.</param>
    public static void Record(string check, string source, double expected, double got, double tolerance, string unit = "")
    {
        Write(Environment.GetEnvironmentVariable(Variable), Row(check, source, expected, got, tolerance, unit));
        Judge(check, source, expected, got, tolerance, unit);
    }

    /// <summary>Asserts that the deviation, which no NaN passes, is within the tolerance.</summary>
    internal static void Judge(string check, string source, double expected, double got, double tolerance, string unit) =>
        Assert.True(
            Math.Abs(got - expected) <= tolerance,
            string.Create(CultureInfo.InvariantCulture, $"{check} ({source}): expected {expected:R}, got {got:R}{Unit(unit)}, off by {got - expected:E2}, allowed {tolerance:E2}"));

    internal static string Row(string check, string source, double expected, double got, double tolerance, string unit) =>
        string.Create(CultureInfo.InvariantCulture, $"| {Cell(check)} | {Cell(source)} | {expected:R}{Unit(unit)} | {Math.Abs(got - expected):0.0e-00} | {tolerance:0.0e-00} |");

    private static string Unit(string unit) => unit.Length == 0 ? "" : " " + unit;

    private static string Cell(string text) => text.Replace("|", "\\|", StringComparison.Ordinal);

    internal static void Write(string? path, string row)
    {
        if (string.IsNullOrEmpty(path)) return;
        lock (Gate) File.AppendAllText(path, row + "\n");
    }
}
