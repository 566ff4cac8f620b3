namespace GuideModes.Profiles;

/// <summary>How the index runs through a region: a named law with its parameters, immutable, valid at any wavelength.</summary>
/// <remarks>Coordinates are global: x = 0 is the cover interface whatever regions come before.</remarks>
public abstract record IndexLaw
{
    /// <summary>No region reaches further than this from the cover, µm; for a formula it stands for infinity.</summary>
    public const double FurthestUm = 1e5;

    /// <summary>n² over a stretch of positive length, as contiguous smooth pieces from left to right.</summary>
    public abstract IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength);

    /// <summary>The index that the law tends to far out in the guide; null if it tends to none, or never says so.</summary>
    public virtual double? Limit(Wavelength wavelength) => null;

    /// <summary>
    /// The coordinate, not before <paramref name="start"/>, from which on n² can no longer be told from the limit's
    /// (|n² − n²_limit| ≤ 4·10⁻¹⁶ n²); null if that lies beyond <paramref name="furthest"/>.
    /// </summary>
    public virtual double? SettlesAt(double start, double furthest, Wavelength wavelength) => null;

    /// <summary>What keeps the law from filling a stretch: the parameter at fault and a sentence; null if nothing does.</summary>
    public virtual Fault? Misfit(Interval extent, bool isUnbounded, Wavelength wavelength) => null;

    /// <summary>How many formula nodes each piece of the law compiles; 0 for a law without formula.</summary>
    internal virtual int FormulaSize => 0;

    /// <summary>Coordinates at which a check of the law on this stretch should look, beside an even sampling.</summary>
    internal virtual IEnumerable<double> Landmarks(Interval extent) => [];
}
