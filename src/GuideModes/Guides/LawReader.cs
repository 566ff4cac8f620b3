using System.Collections.Immutable;
using System.Text.Json;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>Reads a region's <c>index</c> object by the catalogue.</summary>
internal sealed class LawReader(IndexReader indices, FormulaReader formulas, FaultList faults)
{
    private static readonly string[] Names = [.. LawCatalogue.Laws.Select(law => law.Name)];

    public IndexLaw? Read(JsonElement element, string path)
    {
        if (ObjectReader.Open(element, path, "an object with a law, such as { \"law\": \"uniform\", \"n\": 1.5 }", faults) is not { } fields) return null;
        if (fields.Word("law", Names) is not { } name) return null;
        var law = LawCatalogue.Find(name)!;
        fields.RefuseUnknown(["law", .. law.Parameters.Select(parameter => parameter.Name)]);
        return Arguments(law, fields) is { } arguments ? law.Create(arguments) : null;
    }

    private LawArguments? Arguments(LawDescription law, ObjectReader fields)
    {
        var values = new Dictionary<string, object>();
        foreach (var parameter in law.Parameters)
        {
            if (Argument(parameter, fields) is { } value) values.Add(parameter.Name, value);
        }

        return values.Count == law.Parameters.Length ? new(values) : null;
    }

    private object? Argument(LawParameter parameter, ObjectReader fields)
    {
        if (!parameter.IsRequired && !fields.Has(parameter.Name)) return Value(parameter, parameter.Default, "");
        return fields.Find(parameter.Name, parameter.Expected) is { } given ? Value(parameter, given, fields.At(parameter.Name)) : null;
    }

    private object? Value(LawParameter parameter, JsonElement given, string path) => parameter.Kind switch
    {
        LawParameterKind.Index => indices.Index(given, path),
        LawParameterKind.IndexDifference => indices.Difference(given, path),
        LawParameterKind.Formula => formulas.Read(given, path, "x"),
        LawParameterKind.Points => Points(given, path),
        LawParameterKind.Choice => Choice(parameter, given, path),
        _ => parameter.Range.Read(given, path, faults),
    };

    private string? Choice(LawParameter parameter, JsonElement given, string path)
    {
        if (Json.Text(given) is { } word && parameter.Choices.Contains(word)) return word;
        faults.Add(path, $"Expected {parameter.Expected}, but found {FaultList.Shown(given)}.");
        return null;
    }

    private ImmutableArray<TablePoint>? Points(JsonElement given, string path)
    {
        if (given.ValueKind != JsonValueKind.Array || given.GetArrayLength() is < 2 or > GuideLimits.MostTablePoints)
        {
            faults.Add(path, $"Expected 2 to {GuideLimits.MostTablePoints} points [x in µm, n], but found {Counted(given)}.");
            return null;
        }

        var points = given.EnumerateArray().Select((point, i) => Point(point, $"{path}[{i}]")).ToArray();
        if (points.Any(point => point is null)) return null;
        for (var i = 1; i < points.Length; i++)
        {
            if (points[i]!.Value.XUm - points[i - 1]!.Value.XUm >= GuideLimits.LeastPointDistanceUm) continue;
            faults.Add($"{path}[{i}]", $"Coordinates must ascend by at least {GuideLimits.LeastPointDistanceUm} µm, but {points[i]!.Value.XUm} follows {points[i - 1]!.Value.XUm} µm.");
            return null;
        }

        return ImmutableArray.CreateRange(points.Select(point => point!.Value));
    }

    private TablePoint? Point(JsonElement point, string path)
    {
        if (point.ValueKind != JsonValueKind.Array || point.GetArrayLength() != 2)
        {
            faults.Add(path, $"Expected a point [x in µm, n], but found {Counted(point)}.");
            return null;
        }

        var x = GuideLimits.CoordinateUm.Read(point[0], $"{path}[0]", faults);
        var n = GuideLimits.Index.Read(point[1], $"{path}[1]", faults);
        return x is { } coordinate && n is { } index ? new(coordinate, index) : null;
    }

    private static string Counted(JsonElement value) =>
        value.ValueKind == JsonValueKind.Array ? $"a list of {value.GetArrayLength()}" : FaultList.Shown(value);
}
