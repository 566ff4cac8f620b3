using System.Collections.Immutable;

namespace GuideModes.Solvers.Wkb;

/// <summary>Puts the modes of all wells in one order and says what the wells do to each other.</summary>
/// <remarks>
/// With η the action of a barrier, two modes of equal n_eff on its sides split by ±e^(−η) rad of phase at most, and modes further apart
/// repel by the square of that over their distance. Source: Landau and Lifshitz, Quantum Mechanics (1977), §50, problem 3, with the
/// factor of a step barrier, 2κγ/(κ² + γ²) ≤ 1, left at its largest. Limits: a customary estimate.
/// </remarks>
internal sealed class CoupledWells(WellFinder finder, WellPhase phase)
{
    public IEnumerable<WkbMode> Report(List<FoundMode> modes)
    {
        for (var i = 0; i < modes.Count; i++)
            yield return Report(modes, i);
    }

    private WkbMode Report(List<FoundMode> modes, int i)
    {
        var mode = modes[i];
        var index = Math.Sqrt(mode.Level);
        finder.Find(mode.Level);
        var well = Math.Max(0, finder.Holding(mode.Node.Anchor));
        var alone = finder.Wells.Count <= 1;
        double? transparency = alone ? null : Leakiest(mode.Level, well);
        var coupling = alone ? default : Couple(modes, i, transparency ?? 0);
        return new()
        {
            Order = i,
            EffectiveIndex = new(index, mode.Error + coupling.Shift),
            FirstOrderIndex = alone ? mode.FirstOrder : null,
            SecondOrderIndex = mode.SecondOrder,
            OrderKept = mode.OrderKept,
            OrderReason = coupling.Near ? mode.Reason + " A mode of another well lies so near that the two share their fields." : mode.Reason,
            TurningPointsUm = TurningPoints(),
            Well = well,
            WellCount = Math.Max(1, finder.Wells.Count),
            OrderInWell = mode.OrderInWell,
            BarrierTransparency = transparency,
            IsNearDegenerate = coupling.Near,
        };
    }

    private ImmutableArray<double> TurningPoints()
    {
        var points = ImmutableArray.CreateBuilder<double>(2 * finder.Wells.Count);
        foreach (var well in finder.Wells)
        {
            points.Add(finder.LeftOf(well));
            points.Add(finder.RightOf(well));
        }

        return points.MoveToImmutable();
    }

    private double Leakiest(double level, int well)
    {
        var most = 0.0;
        if (well > 0) most = Math.Max(most, Transparency(level, finder.RightOf(finder.Wells[well - 1]), finder.LeftOf(finder.Wells[well])));
        if (well + 1 < finder.Wells.Count)
            most = Math.Max(most, Transparency(level, finder.RightOf(finder.Wells[well]), finder.LeftOf(finder.Wells[well + 1])));
        return most;
    }

    private double Transparency(double level, double left, double right) => Math.Exp(-2 * phase.BarrierAction(level, left, right));

    private static (double Shift, bool Near) Couple(List<FoundMode> modes, int i, double transparency)
    {
        var mode = modes[i];
        var split = Math.Sqrt(transparency) * mode.LevelPerRadian;
        var (gap, near) = (double.PositiveInfinity, false);
        foreach (var other in modes)
        {
            if (ReferenceEquals(other.Node, mode.Node)) continue;
            var distance = Math.Abs(other.Level - mode.Level);
            gap = Math.Min(gap, distance);
            near |= distance <= 2 * split || distance <= 2 * Math.Sqrt(mode.Level) * (mode.Error + other.Error);
        }

        var repelled = split * Math.Min(1, split / Math.Max(gap, 1e-300)) + transparency * mode.LevelPerRadian;
        return (repelled / (2 * Math.Sqrt(mode.Level)), near);
    }
}
