using GuideModes.Profiles;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// What happens to (u, u′) where two pieces meet: nothing for TE; for TM, where H = n·u and H′/n² are continuous, the
/// unimodular matrix (a 0; c 1/a).
/// </summary>
internal readonly record struct Joint(double A, double C)
{
    public static readonly Joint Identity = new(1, 0);

    /// <summary>One side of a joint: n² and ½(n²)′/n² = n′/n there.</summary>
    public readonly record struct Side(double IndexSquared, double RelativeSlope)
    {
        public static Side Of(SmoothPiece piece, double x)
        {
            var s = piece.Jet(x);
            // A power law may have no finite slope at its very end; the steps next to it are short enough to carry it.
            var slope = 0.5 * s.D1 / s.Value;
            return new(s.Value, double.IsFinite(slope) ? slope : 0);
        }

        public static Side Of(Medium medium) => new(medium.IndexSquared, 0);
    }

    public static Joint Between(Side left, Side right, Polarization polarization)
    {
        if (polarization == Polarization.TE) return Identity;
        var ratio = Math.Sqrt(left.IndexSquared / right.IndexSquared);
        // u₂ = (n₁/n₂)u₁ and u₂′ = (n₂/n₁)(u₁′ + ρ₁u₁) − ρ₂u₂ with ρ = n′/n.
        return new(ratio, left.RelativeSlope / ratio - right.RelativeSlope * ratio);
    }

    public (double U, double Slope) Forward(double u, double slope) => (A * u, C * u + slope / A);

    public (double U, double Slope) Backward(double u, double slope) => (u / A, A * slope - C * u);
}
