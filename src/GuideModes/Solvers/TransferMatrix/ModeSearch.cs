namespace GuideModes.Solvers.TransferMatrix;

/// <summary>Finds the energies E = k²n_c² − β² of the modes on one mesh: mode m is the one with m zeros.</summary>
/// <remarks>
/// At a step's start the angles of the two decaying solutions, each counted on from its own end by whole turns of π at every
/// zero, add up to Θ(E) + π; Θ grows with E at the rate s·∫u²/(s²u² + u′²), and Θ(E_m) = mπ. So a bracket for every mode is
/// had from every sweep, and Newton's step inside the bracket finishes it: no mode is missed, doubled or mislabelled.
/// </remarks>
internal sealed class ModeSearch
{
    private const int MaximumSweeps = 200;

    private const double Rounding = 2.3e-16;

    /// <summary>
    /// In a single well Θ bends on the scale of a radian, so that Newton's next step is smaller than this one by about the angle
    /// still missing, and from here one step lands within rounding. Between coupled wells Θ may bend within a splitting.
    /// </summary>
    private const double LastAngle = 1e-7;

    /// <summary>The match moves when the mode is this much stronger elsewhere (as a logarithm of amplitude squared).</summary>
    private const double WorthMoving = 4;

    private readonly Sweep _sweep;
    private readonly double[] _low;
    private readonly double[] _high;
    private readonly int _peak;
    private readonly double _noise;
    private readonly double[] _logs;
    private double _scale = 1;

    public ModeSearch(Sweep sweep, double lowest)
    {
        _sweep = sweep;
        Count = sweep.CountBelow(0);
        _low = new double[Count];
        _high = new double[Count];
        Array.Fill(_low, lowest);
        _peak = Array.IndexOf(sweep.Mesh.Mean, sweep.Mesh.Mean.Min());
        _logs = new double[sweep.Mesh.Count + 1];
        _noise = Rounding * Math.Sqrt(sweep.Mesh.Count) * Math.Abs(lowest);
    }

    /// <summary>The exact number of modes.</summary>
    public int Count { get; }

    /// <summary>Where a mode was found: its energy, how far it may be off, and the step at whose start the two solutions were joined.</summary>
    public readonly record struct Found(double Energy, double Error, int Match, double Scale);

    /// <summary>Every mode, by increasing energy.</summary>
    public Found[] FindAll(CancellationToken cancellation)
    {
        var found = new Found[Count];
        for (var m = 0; m < Count; m++)
        {
            cancellation.ThrowIfCancellationRequested();
            var guess = m >= 3 ? 3 * found[m - 1].Energy - 3 * found[m - 2].Energy + found[m - 3].Energy
                : m > 0 ? found[m - 1].Energy + (m > 1 ? found[m - 1].Energy - found[m - 2].Energy : 0)
                : double.NaN;
            found[m] = Find(m, guess);
        }

        return found;
    }

    /// <summary>Newton's step at an energy that is all but right, on another mesh: the corrected energy and the step's size.</summary>
    public static (double Energy, double Step) Polish(Sweep sweep, int order, double energy, int match, double scale)
    {
        var (theta, rate) = Angle(sweep, energy, match, scale);
        var step = (order * Math.PI - theta) / rate;
        return (energy + step, Math.Abs(step));
    }

    private Found Find(int order, double guess)
    {
        var energy = Guess(order, guess);
        var match = _peak;
        var (found, error) = Solve(order, energy, match);
        if (HasOneWell(found)) return new(found, error, match, _scale);
        var better = StrongestPoint(found, match);
        if (better == match) return new(found, error, match, _scale);
        var (refined, refinedError) = Solve(order, found, better);
        return new(refined, refinedError, better, _scale);
    }

    private double Guess(int order, double guess)
    {
        if (guess > _low[order] && guess < _high[order]) return guess;
        // The first modes lie near the bottom of the well: a share of the way up that a parabola would give.
        return _low[order] + (_high[order] - _low[order]) * Math.Min(0.5, 1.0 / Math.Max(2, Count - order));
    }

