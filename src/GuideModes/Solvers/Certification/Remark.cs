namespace GuideModes.Solvers.Certification;

/// <summary>The short remarks a mode can carry.</summary>
public static class Remark
{
    /// <summary>Within a tenth of a mode of being cut off: a small change of the guide or the wavelength loses it.</summary>
    public const string NearCutoff = "near-cutoff";

    /// <summary>Another mode lies so close that the two may exchange power, or trade places under a small change.</summary>
    public const string NearDegenerate = "near-degenerate";

    /// <summary>The WKB engine finds no mode of this order.</summary>
    public const string NoWkbMode = "no-wkb-mode";

    /// <summary>The exact value's bracket is wider than 1e-10.</summary>
    public const string WideBracket = "wide-bracket";
}
