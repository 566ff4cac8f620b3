namespace GuideModes.Solvers.Wkb;

/// <summary>A mode number ν at a level of n_eff², with ∂ν/∂(n_eff²) to leading order.</summary>
internal readonly record struct LevelSample(double Level, double Number, double Slope, double EndShift);

/// <summary>Finds the level at which a decreasing function ν(n_eff²) takes a value.</summary>
/// <remarks>
/// Method: Newton steps with the leading part of the slope, then secant steps, kept in a bracket by bisection.
/// Limits: where ν jumps upward through the value the search ends at the jump.
/// </remarks>
internal static class LevelSearch
{
    private const int MostSteps = 60;

    public static LevelSample Find(Func<double, LevelSample> number, double target, double lower, double upper, double guess, double tolerance = 1e-13)
    {
        var level = guess > lower && guess < upper ? guess : 0.5 * (lower + upper);
        LevelSample last = default;
        for (var step = 0; ; step++)
        {
            var sample = number(level);
            var excess = sample.Number - target;
            if (excess > 0) lower = level;
            else upper = level;
            var next = level - excess / Slope(sample, last, step);
            if (!(next > lower && next < upper)) next = excess == 0 ? level : 0.5 * (lower + upper);
            if (Math.Abs(next - level) <= 3e-16 * level || Math.Abs(excess) <= tolerance * (1 + Math.Abs(target)) || step == MostSteps)
                return sample;
            (last, level) = (sample, next);
        }
    }

    private static double Slope(in LevelSample now, in LevelSample last, int step)
    {
        if (step == 0 || now.Level == last.Level) return now.Slope;
        var secant = (now.Number - last.Number) / (now.Level - last.Level);
        var share = secant / now.Slope;
        return share is > 0.2 and < 8 ? secant : now.Slope;
    }
}
