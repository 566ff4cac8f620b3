using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>Where the steps lie: chosen so that each one's neglected terms stay below a tolerance for every mode at once.</summary>
/// <remarks>
/// Two terms are neglected in a step. The potential is replaced by its polynomial through seven Gauss points: what that leaves
/// out is orthogonal to all lower degrees, so that it meets only the matching component of u², which for a phase κh is at most
/// j₆(κh) ≈ (κh)⁶/13!!. And the matrix series ends at <see cref="StepSeries.Last"/>. Both are held, as a change of the
/// potential, below tolerance: a mode's β² moves by no more than the mean of that change over its own power.
/// </remarks>
internal sealed class StepPlan
{
    /// <summary>The most steps a plan may have.</summary>
    public const int MaximumSteps = 50_000;

    /// <summary>A step this much shorter than its piece is taken as it is: only a singular end of a piece asks for less.</summary>
    private const double ShortestRelativeStep = 1e-7;

    /// <summary>In radians of the vacuum wave: from here down a step's error is weighed by its length.</summary>
    private const double ShortStep = 0.01;

    private const double LargestVariation = 2;

    private readonly List<double> _legendre = [];
    private readonly List<Vector256<double>> _ends = [];
    private readonly ModeProblem _problem;
    private readonly double _wavenumber;

    private StepPlan(ModeProblem problem, List<Step> steps)
    {
        _problem = problem;
        _wavenumber = problem.Profile.Wavelength.Wavenumber;
        Steps = steps;
    }

    public readonly record struct Step(double Start, double End, int Piece);

    public List<Step> Steps { get; }

    /// <summary>False when the plan gave up at <see cref="MaximumSteps"/>.</summary>
    public bool IsComplete { get; private set; } = true;

    /// <summary>The least potential found: no mode has an energy below it.</summary>
    public double LowestPotential { get; private set; } = double.PositiveInfinity;

    /// <summary>A plan whose every step moves n_eff by less than <paramref name="indexTolerance"/>.</summary>
    public static StepPlan For(ModeProblem problem, double indexTolerance, CancellationToken cancellation)
    {
        var plan = new StepPlan(problem, []);
        plan.Survey();
        var n2 = problem.Profile.CutoffIndexSquared;
        var tolerance = 2 * plan._wavenumber * plan._wavenumber * Math.Sqrt(n2) * indexTolerance;
        for (var piece = 0; piece < problem.Profile.Pieces.Length && plan.IsComplete; piece++)
        {
            cancellation.ThrowIfCancellationRequested();
            plan.March(piece, tolerance);
        }

        return plan;
    }

    /// <summary>The same plan with every step halved.</summary>
    public StepPlan Halved()
    {
        var halves = new List<Step>(2 * Steps.Count);
        foreach (var step in Steps)
        {
            var middle = 0.5 * (step.Start + step.End);
            halves.Add(step with { End = middle });
            halves.Add(step with { Start = middle });
        }

        return new(_problem, halves) { LowestPotential = LowestPotential };
    }

    /// <summary>The Legendre coefficients of the potential on a step.</summary>
    public void Sample(Step step, Span<double> legendre)
    {
        var piece = _problem.Profile.Pieces[step.Piece];
        var potential = new Potential(piece, _problem);
        if (piece.IsUniform)
        {
            legendre.Clear();
            legendre[0] = potential.At(step.Start);
            return;
        }

        Span<double> values = stackalloc double[GaussRule.Points];
        var length = step.End - step.Start;
        for (var i = 0; i < GaussRule.Points; i++) values[i] = potential.At(step.Start + length * GaussRule.Nodes[i]);
        GaussRule.Fit(values, legendre);
    }

    /// <summary>Copies what was worked out for a step when it was laid; false for a halved plan, which has laid none.</summary>
    public bool TryCopy(int step, Span<double> legendre, Span<Vector256<double>> end)
    {
        if (_ends.Count == 0) return false;
        CollectionsMarshal.AsSpan(_legendre).Slice(step * legendre.Length, legendre.Length).CopyTo(legendre);
        CollectionsMarshal.AsSpan(_ends).Slice(step * end.Length, end.Length).CopyTo(end);
        return true;
    }

