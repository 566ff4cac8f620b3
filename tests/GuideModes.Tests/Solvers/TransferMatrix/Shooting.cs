using GuideModes.Profiles;
using GuideModes.Solvers;
using MathNet.Numerics.RootFinding;

namespace GuideModes.Tests.Solvers.TransferMatrix;

/// <summary>
/// An independent value of one n_eff: the first-order system of the field and its continuous partner, TE (E, E′), TM (H, H′/n²),
/// carried by the classical Runge–Kutta method from the cover to the substrate, and the mismatch there brought to zero.
/// </summary>
/// <remarks>Needs no derivative of n². At stated points steps are crowded as t⁴, so that a cusp of n² costs no order. Meant for guides of a few modes.</remarks>
internal static class Shooting
{
    private const int Steps = 20_000;

    /// <summary>The root of the mismatch within 1e-7 of a guess.</summary>
    public static double Index(ModeProblem problem, double guess, IReadOnlyList<double> cusps) =>
        Brent.FindRoot(index => Mismatch(problem, index, cusps), guess - 1e-7, guess + 1e-7, 1e-15);

    private static double Mismatch(ModeProblem problem, double index, IReadOnlyList<double> cusps)
    {
        var profile = problem.Profile;
        var beta2 = Square(profile.Wavelength.Wavenumber * index);
        double Decay(Medium medium) => Math.Sqrt(beta2 - Square(profile.Wavelength.Wavenumber) * medium.IndexSquared) / Weight(problem, medium.IndexSquared);
        var (u, v) = (1.0, Decay(profile.Cover));
        foreach (var piece in profile.Pieces) (u, v) = Carry(problem, piece, beta2, cusps, u, v);
        return v + Decay(profile.Substrate) * u;
    }

    private static (double U, double V) Carry(ModeProblem problem, SmoothPiece piece, double beta2, IReadOnlyList<double> cusps, double u, double v)
    {
        var k2 = Square(problem.Profile.Wavelength.Wavenumber);
        var extent = piece.Extent;
        var (startsAtCusp, endsAtCusp) = (cusps.Contains(extent.Start), cusps.Contains(extent.End));
        (double X, double Rate) Map(double t) =>
            startsAtCusp ? (extent.Start + extent.Length * t * t * t * t, 4 * t * t * t * extent.Length)
            : endsAtCusp ? (extent.End - extent.Length * Square(Square(1 - t)), 4 * Square(1 - t) * (1 - t) * extent.Length)
            : (extent.Start + extent.Length * t, extent.Length);
        (double, double) Slope(double t, double a, double b)
        {
            var (x, rate) = Map(t);
            var s = piece.IndexSquared(x);
            var weight = Weight(problem, s);
            return (rate * weight * b, rate * (beta2 - k2 * s) / weight * a);
        }

        const double h = 1.0 / Steps;
        for (var i = 0; i < Steps; i++)
        {
            var t = i * h;
            var (a1, b1) = Slope(t, u, v);
            var (a2, b2) = Slope(t + h / 2, u + h / 2 * a1, v + h / 2 * b1);
            var (a3, b3) = Slope(t + h / 2, u + h / 2 * a2, v + h / 2 * b2);
            var (a4, b4) = Slope(t + h, u + h * a3, v + h * b3);
            u += h / 6 * (a1 + 2 * a2 + 2 * a3 + a4);
            v += h / 6 * (b1 + 2 * b2 + 2 * b3 + b4);
        }

        return (u, v);
    }

    private static double Weight(ModeProblem problem, double indexSquared) => problem.Polarization == Polarization.TE ? 1 : indexSquared;

    private static double Square(double x) => x * x;
}
