using System.Text.Json;

namespace GuideModes.Guides;

/// <summary>Reads the <c>regions</c> of a document.</summary>
internal sealed class RegionReader(LawReader laws, FaultList faults)
{
    public List<RegionDraft>? Read(ObjectReader fields)
    {
        if (fields.Find("regions", $"a list of 1 to {GuideLimits.MostRegions} regions") is not { } list) return null;
        if (list.ValueKind != JsonValueKind.Array || list.GetArrayLength() is < 1 or > GuideLimits.MostRegions)
        {
            var found = list.ValueKind == JsonValueKind.Array ? $"{list.GetArrayLength()}" : FaultList.Shown(list);
            faults.Add("regions", $"Expected a list of 1 to {GuideLimits.MostRegions} regions, but found {found}.");
            return null;
        }

        var count = list.GetArrayLength();
        var regions = list.EnumerateArray()
            .Select((region, i) => Region(region, $"regions[{i}]", i == count - 1))
            .OfType<RegionDraft>()
            .ToList();
        return regions.Count == count && IsWithinReach(regions) ? regions : null;
    }

    private RegionDraft? Region(JsonElement element, string path, bool isLast)
    {
        if (ObjectReader.Open(element, path, "a region { \"thicknessUm\": …, \"index\": { … } }", faults) is not { } fields) return null;
        fields.RefuseUnknown(["thicknessUm", "index"]);
        var range = GuideLimits.ThicknessUm;
        double? thickness = null;
        var given = fields.Find("thicknessUm", isLast ? $"{range.Description}, or null for a region to infinity" : range.Description);
        var isThicknessRead = given is { ValueKind: JsonValueKind.Null } && isLast;
        if (given is { ValueKind: JsonValueKind.Null } && !isLast)
            faults.Add(fields.At("thicknessUm"), $"Only the last region may run to infinity (null); give {range.Description}.");
        else if (given is { ValueKind: not JsonValueKind.Null } number)
            isThicknessRead = (thickness = range.Read(number, fields.At("thicknessUm"), faults)) is not null;

        var law = fields.Find("index", "the law of its index, such as { \"law\": \"uniform\", \"n\": 1.5 }") is { } index
            ? laws.Read(index, fields.At("index"))
            : null;
        return isThicknessRead && law is not null ? new(thickness, law) : null;
    }

    private bool IsWithinReach(List<RegionDraft> regions)
    {
        var total = regions.Sum(region => region.ThicknessUm ?? 0);
        if (total <= GuideLimits.FurthestUm) return true;
        faults.Add("regions", $"The regions are {total} µm thick together; at most {GuideLimits.FurthestUm} µm is allowed.");
        return false;
    }
}
