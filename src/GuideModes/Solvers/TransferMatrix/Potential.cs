using GuideModes.Profiles;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// The potential V of u″ = (V − E)u with E = −β², in one smooth piece: V = −k²n² for TE, where u = E_y; for TM, where
/// H_y = n·u, V = −k²n² + ¾(s′/s)² − ½s″/s with s = n².
/// </summary>
internal readonly struct Potential(SmoothPiece piece, double wavenumber, Polarization polarization)
{
    private readonly double _k2 = wavenumber * wavenumber;

    public double At(double x)
    {
        if (polarization == Polarization.TE) return -_k2 * piece.IndexSquared(x);
        var s = piece.Jet(x);
        var slope = s.D1 / s.Value;
        return -_k2 * s.Value + 0.75 * slope * slope - 0.5 * s.D2 / s.Value;
    }
}