    /// <summary>Looks at the whole profile at an eighth of a wavelength, so that nothing a mode could feel goes unseen.</summary>
    private void Survey()
    {
        var spacing = _problem.Profile.Wavelength.Micrometres / 8;
        foreach (var piece in _problem.Profile.Pieces)
        {
            var potential = new Potential(piece, _problem);
            var extent = piece.Extent;
            var count = piece.IsUniform ? 1 : (int)Math.Clamp(Math.Ceiling(extent.Length / spacing), 16, 20_000);
            for (var i = 0; i <= count; i++)
            {
                // The ends themselves may carry a singular slope; look just inside.
                var t = Math.Clamp((double)i / count, 1e-9, 1 - 1e-9);
                LowestPotential = Math.Min(LowestPotential, potential.At(extent.Start + t * extent.Length));
            }
        }
    }

    private void March(int piece, double tolerance)
    {
        var extent = _problem.Profile.Pieces[piece].Extent;
        var series = new StepSeries();
        Span<double> legendre = stackalloc double[GaussRule.Points];
        Span<Vector256<double>> end = stackalloc Vector256<double>[StepMesh.Stride];
        var at = extent.Start;
        var wanted = extent.Length;
        while (at < extent.End)
        {
            var remaining = extent.End - at;
            // Equal shares of what remains, so that no sliver is left for the last step.
            var length = remaining / Math.Ceiling(remaining / wanted * (1 - 1e-12));
            var step = new Step(at, length >= remaining * (1 - 1e-12) ? extent.End : at + length, piece);
            var (factor, built) = Acceptance(step, tolerance, series, legendre);
            if (double.IsNaN(factor))
            {
                IsComplete = false;
                return;
            }

            if (factor < 1 && length > ShortestRelativeStep * extent.Length)
            {
                wanted = length * Math.Max(factor, 0.2);
                continue;
            }

            Steps.Add(step);
            if (!built) series.BuildFor(legendre, length);
            series.Coefficients(1, end);
            _legendre.AddRange(legendre);
            _ends.AddRange(end);
            if (Steps.Count >= MaximumSteps)
            {
                IsComplete = false;
                return;
            }

            at = step.End;
            wanted = length * Math.Clamp(factor, 0.5, 3);
        }
    }

    /// <summary>By what factor the step's length may be multiplied, and whether the series was built; below 1 the step is refused.</summary>
    private (double Factor, bool Built) Acceptance(Step step, double tolerance, StepSeries series, Span<double> legendre)
    {
        Sample(step, legendre);
        var h = step.End - step.Start;
        var variation = 0.0;
        for (var n = 1; n < GaussRule.Points; n++) variation += Math.Abs(legendre[n]);
        var phase = h * Math.Sqrt(Math.Max(variation - legendre[0], 0));
        var decay = h * Math.Sqrt(Math.Max(legendre[0] + variation - LowestPotential, 0));
        var longest = 1 / Math.Max(Math.Max(phase / StepMesh.Radians, decay / StepMesh.Nepers), 1e-9);
        if (longest < 1 || variation == 0) return (longest * (1 - 1e-9), false);
        var calm = Math.Sqrt(LargestVariation / (h * h * variation));
        if (calm < 1) return (0.9 * calm, false);

        series.BuildFor(legendre, h);
        var tail = (Math.Abs(legendre[GaussRule.Degree]) + Math.Abs(legendre[GaussRule.Degree - 1])) * Coupling(Math.Max(phase, decay));
        // A change of the potential counts by the share of the mode it meets; a step far shorter than a wave meets little of it.
        var error = (tail + series.Remainder / (h * h)) * Math.Min(1, h * _wavenumber / ShortStep);
        return (Math.Min(longest, 0.9 * Math.Pow(tolerance / Math.Max(error, 1e-300), 1.0 / 9)), true);
    }

    /// <summary>How much of u² a degree-6 wiggle can meet: (κh)⁶/13!!, and not below a millionth, for the fit's own sake.</summary>
    private static double Coupling(double phase) => Math.Clamp(phase * phase * phase * phase * phase * phase / 135_135, 1e-6, 1);
}