    private (double Energy, double Error) Solve(int order, double energy, int match)
    {
        var mean = _sweep.Mesh.Mean[match];
        var lastAngle = HasOneWell(energy) ? LastAngle : 0;
        var last = double.PositiveInfinity;
        var step = double.PositiveInfinity;
        for (var i = 0; i < MaximumSweeps; i++)
        {
            _scale = Math.Sqrt(Math.Max(Math.Abs(energy - mean), 1e-6));
            var (theta, rate) = Angle(_sweep, energy, match, _scale);
            Tighten(energy, theta);
            var residual = order * Math.PI - theta;
            step = residual / rate;
            var next = energy + step;
            var resolution = Rounding * Math.Abs(energy) + 1e-300;
            if (Math.Abs(step) <= resolution || Math.Abs(residual) < lastAngle)
                return (next, Math.Abs(step * residual) + resolution);
            var slow = Math.Abs(residual) > 0.5 * last;
            // What no longer shrinks and is no more than what rounding does over many steps is rounding.
            if (slow && Math.Abs(step) <= _noise) return (next, _noise);
            if (!(next > _low[order] && next < _high[order]) || slow) next = 0.5 * (_low[order] + _high[order]);
            if (_high[order] - _low[order] <= 2 * resolution) return (next, _high[order] - _low[order]);
            last = slow ? double.PositiveInfinity : Math.Abs(residual);
            energy = next;
        }

        return (energy, Math.Abs(step));
    }

    private void Tighten(double energy, double theta)
    {
        var below = (int)Math.Clamp(Math.Ceiling(theta / Math.PI), 0, Count);
        for (var m = below - 1; m >= 0 && _high[m] > energy; m--) _high[m] = energy;
        for (var m = below; m < Count && _low[m] < energy; m++) _low[m] = energy;
    }

    /// <summary>Θ and its rate at a step's start; leaves the states of the two sweeps behind.</summary>
    private static (double Theta, double Rate) Angle(Sweep sweep, double energy, int match, double scale)
    {
        var (right, rightZeros) = sweep.FromSubstrate(energy, match);
        var (left, leftZeros) = sweep.FromCover(energy, match);
        var theta = Math.PI * (leftZeros + rightZeros - 1)
            + Within(left.Value, left.Slope, scale) + Within(right.Value, -right.Slope, scale);
        var rate = scale * (left.Norm / (scale * scale * left.Amplitude(scale)) + right.Norm / (scale * scale * right.Amplitude(scale)));
        return (theta, rate);
    }

    /// <summary>The angle of (s·u, u′), between 0 and π.</summary>
    private static double Within(double value, double slope, double scale)
    {
        var sign = value < 0 ? -1 : 1;
        return Math.Atan2(scale * Math.Abs(value), sign * slope);
    }

    /// <summary>True when the field oscillates in one stretch only, that of the highest index, where the match stands already.</summary>
    private bool HasOneWell(double energy)
    {
        var stretches = 0;
        var oscillates = false;
        foreach (var mean in _sweep.Mesh.Mean)
        {
            if (mean < energy && !oscillates) stretches++;
            oscillates = mean < energy;
        }

        return stretches <= 1;
    }

    /// <summary>The step start at which the mode is largest: where the product of the two decaying solutions is.</summary>
    private int StrongestPoint(double energy, int current)
    {
        var mesh = _sweep.Mesh;
        _sweep.FromCover(energy, mesh.Count);
        for (var i = 0; i < mesh.Count; i++) _logs[i] = Size(_sweep.States[i]);
        _sweep.FromSubstrate(energy, 0);
        var best = current;
        var bestSize = current < mesh.Count && current > 0 ? _logs[current] + Size(_sweep.States[current]) + WorthMoving : double.NegativeInfinity;
        for (var i = 1; i < mesh.Count; i++)
        {
            var size = _logs[i] + Size(_sweep.States[i]);
            if (size > bestSize) (best, bestSize) = (i, size);
        }

        return best;
    }

    private double Size(FieldState state) => Math.Log(state.Amplitude(_scale)) + 2 * state.Log;
}
