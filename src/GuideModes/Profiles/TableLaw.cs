using System.Collections.Immutable;

namespace GuideModes.Profiles;

/// <summary>How a table runs between its points.</summary>
public enum TableInterpolation
{
    Linear,

    /// <summary>Cubic pieces with continuous slope that never overshoot the points.</summary>
    MonotoneCubic,
}

/// <summary>A point of a table: n at a coordinate in µm.</summary>
public readonly record struct TablePoint(double XUm, double N);

/// <summary>Measured or computed points, joined.</summary>
/// <remarks>
/// <para>With <see cref="GradedQuantity.IndexSquared"/> the points' n is squared first and the squares are interpolated.</para>
/// <para>Monotone cubic: the slopes of Fritsch &amp; Butland (SIAM J. Sci. Stat. Comput. 5, 300, 1984), a weighted harmonic mean of the neighbouring
/// secants, zero where they differ in sign; at the ends the three-point formula, limited to keep the shape.</para>
/// <para>One piece per interval, so every joint is a piece's end. A region to infinity keeps the last point's index.
/// The list is compared by reference: no equality by content is promised.</para>
/// </remarks>
public sealed record TableLaw(GradedQuantity Quantity, TableInterpolation Interpolation, ImmutableArray<TablePoint> Points) : IndexLaw
{
    private double Last => Points[^1].XUm;

    public override double? Limit(Wavelength wavelength) => Points[^1].N;

    public override double? SettlesAt(double start, double furthest, Wavelength wavelength) =>
        Last <= furthest ? Math.Max(start, Last) : null;

    public override Fault? Misfit(Interval extent, bool isUnbounded, Wavelength wavelength)
    {
        var covers = Reaches(extent.Start, Points[0].XUm) && (isUnbounded || Reaches(Last, extent.End));
        return covers
            ? null
            : new("points", FormattableString.Invariant($"The points run from {Points[0].XUm} to {Last} µm, but the region runs from {extent.Start} to {extent.End} µm: they must cover it (coordinates count from the cover interface)."));
    }

    public override IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength)
    {
        var values = Points.Select(point => Quantity.Of(point.N).Value).ToArray();
        var slopes = Interpolation == TableInterpolation.MonotoneCubic ? MonotoneSlopes(values) : null;
        var interval = 0;
        foreach (var part in extent.SplitAt(Points.Select(point => point.XUm)))
        {
            while (interval < Points.Length - 2 && part.Middle > Points[interval + 1].XUm) interval++;
            yield return part.Middle > Last ? Held(part, region) : Piece(part, region, interval, values, slopes);
        }
    }

    private static bool Reaches(double far, double near) => far >= near || Splitting.AreOne(far, near);

    private UniformPiece Held(Interval part, int region) => new(part, region, Points[^1].N * Points[^1].N);

    private SmoothPiece Piece(Interval part, int region, int i, double[] values, double[]? slopes)
    {
        var (origin, length) = (Points[i].XUm, Points[i + 1].XUm - Points[i].XUm);
        var rise = values[i + 1] - values[i];
        if (slopes is null)
            return new ShapePiece<LinearShape>(part, region, Quantity, values[i], rise, default, origin, length);
        var (first, last) = (slopes[i] * length, slopes[i + 1] * length);
        var cubic = new CubicShape(first, 3 * rise - 2 * first - last, first + last - 2 * rise);
        return new ShapePiece<CubicShape>(part, region, Quantity, values[i], 1, cubic, origin, length);
    }

    private double[] MonotoneSlopes(double[] values)
    {
        var last = values.Length - 1;
        var steps = new double[last];
        var secants = new double[last];
        for (var i = 0; i < last; i++)
        {
            steps[i] = Points[i + 1].XUm - Points[i].XUm;
            secants[i] = (values[i + 1] - values[i]) / steps[i];
        }

        if (last == 1) return [secants[0], secants[0]];
        var slopes = new double[values.Length];
        slopes[0] = EndSlope(steps[0], steps[1], secants[0], secants[1]);
        for (var i = 1; i < last; i++) slopes[i] = InnerSlope(steps[i - 1], steps[i], secants[i - 1], secants[i]);
        slopes[last] = EndSlope(steps[^1], steps[^2], secants[^1], secants[^2]);
        return slopes;
    }

    private static double InnerSlope(double h0, double h1, double d0, double d1)
    {
        if (d0 * d1 <= 0) return 0;
        var (w0, w1) = (2 * h1 + h0, h1 + 2 * h0);
        return (w0 + w1) / (w0 / d0 + w1 / d1);
    }

    private static double EndSlope(double h0, double h1, double d0, double d1)
    {
        var slope = ((2 * h0 + h1) * d0 - h0 * d1) / (h0 + h1);
        if (slope * d0 <= 0) return 0;
        return d0 * d1 <= 0 && Math.Abs(slope) > 3 * Math.Abs(d0) ? 3 * d0 : slope;
    }
}
