namespace GuideModes;

/// <summary>Which of the two uncoupled planar problems is solved.</summary>
public enum Polarization
{
    /// <summary>Transverse electric: E along the layers; E and its slope are continuous.</summary>
    TE,

    /// <summary>Transverse magnetic: H along the layers; H and H′/n² are continuous.</summary>
    TM,
}
