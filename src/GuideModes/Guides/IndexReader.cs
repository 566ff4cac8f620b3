using System.Text.Json;
using GuideModes.Numerics;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>Reads an index: a number, <c>{ "n": … }</c>, <c>{ "material": … }</c> or <c>{ "formula": … }</c> in lambda.</summary>
internal sealed class IndexReader(Wavelength? wavelength, FaultList faults)
{
    private const string Expected = "a number, { \"n\": number }, { \"material\": \"fused-silica\" } or { \"formula\": \"…\" } in lambda";

    /// <summary>An index of refraction.</summary>
    public IndexSource? Index(JsonElement value, string path) => Read(value, path, GuideLimits.Index, Expected);

    /// <summary>An index difference: a number or a formula in lambda.</summary>
    public IndexSource? Difference(JsonElement value, string path) =>
        Read(value, path, GuideLimits.IndexDifference, "a number or { \"formula\": \"…\" } in lambda");

    private IndexSource? Read(JsonElement value, string path, NumberRange range, string expected)
    {
        if (value.ValueKind == JsonValueKind.Number) return range.Read(value, path, faults) is { } number ? new ConstantIndex(number) : null;
        if (ObjectReader.Open(value, path, expected, faults) is not { } fields) return null;
        if (fields.Has("formula")) return FromFormula(fields, range);
        if (fields.Has("n")) return FromNumber(fields, range);
        faults.Add(path, $"Expected {expected}.");
        return null;
    }

    private static ConstantIndex? FromNumber(ObjectReader fields, NumberRange range)
    {
        fields.RefuseUnknown(["n"]);
        return fields.Number("n", range) is { } number ? new ConstantIndex(number) : null;
    }

    private FormulaIndex? FromFormula(ObjectReader fields, NumberRange range)
    {
        fields.RefuseUnknown(["formula"]);
        var path = fields.At("formula");
        if (FormulaReader.Read(fields.Find("formula", "a formula")!.Value, path, null, faults) is not { } formula) return null;
        if (wavelength is not { } at) return null;
        var index = formula.Value(0, at.Micrometres);
        if (range.Contains(index)) return new(formula);
        faults.Add(path, $"The formula gives {index} at {at.Micrometres} µm; {range.Description} is allowed.");
        return null;
    }
}

/// <summary>Reads a formula.</summary>
internal static class FormulaReader
{
    public static Formula? Read(JsonElement value, string path, string? coordinate, FaultList faults)
    {
        if (Json.Text(value) is not { } text)
        {
            faults.Add(path, $"Expected a formula as text, but found {FaultList.Shown(value)}.");
            return null;
        }

        try
        {
            return Formula.Parse(text, coordinate);
        }
        catch (FormulaException fault)
        {
            faults.Add(path, fault.Message);
            return null;
        }
    }
}
