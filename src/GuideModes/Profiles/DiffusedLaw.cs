using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>
/// A base with a fading shape on it: n = nBase + deltaN·g(s), s = (x − origin)/length; with
/// <see cref="GradedQuantity.IndexSquared"/>, n² = nBase² + ((nBase + deltaN)² − nBase²)·g(s).
/// </summary>
/// <remarks>Beyond the origin every such shape falls monotonically to 0, so the law tends to nBase.</remarks>
public abstract record DiffusedLaw(GradedQuantity Quantity, IndexSource NBase, IndexSource DeltaN, double LengthUm, double OriginUm) : IndexLaw
{
    /// <summary>n² that differs from the limit's by no more than this share of it is the limit's.</summary>
    internal const double Settled = 4e-16;

    public override double? Limit(Wavelength wavelength) => NBase.At(wavelength).Value;

    public override IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength)
    {
        var n = NBase.At(wavelength);
        var basis = Quantity.Of(n);
        return [Piece(extent, region, basis, Quantity.Of(n + DeltaN.At(wavelength)) - basis)];
    }

    /// <summary>Found by doubling the distance from the origin, then bisection: the tail is monotone.</summary>
    public override double? SettlesAt(double start, double furthest, Wavelength wavelength)
    {
        var limit = RealMath.Square(NBase.At(wavelength).Value);
        var from = Math.Max(start, OriginUm);
        var tail = Pieces(new(from, Math.Max(from, furthest)), 0, wavelength).First();
        bool IsSettled(double x) => Math.Abs(tail.IndexSquared(x) - limit) <= Settled * limit;

        if (IsSettled(from)) return from <= furthest ? from : null;
        var unsettled = from;
        for (var step = LengthUm; ; step *= 2)
        {
            var x = Math.Min(from + step, furthest);
            if (IsSettled(x)) return Bisection.FirstTrue(IsSettled, unsettled, x);
            if (x >= furthest) return null;
            unsettled = x;
        }
    }

    internal override IEnumerable<double> Landmarks(Interval extent) => [OriginUm - LengthUm, OriginUm, OriginUm + LengthUm];

    private protected abstract SmoothPiece Piece(Interval extent, int region, Jet basis, Jet delta);

    private protected SmoothPiece Piece<TShape>(Interval extent, int region, Jet basis, Jet delta)
        where TShape : struct, IShape =>
        new ShapePiece<TShape>(extent, region, Quantity, basis, delta, default, OriginUm, LengthUm);
}

/// <summary>g = exp(−s²), s = (x − centerUm)/depthUm.</summary>
public sealed record GaussianLaw(GradedQuantity Quantity, IndexSource NBase, IndexSource DeltaN, double DepthUm, double CenterUm)
    : DiffusedLaw(Quantity, NBase, DeltaN, DepthUm, CenterUm)
{
    private protected override SmoothPiece Piece(Interval extent, int region, Jet basis, Jet delta) =>
        Piece<GaussianShape>(extent, region, basis, delta);
}

/// <summary>g = exp(−s), s = (x − centerUm)/depthUm.</summary>
public sealed record ExponentialLaw(GradedQuantity Quantity, IndexSource NBase, IndexSource DeltaN, double DepthUm, double CenterUm)
    : DiffusedLaw(Quantity, NBase, DeltaN, DepthUm, CenterUm)
{
    private protected override SmoothPiece Piece(Interval extent, int region, Jet basis, Jet delta) =>
        Piece<ExponentialShape>(extent, region, basis, delta);
}

/// <summary>g = erfc(s), s = (x − centerUm)/depthUm.</summary>
public sealed record ErfcLaw(GradedQuantity Quantity, IndexSource NBase, IndexSource DeltaN, double DepthUm, double CenterUm)
    : DiffusedLaw(Quantity, NBase, DeltaN, DepthUm, CenterUm)
{
    private protected override SmoothPiece Piece(Interval extent, int region, Jet basis, Jet delta) =>
        Piece<ErfcShape>(extent, region, basis, delta);
}

/// <summary>g = sech²(s), s = (x − centerUm)/depthUm.</summary>
public sealed record SechSquaredLaw(GradedQuantity Quantity, IndexSource NBase, IndexSource DeltaN, double DepthUm, double CenterUm)
    : DiffusedLaw(Quantity, NBase, DeltaN, DepthUm, CenterUm)
{
    private protected override SmoothPiece Piece(Interval extent, int region, Jet basis, Jet delta) =>
        Piece<SechSquaredShape>(extent, region, basis, delta);
}

/// <summary>g = 1/(1 + exp((x − depthUm)/edgeUm)).</summary>
public sealed record FermiLaw(GradedQuantity Quantity, IndexSource NBase, IndexSource DeltaN, double DepthUm, double EdgeUm)
    : DiffusedLaw(Quantity, NBase, DeltaN, EdgeUm, DepthUm)
{
    private protected override SmoothPiece Piece(Interval extent, int region, Jet basis, Jet delta) =>
        Piece<FermiShape>(extent, region, basis, delta);
}
