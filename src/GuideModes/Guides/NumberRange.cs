using System.Globalization;
using System.Text.Json;

namespace GuideModes.Guides;

/// <summary>The numbers a field allows, both ends included.</summary>
/// <param name="Minimum">The least.</param>
/// <param name="Maximum">The greatest.</param>
/// <param name="Unit">Such as µm; empty for a pure number.</param>
public readonly record struct NumberRange(double Minimum, double Maximum, string Unit)
{
    /// <summary>In words: <c>a number from 0.001 to 100000 µm</c>.</summary>
    public string Description => string.Create(CultureInfo.InvariantCulture, $"a number from {Minimum} to {Maximum}{Suffix}");

    private string Suffix => Unit.Length == 0 ? "" : " " + Unit;

    public bool Contains(double value) => value >= Minimum && value <= Maximum;

    internal double? Read(JsonElement value, string path, FaultList faults)
    {
        if (Json.Number(value) is { } number && Contains(number)) return number;
        faults.Add(path, $"Expected {Description}, but found {FaultList.Shown(value)}.");
        return null;
    }
}
