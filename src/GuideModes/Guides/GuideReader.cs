using System.Collections.Immutable;
using System.Text.Json;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>What came of reading a document: a guide, or the faults that keep it from being one.</summary>
public sealed record GuideReading(Guide? Guide, ImmutableArray<Fault> Faults);

/// <summary>The door: turns a guide document into a <see cref="Guide"/>, or says per field why it cannot be one.</summary>
/// <remarks>
/// Every field is looked at before any is complained of, and the ranges are those of <see cref="GuideLimits"/> and
/// <see cref="LawCatalogue"/>. When all fields are well, the profile is laid out and its index sampled; what is wrong only then
/// (an index below 1 somewhere, a tail that misses the substrate) is a fault of its region.
/// </remarks>
public static class GuideReader
{
    private static readonly string[] Known =
        ["schema", "name", "notes", "geometry", "wavelengthUm", "polarization", "cover", "regions", "substrate"];

    /// <summary>Reads a document; never throws for what stands in it.</summary>
    public static GuideReading Read(GuideDocument document)
    {
        ArgumentNullException.ThrowIfNull(document);
        var faults = new FaultList();
        var guide = Draft(document.Root, faults) is { } draft && faults.IsEmpty ? Build(draft, faults) : null;
        return new(guide, faults.ToImmutable());
    }

    private static Guide? Build(GuideDraft draft, FaultList faults) =>
        new ProfileBuilder(draft, faults).Build() is { } profile ? new(draft.Name, draft.Wavelength, draft.Polarization, profile) : null;

    private static GuideDraft? Draft(JsonElement root, FaultList faults)
    {
        if (ObjectReader.Open(root, "", "a guide document, a JSON object", faults) is not { } fields) return null;
        fields.Word("schema", GuideDocument.Schema);
        if (!IsPlanar(fields, faults)) return null;
        fields.RefuseUnknown(Known);
        fields.OptionalText("notes", GuideLimits.LongestNotes);
        var name = fields.OptionalText("name", GuideLimits.LongestName);
        var polarization = fields.Word("polarization", "TE", "TM") == "TM" ? Polarization.TM : Polarization.TE;
        Wavelength? wavelength = fields.Number("wavelengthUm", GuideLimits.WavelengthUm) is { } um ? Wavelength.FromMicrometres(um) : null;

        var cover = EndMedium(fields, "cover", wavelength, faults);
        var regions = Regions(fields, wavelength, faults);
        var substrate = EndMedium(fields, "substrate", wavelength, faults);
        return wavelength is { } known && cover is not null && substrate is not null && regions is not null
            ? new(name, known, polarization, cover, [.. regions], substrate)
            : null;
    }

    private static bool IsPlanar(ObjectReader fields, FaultList faults)
    {
        var geometry = fields.Word("geometry", "planar", "fiber", "channel");
        if (geometry is "fiber" or "channel") faults.Add("geometry", $"Geometry \"{geometry}\" is not available yet; only \"planar\" is available so far.");
        return geometry is not ("fiber" or "channel");
    }

    private static IndexSource? EndMedium(ObjectReader fields, string field, Wavelength? wavelength, FaultList faults) =>
        fields.Find(field, "the medium, such as { \"n\": 1.0 }") is { } value ? new IndexReader(wavelength, faults).Index(value, field) : null;

    private static List<RegionDraft>? Regions(ObjectReader fields, Wavelength? wavelength, FaultList faults)
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
            .Select((region, i) => Region(region, $"regions[{i}]", i == count - 1, wavelength, faults))
            .OfType<RegionDraft>()
            .ToList();
        return regions.Count == count && IsWithinReach(regions, faults) ? regions : null;
    }

    private static RegionDraft? Region(JsonElement element, string path, bool isLast, Wavelength? wavelength, FaultList faults)
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
            ? new LawReader(wavelength, faults).Read(index, fields.At("index"))
            : null;
        return isThicknessRead && law is not null ? new(thickness, law) : null;
    }

    private static bool IsWithinReach(List<RegionDraft> regions, FaultList faults)
    {
        var total = regions.Sum(region => region.ThicknessUm ?? 0);
        if (total <= GuideLimits.FurthestUm) return true;
        faults.Add("regions", $"The regions are {total} µm thick together; at most {GuideLimits.FurthestUm} µm is allowed.");
        return false;
    }
}
