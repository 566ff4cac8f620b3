using System.Collections.Immutable;
using System.Globalization;
using GuideModes.Profiles;
using GuideModes.Solvers.TransferMatrix;
using GuideModes.Solvers.Wkb;

namespace GuideModes.Solvers.Certification;

/// <summary>Weighs what the two engines say of one mode.</summary>
internal sealed class Verdict(IndexProfile profile, Polarization polarization, TransferMatrixSolution exact, WkbSolution wkb)
{
    /// <summary>A mode this close to cutoff, as a share of a mode number, is remarked on.</summary>
    private const double CutoffMargin = 0.1;

    /// <summary>Without a WKB count, the distance in n_eff that counts as near cutoff.</summary>
    private const double CutoffIndexMargin = 1e-5;

    /// <summary>Two modes closer than this in n_eff are remarked on.</summary>
    private const double DegenerateGap = 1e-6;

    private const double WideBracket = 1e-10;

    /// <summary>Beyond this many of its own uncertainties, the WKB value contradicts the exact one.</summary>
    private const double Contradiction = 5;

    private readonly Dictionary<int, WkbMode> _wkb = wkb.Modes.ToDictionary(mode => mode.Order);

    public CertifiedMode On(GuidedMode mode)
    {
        var asymptotic = _wkb.GetValueOrDefault(mode.Order);
        var remarks = Remarks(mode, asymptotic);
        var (trust, reason) = Weigh(mode, asymptotic, remarks);
        return new(
            string.Create(CultureInfo.InvariantCulture, $"{polarization}{mode.Order}"),
            mode,
            asymptotic,
            trust,
            reason,
            profile.Wavelength.Wavenumber * mode.EffectiveIndex.Value,
            remarks);
    }

    private ImmutableArray<string> Remarks(GuidedMode mode, WkbMode? asymptotic)
    {
        var remarks = ImmutableArray.CreateBuilder<string>();
        if (IsNearCutoff(mode)) remarks.Add(Remark.NearCutoff);
        if (asymptotic is { IsNearDegenerate: true } || Gap(mode) < DegenerateGap) remarks.Add(Remark.NearDegenerate);
        if (asymptotic is null) remarks.Add(Remark.NoWkbMode);
        if (2 * mode.EffectiveIndex.Error > WideBracket) remarks.Add(Remark.WideBracket);
        return remarks.ToImmutable();
    }

    private bool IsNearCutoff(GuidedMode mode) =>
        mode.Order == exact.Modes.Length - 1
        && (Math.Abs(wkb.ModeNumberAtCutoff - exact.Modes.Length) < CutoffMargin
            || mode.EffectiveIndex.Value - Math.Sqrt(profile.CutoffIndexSquared) < CutoffIndexMargin);

    private double Gap(GuidedMode mode)
    {
        var gap = double.PositiveInfinity;
        if (mode.Order > 0) gap = exact.Modes[mode.Order - 1].EffectiveIndex.Value - mode.EffectiveIndex.Value;
        if (mode.Order + 1 < exact.Modes.Length)
            gap = Math.Min(gap, mode.EffectiveIndex.Value - exact.Modes[mode.Order + 1].EffectiveIndex.Value);
        return gap;
    }

    private (Trust Trust, string Reason) Weigh(GuidedMode mode, WkbMode? asymptotic, ImmutableArray<string> remarks)
    {
        if (remarks.Contains(Remark.WideBracket))
            return (Trust.Watch, Say($"The two resolutions differ by {2 * mode.EffectiveIndex.Error:0.0e-0}: the profile has a feature the solver resolves poorly."));
        if (asymptotic is null)
        {
            if (wkb.Outcome == SearchOutcome.Unresolved)
                return (Trust.Watch, "The profile ripples too often for WKB, which asks for slow changes; the transfer matrix alone speaks.");
            return remarks.Contains(Remark.NearCutoff)
                ? (Trust.Watch, "The mode is so close to cutoff that WKB misses it; the zero count of the exact solver finds it.")
                : (Trust.Disagree, "WKB finds no mode of this order, though it is not at cutoff.");
        }

        var difference = Math.Abs(asymptotic.EffectiveIndex.Value - mode.EffectiveIndex.Value);
        var claim = Say($"WKB (order {asymptotic.OrderKept}) differs by {difference:0.0e-0} and claims ±{asymptotic.EffectiveIndex.Error:0.0e-0}");
        if (difference > Contradiction * asymptotic.EffectiveIndex.Error) return (Trust.Disagree, claim + ": far more than it claims.");
        if (difference > asymptotic.EffectiveIndex.Error) return (Trust.Watch, claim + ": somewhat more than it claims.");
        if (remarks.Contains(Remark.NearDegenerate)) return (Trust.Watch, claim + ". Another mode lies very close: its field and coupling change with the smallest asymmetry.");
        if (remarks.Contains(Remark.NearCutoff)) return (Trust.Watch, claim + ". The mode is close to cutoff: a small change of the guide loses it.");
        return (Trust.Agree, claim + ".");
    }

    private static string Say(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
