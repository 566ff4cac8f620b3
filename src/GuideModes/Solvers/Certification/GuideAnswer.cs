using System.Collections.Immutable;
using System.Globalization;
using GuideModes.Guides;
using GuideModes.Profiles;
using GuideModes.Solvers.TransferMatrix;
using GuideModes.Solvers.Wkb;

namespace GuideModes.Solvers.Certification;

/// <summary>Everything the product says of one guide: both engines' modes, weighed against each other.</summary>
/// <remarks>Immutable and safe to share between threads.</remarks>
public sealed class GuideAnswer
{
    private static readonly int MostModes = new TransferMatrixSolver().MaximumModes;

    private readonly TransferMatrixSolution _exact;
    private readonly ModeProblem _problem;

    private GuideAnswer(Guide guide, ModeProblem problem, TransferMatrixSolution exact, WkbSolution wkb)
    {
        Guide = guide;
        _problem = problem;
        _exact = exact;
        WkbModeNumber = wkb.ModeNumberAtCutoff;
        // A guide of very many modes may exhaust the exact solver's steps before it has counted them.
        Outcome = exact.Outcome == SearchOutcome.Unresolved && wkb.ModeNumberAtCutoff > MostModes ? SearchOutcome.TooManyModes : exact.Outcome;
        var verdict = new Verdict(guide.Profile, guide.Polarization, exact, wkb);
        Modes = [.. exact.Modes.Select(verdict.On)];
        Remarks = Sentences();
    }

    public Guide Guide { get; }

    /// <summary>The guided modes by decreasing n_eff.</summary>
    public ImmutableArray<CertifiedMode> Modes { get; }

    /// <summary>The WKB engine's continuous mode count at cutoff: 8.31 is eight modes and a third of a ninth; not a number where WKB does not apply.</summary>
    public double WkbModeNumber { get; }

    /// <summary>Remarks on the guide as a whole: sentences.</summary>
    public ImmutableArray<string> Remarks { get; }

    /// <summary>Why the exact search ended.</summary>
    public SearchOutcome Outcome { get; }

    /// <summary>Solves with both engines.</summary>
    /// <exception cref="OperationCanceledException">The caller lost interest.</exception>
    public static GuideAnswer Solve(Guide guide, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(guide);
        var problem = new ModeProblem(guide.Profile, guide.Polarization);
        var wkb = new WkbSolver().Solve(problem, cancellation);
        var exact = new TransferMatrixSolver().Solve(problem, cancellation);
        return new(guide, problem, exact, wkb);
    }

    /// <summary>The exact field of mode m, µm^−½.</summary>
    /// <param name="order">m, from 0.</param>
    /// <param name="xUm">Coordinates, µm.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such mode.</exception>
    public SampledField Field(int order, ImmutableArray<double> xUm) => _exact.Field(order, xUm);

    /// <summary>The exact fields of several modes at the same coordinates: much cheaper than one by one.</summary>
    public ImmutableArray<SampledField> Fields(ImmutableArray<int> orders, ImmutableArray<double> xUm, CancellationToken cancellation = default) =>
        _exact.Fields(orders, xUm, cancellation);

    /// <summary>The asymptotic field of mode m, µm^−½; null where the WKB engine finds no such mode.</summary>
    public SampledField? WkbField(int order, ImmutableArray<double> xUm) =>
        Modes[order].Wkb is { } mode ? new WkbSolver().Field(_problem, mode, xUm) : null;

    private ImmutableArray<string> Sentences()
    {
        if (Outcome == SearchOutcome.TooManyModes)
            return [Say($"The guide holds more than {MostModes} modes (about {WkbModeNumber:0} by WKB); the exact solver does not list so many.")];
        if (Outcome == SearchOutcome.Unresolved)
            return ["The profile has features too fine to resolve in the allowed number of steps; no mode is given rather than a doubtful one."];
        if (Modes.IsEmpty) return [WhyNothingIsGuided()];
        if (double.IsNaN(WkbModeNumber)) return ["The profile ripples too often for WKB; no mode has a second witness."];
        var whole = Math.Floor(WkbModeNumber);
        return whole == Modes.Length
            ? []
            : [Say($"WKB counts {WkbModeNumber:0.00} modes, the exact zero count {Modes.Length}: the last one lies close to cutoff, where WKB may err by one.")];
    }

    private string WhyNothingIsGuided()
    {
        var profile = Guide.Profile;
        var cutoff = Math.Sqrt(profile.CutoffIndexSquared);
        var highest = Math.Sqrt(profile.Pieces.Max(Highest));
        var medium = profile.Cover.IndexSquared > profile.Substrate.IndexSquared ? "cover" : "substrate";
        return highest <= cutoff
            ? Say($"Nothing is guided: the index reaches {highest:0.000000} at most, no more than that of the {medium}, {cutoff:0.000000}.")
            : Say($"Nothing is guided: the raised index (up to {highest:0.000000} over {cutoff:0.000000} of the {medium}) is too weak or too thin at this wavelength; WKB counts {WkbModeNumber:0.00} of a mode.");
    }

    private static double Highest(SmoothPiece piece)
    {
        const int Samples = 256;
        var highest = 0.0;
        for (var i = 0; i <= Samples; i++)
            highest = Math.Max(highest, piece.IndexSquared(piece.Extent.Start + piece.Extent.Length * i / Samples));
        return highest;
    }

    private static string Say(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
