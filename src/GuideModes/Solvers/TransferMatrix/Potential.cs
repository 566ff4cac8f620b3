using GuideModes.Profiles;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// The potential V of u″ = (V − E)u, in one smooth piece, counted like the energy E = k²n_c² − β² from cutoff (n_c the index of
/// the denser end medium), so that guided modes have E &lt; 0 and those next to cutoff keep all their digits:
/// V = k²(n_c² − n²) for TE, where u = E_y; for TM, where H_y = n·u, V = k²(n_c² − s) + ¾(s′/s)² − ½s″/s with s = n².
/// </summary>
internal readonly struct Potential(SmoothPiece piece, ModeProblem problem)
{
    private readonly double _k2 = problem.Profile.Wavelength.Wavenumber * problem.Profile.Wavelength.Wavenumber;
    private readonly double _cutoff = problem.Profile.CutoffIndexSquared;
    private readonly bool _isTE = problem.Polarization == Polarization.TE;

    public double At(double x)
    {
        if (_isTE) return _k2 * (_cutoff - piece.IndexSquared(x));
        var s = piece.Jet(x);
        var slope = s.D1 / s.Value;
        return _k2 * (_cutoff - s.Value) + 0.75 * slope * slope - 0.5 * s.D2 / s.Value;
    }
}
