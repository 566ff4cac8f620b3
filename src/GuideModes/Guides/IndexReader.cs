using System.Text.Json;
using GuideModes.Materials;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>Reads an index: a number, <c>{ "n": … }</c>, <c>{ "material": … }</c> or <c>{ "formula": … }</c> in lambda.</summary>
internal sealed class IndexReader(Wavelength? wavelength, FormulaReader formulas, FaultList faults)
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
        if (fields.Has("material") && range == GuideLimits.Index) return FromMaterial(fields);
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

    private MaterialIndex? FromMaterial(ObjectReader fields)
    {
        var path = fields.At("material");
        var id = Json.Text(fields.Find("material", "a material's name")!.Value);
        if (id is null || MaterialCatalogue.Find(id) is not { } material)
        {
            faults.Add(path, $"This material is unknown; known are: {string.Join(", ", MaterialCatalogue.All)}.");
            return null;
        }

        if (material.Variable is not { } variable)
        {
            fields.RefuseUnknown(["material"]);
            return InRange(new(material, null), path);
        }

        fields.RefuseUnknown(["material", variable.Name]);
        if (!fields.Has(variable.Name)) return InRange(new(material, variable.Default), path);
        var range = new NumberRange(variable.Minimum, variable.Maximum, variable.Unit);
        return fields.Number(variable.Name, range) is { } value ? InRange(new(material, value), path) : null;
    }

    private MaterialIndex? InRange(MaterialIndex index, string path)
    {
        var range = index.Material.RangeAt(index.Variable);
        if (wavelength is not { } at || range.Contains(at)) return index;
        faults.Add(path, $"{index.Material.Name} is known from {range}, but the wavelength is {at.Micrometres} µm.");
        return null;
    }

    private FormulaIndex? FromFormula(ObjectReader fields, NumberRange range)
    {
        fields.RefuseUnknown(["formula"]);
        var path = fields.At("formula");
        if (formulas.Read(fields.Find("formula", "a formula")!.Value, path, null) is not { } formula) return null;
        if (wavelength is not { } at) return null;
        var index = formula.Jet(0, at.Micrometres).Value;
        if (range.Contains(index)) return new(formula);
        faults.Add(path, $"The formula gives {index} at {at.Micrometres} µm; {range.Description} is allowed.");
        return null;
    }
}
