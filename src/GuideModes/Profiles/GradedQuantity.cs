using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>What a law's shape grades.</summary>
public enum GradedQuantity
{
    /// <summary>The index n.</summary>
    Index,

    /// <summary>Its square, the relative permittivity n²: base and peak are squared first, then the shape runs between the squares.</summary>
    IndexSquared,
}

internal static class GradedQuantityExtensions
{
    /// <summary>The graded quantity of an index.</summary>
    public static Jet Of(this GradedQuantity quantity, Jet index) => quantity == GradedQuantity.Index ? index : JetMath.Square(index);

    /// <summary>n² from the graded quantity.</summary>
    public static double ToIndexSquared(this GradedQuantity quantity, double value) => quantity == GradedQuantity.Index ? value * value : value;

    /// <summary>n² from the graded quantity.</summary>
    public static Jet ToIndexSquared(this GradedQuantity quantity, Jet value) => quantity == GradedQuantity.Index ? JetMath.Square(value) : value;
}
