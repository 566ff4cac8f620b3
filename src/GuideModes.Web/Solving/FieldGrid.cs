using System.Collections.Immutable;

namespace GuideModes.Web.Solving;

/// <summary>Coordinates at round numbers, so that a file reads well and two guides share their points.</summary>
internal static class FieldGrid
{
    private static readonly double[] Steps = [1, 2, 5];

    /// <summary>Multiples of a round step that fill an interval with at least a given number of intervals, and less than three times as many.</summary>
    public static ImmutableArray<double> Over(Interval interval, int atLeast)
    {
        var largest = interval.Length / atLeast;
        var decade = (int)Math.Floor(Math.Log10(largest));
        var mantissa = Steps.Last(step => step <= Math.Max(1, largest / Math.Pow(10, decade) * (1 + 1e-12)));
        var first = (long)Math.Floor(Multiple(interval.Start, mantissa, -decade));
        var last = (long)Math.Ceiling(Multiple(interval.End, mantissa, -decade));
        var points = ImmutableArray.CreateBuilder<double>((int)(last - first) + 1);
        for (var i = first; i <= last; i++) points.Add(Round(i * mantissa, decade));
        return points.MoveToImmutable();
    }

    private static double Multiple(double x, double mantissa, int decades) => x * Math.Pow(10, decades) / mantissa;

    /// <summary>Division by a whole power of ten gives the double nearest to the decimal number.</summary>
    private static double Round(double whole, int decade) => decade < 0 ? whole / Math.Pow(10, -decade) : whole * Math.Pow(10, decade);
}
