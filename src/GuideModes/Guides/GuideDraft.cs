using System.Collections.Immutable;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>A guide whose fields are all well-formed; whether they make a guide together is still to be seen.</summary>
internal sealed record GuideDraft(
    string Name,
    Wavelength Wavelength,
    Polarization Polarization,
    IndexSource Cover,
    ImmutableArray<RegionDraft> Regions,
    IndexSource Substrate);

/// <summary>A region as stated: no thickness means that it runs to infinity.</summary>
internal sealed record RegionDraft(double? ThicknessUm, IndexLaw Law);
