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

        var formulas = new FormulaReader(faults);
        var indices = new IndexReader(wavelength, formulas, faults);
        var cover = EndMedium(fields, "cover", indices);
        var regions = new RegionReader(new(indices, formulas, faults), faults).Read(fields);
        var substrate = EndMedium(fields, "substrate", indices);
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

    private static IndexSource? EndMedium(ObjectReader fields, string field, IndexReader indices) =>
        fields.Find(field, "the medium, such as { \"n\": 1.0 }") is { } value ? indices.Index(value, field) : null;
}
