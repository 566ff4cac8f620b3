using System.Collections.Immutable;

namespace GuideModes.Web.Api;

/// <summary>The modes of a guide, as they go over the wire.</summary>
/// <param name="ModeCount">How many modes are guided: exact.</param>
/// <param name="WkbModeNumber">The asymptotic engine's continuous mode count at cutoff: 8.31 means eight modes and a third of a ninth.</param>
/// <param name="Modes">By decreasing effective index.</param>
/// <param name="Remarks">Sentences on the guide as a whole.</param>
/// <param name="Engine">The program and its version.</param>
/// <param name="Profile">n(x), with <c>fields=true</c>.</param>
public sealed record ModesAnswer(
    int ModeCount,
    double? WkbModeNumber,
    ImmutableArray<ModeAnswer> Modes,
    ImmutableArray<string> Remarks,
    string Engine,
    ProfileAnswer? Profile);

/// <summary>One guided mode.</summary>
/// <param name="Label">Such as TE0.</param>
/// <param name="M">Zeros of the field.</param>
/// <param name="NEff">The effective index, from the transfer-matrix engine.</param>
/// <param name="NEffLower">The exact effective index of the stated profile is not below this.</param>
/// <param name="NEffUpper">The exact effective index of the stated profile is not above this.</param>
/// <param name="BetaPerUm">Propagation constant, rad/µm.</param>
/// <param name="NGroup">Group index, material dispersion included.</param>
/// <param name="DispersionPsPerNmKm">Not computed for planar guides: null.</param>
/// <param name="Confinement">Share in cover, each region in order, substrate: of ∫E² dx for TE, of the power ∫H²/n² dx for TM.</param>
/// <param name="Trust">agree, watch or disagree: how the two engines bear each other out.</param>
/// <param name="TrustReason">Why, in a sentence.</param>
/// <param name="CentroidUm">Centre of the power, µm.</param>
/// <param name="RmsWidthUm">rms half-width of the power, µm.</param>
/// <param name="CoverPenetrationUm">The field falls to 1/e in the cover over this length, µm.</param>
/// <param name="SubstratePenetrationUm">The field falls to 1/e in the substrate over this length, µm.</param>
/// <param name="Wkb">The asymptotic answer; null where that engine finds no such mode.</param>
/// <param name="Remarks">Short remarks for programs, such as near-cutoff.</param>
/// <param name="Field">The sampled field, with <c>fields=true</c>.</param>
public sealed record ModeAnswer(
    string Label,
    int M,
    double NEff,
    double NEffLower,
    double NEffUpper,
    double BetaPerUm,
    double? NGroup,
    double? DispersionPsPerNmKm,
    ImmutableArray<double> Confinement,
    string Trust,
    string TrustReason,
    double? CentroidUm,
    double? RmsWidthUm,
    double? CoverPenetrationUm,
    double? SubstratePenetrationUm,
    WkbAnswer? Wkb,
    ImmutableArray<string> Remarks,
    FieldAnswer? Field);

/// <summary>What asymptotics says of a mode.</summary>
/// <param name="NEff">Its best effective index.</param>
/// <param name="Uncertainty">The size of the last term kept.</param>
/// <param name="TurningPointsUm">Where κ² changes sign, µm, ascending.</param>
/// <param name="FirstOrderNEff">The first-order value alone; null where it has no solution.</param>
/// <param name="SecondOrderNEff">With Dunham's second-order term; null unless the well lies between smooth turning points of one piece.</param>
/// <param name="OrderKept">Order of the last term kept.</param>
/// <param name="OrderReason">Why the series was cut there.</param>
/// <param name="Well">The well that holds the mode, counted from 0 at the cover.</param>
/// <param name="WellCount">How many wells there are at this effective index.</param>
/// <param name="BarrierTransparency">exp(−2∫|κ|dx) of the barrier to the nearest other well; null for a single well.</param>
/// <param name="NearDegenerate">True when another well holds a mode that asymptotics cannot tell from this one.</param>
public sealed record WkbAnswer(
    double NEff,
    double? Uncertainty,
    ImmutableArray<double> TurningPointsUm,
    double? FirstOrderNEff,
    double? SecondOrderNEff,
    int OrderKept,
    string OrderReason,
    int Well,
    int WellCount,
    double? BarrierTransparency,
    bool NearDegenerate);

/// <summary>A sampled field: TE scaled to ∫E² dx = 1, TM to ∫H²/n² dx = 1, x in µm; the first lobe from the cover is positive.</summary>
/// <param name="Quantity">E or H.</param>
/// <param name="XUm">Coordinates, µm.</param>
/// <param name="Value">The field at each, µm^−½.</param>
public sealed record FieldAnswer(string Quantity, ImmutableArray<double> XUm, ImmutableArray<double> Value);

/// <summary>n(x); at a jump the coordinate stands twice.</summary>
public sealed record ProfileAnswer(ImmutableArray<double> XUm, ImmutableArray<double> N);
