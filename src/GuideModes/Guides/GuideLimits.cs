using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>The ranges a guide document is held to.</summary>
public static class GuideLimits
{
    /// <summary>From the extreme ultraviolet to the far infrared.</summary>
    public static NumberRange WavelengthUm { get; } = new(0.05, 1000, "µm");

    /// <summary>Real and dimensionless; vacuum is the least.</summary>
    public static NumberRange Index { get; } = new(1, 10, "");

    public static NumberRange IndexDifference { get; } = new(-9, 9, "");

    /// <summary>A region may have no thickness: it is then skipped, but keeps its place in the power shares.</summary>
    public static NumberRange ThicknessUm { get; } = new(0, FurthestUm, "µm");

    /// <summary>A depth, half-width or edge.</summary>
    public static NumberRange LengthUm { get; } = new(0.001, FurthestUm, "µm");

    public static NumberRange CoordinateUm { get; } = new(-FurthestUm, FurthestUm, "µm");

    public static NumberRange Alpha { get; } = new(0.5, 1000, "");

    /// <summary>No guide reaches further than this from the cover, µm: ten centimetres.</summary>
    public const double FurthestUm = IndexLaw.FurthestUm;

    public const int MostRegions = 200;

    public const int MostTablePoints = 5000;

    /// <summary>Two points of a table may not stand closer than this, µm: a step is two regions.</summary>
    public const double LeastPointDistanceUm = 1e-6;

    /// <summary>The most smooth pieces in one guide.</summary>
    public const int MostPieces = 10_000;

    /// <summary>Numbers, names and operators in all formulas of a guide together.</summary>
    public const int MostFormulaNodes = 5000;

    /// <summary>The same, each formula counted once for every piece that its joints (abs, min, max, roots) cut its region into.</summary>
    public const int MostCompiledNodes = 2 * FormulaLaw.MaximumCompiledSize;

    public const int LongestName = 200;

    public const int LongestNotes = 10_000;

    /// <summary>How far the index of a region to infinity may end from the substrate's.</summary>
    public const double SubstrateTolerance = 1e-12;
}
