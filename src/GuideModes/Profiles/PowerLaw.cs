namespace GuideModes.Profiles;

/// <summary>The alpha-profile: n² = nCenter² − (nCenter² − nEdge²)·|(x − centerUm)/halfWidthUm|^alpha, or the same in n.</summary>
/// <remarks>It goes on beyond the half-width; the region's thickness ends it. Split at the centre unless alpha is an even integer.</remarks>
public sealed record PowerLaw(
    GradedQuantity Quantity,
    IndexSource NCenter,
    IndexSource NEdge,
    double HalfWidthUm,
    double Alpha,
    double CenterUm) : IndexLaw
{
    private bool IsSmoothAtCenter => Alpha % 2 == 0;

    public override IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength)
    {
        if (IsSmoothAtCenter)
        {
            return Alpha == 2
                ? [Piece(extent, region, wavelength, new SquareShape())]
                : [Piece(extent, region, wavelength, new EvenPowerShape(Alpha))];
        }

        return extent.SplitAt([CenterUm]).Select(part =>
            Piece(part, region, wavelength, new PowerShape(Alpha, part.Middle < CenterUm ? -1 : 1)));
    }

    internal override IEnumerable<double> Landmarks(Interval extent) => [CenterUm];

    private ShapePiece<TShape> Piece<TShape>(Interval extent, int region, Wavelength wavelength, TShape shape)
        where TShape : struct, IShape
    {
        var center = Quantity.Of(NCenter.At(wavelength));
        var edge = Quantity.Of(NEdge.At(wavelength));
        return new ShapePiece<TShape>(extent, region, Quantity, center, edge - center, shape, CenterOf(extent), HalfWidthUm);
    }

    /// <summary>The centre, moved onto the end of the stretch that it cannot be told from, so that what is singular there stands at the end.</summary>
    private double CenterOf(Interval extent) =>
        Splitting.AreOne(CenterUm, extent.Start) ? extent.Start
        : Splitting.AreOne(CenterUm, extent.End) ? extent.End
        : CenterUm;
}
