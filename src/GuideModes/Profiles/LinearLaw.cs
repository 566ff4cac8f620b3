namespace GuideModes.Profiles;

/// <summary>n (or n²) runs straight from nStart (nStart²) at the region's start to nEnd (nEnd²) at its end.</summary>
public sealed record LinearLaw(GradedQuantity Quantity, IndexSource NStart, IndexSource NEnd) : IndexLaw
{
    public override IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength)
    {
        var start = Quantity.Of(NStart.At(wavelength));
        var end = Quantity.Of(NEnd.At(wavelength));
        return [new ShapePiece<LinearShape>(extent, region, Quantity, start, end - start, new(), extent.Start, extent.Length)];
    }
}
