using System.Runtime.CompilerServices;

namespace GuideModes;

/// <summary>Checks at the public door: a caller's mistake throws here, once, with the value in the message.</summary>
internal static class Require
{
    public static double Finite(double value, [CallerArgumentExpression(nameof(value))] string? name = null) =>
        double.IsFinite(value) ? value : throw new ArgumentOutOfRangeException(name, value, "Must be a finite number.");

    public static double PositiveFinite(double value, [CallerArgumentExpression(nameof(value))] string? name = null) =>
        double.IsFinite(value) && value > 0
            ? value
            : throw new ArgumentOutOfRangeException(name, value, "Must be positive and finite.");
}
