using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>A planar guide that passed every check at the door.</summary>
/// <param name="Name">What its maker calls it; may be empty.</param>
/// <param name="Wavelength">The vacuum wavelength it is asked at.</param>
/// <param name="Polarization">TE or TM.</param>
/// <param name="Profile">Its n²(x) at that wavelength.</param>
public sealed record Guide(string Name, Wavelength Wavelength, Polarization Polarization, IndexProfile Profile);
