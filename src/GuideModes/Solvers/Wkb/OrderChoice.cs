namespace GuideModes.Solvers.Wkb;

/// <summary>Carries a mode of one well from first order to the highest order that pays, and says what the last term was worth.</summary>
/// <remarks>
/// The series is asymptotic: a term is kept while it is well below the one before, and the size of the last term kept is the error; at fourth
/// order the geometric mean of the last two, since the series does not see exponentially small terms.
/// The fourth-order term, (1/2880) d³/dE³ ∫(7V″² − 5V′V‴)/√(E − V), is −(1/1536)·(finite part of ∫(7Q″² − 5Q′Q‴)Q^(−7/2) dx); it is
/// formed only for a well between two turning points of one analytic piece, TE.
/// Sources: Dunham, Phys. Rev. 41 (1932) 713; Bender, Olaussen and Wang, Phys. Rev. D 16 (1977) 1740.
/// Limits: the size of the last term is a customary estimate of the error, not a bound.
/// </remarks>
internal sealed class OrderChoice(ProfileMap map, WellFinder finder, WellPhase phase)
{
    /// <summary>The most that the second order may move the phase, rad: as much as a turning point's own.</summary>
    public const double LargestCorrection = Math.PI / 4;

    /// <summary>Below this n_eff is not told from its neighbour, whatever the order.</summary>
    public const double Rounding = 1e-13;

    /// <summary>The fourth-order term is kept when below this share of the second (experience with x⁴, whose lowest mode it makes worse).</summary>
    private const double FourthShare = 0.2;

    private const int MostPasses = 8;
    private const double SearchTolerance = 1e-12;

    public LevelSample Sample(WellNode node, double level, PhaseKind kind)
    {
        finder.Find(level);
        var well = finder.Holding(node.Anchor);
        if (well < 0) return new(level, -1, -1, 0);
        if (kind == PhaseKind.SecondOrder && phase.SecondOrderClearance(level, well) is var clearance && clearance > 0)
            return Cleared(node, level, level - clearance);
        var value = phase.Evaluate(level, well, kind);
        return new(level, value.Number, -map.Wavenumber / (2 * Math.PI) * value.InverseRoot, value.EndShift);
    }

    /// <summary>The second order with its correction taken at a level a little lower, clear of joints.</summary>
    private LevelSample Cleared(WellNode node, double level, double clear)
    {
        var here = Sample(node, level, PhaseKind.Uniform);
        if (clear <= node.Lower) return here;
        finder.Find(clear);
        var well = finder.Holding(node.Anchor);
        if (well < 0 || phase.SecondOrderClearance(clear, well) > 1e-12) return here;
        var correction = phase.Evaluate(clear, well, PhaseKind.SecondOrder).Number - phase.Evaluate(clear, well, PhaseKind.Uniform).Number;
        return here with { Number = here.Number + correction };
    }

    /// <summary>The mode with its best order; null where no order puts it above the lower end of the range.</summary>
    public FoundMode? Choose(WellNode node, int order, double lower, in LevelSample uniform)
    {
        var solved = Math.Abs(uniform.Number - order) < 1e-6;
        var classic = Classic(node, order, lower, uniform);
        var second = LevelSearch.Find(e => Sample(node, e, PhaseKind.SecondOrder), order, lower, node.Upper, uniform.Level, SearchTolerance);
        var correction = Math.Abs(second.Number - order) > 1e-6 ? double.PositiveInfinity
            : solved ? Math.PI * Math.Abs(uniform.Slope * (second.Level - uniform.Level))
            : Math.PI * Math.Abs(order - Sample(node, second.Level, PhaseKind.Uniform).Number);
        if (!solved && !(correction < LargestCorrection) && uniform.Number < order) return null;

        var perRadian = 1 / Math.Max(Math.PI * Math.Abs(uniform.Slope), 1e-300);
        var mode = new FoundMode
        {
            Node = node,
            OrderInWell = order,
            Level = uniform.Level,
            Error = 0,
            LevelPerRadian = perRadian,
            FirstOrder = HasInnerStep(node, uniform.Level) ? null : classic,
            SecondOrder = Smooth(node, order, lower, classic),
            OrderKept = 1,
            Reason = "",
        };
        var joints = Joints(uniform, classic, perRadian);
        if (!solved) return Barely(mode, second.Level, correction, joints);
        if (correction < 1e-13 && joints == 0 && mode.SecondOrder is null)
            return mode with { Error = Rounding, Reason = "The well and what bounds it are uniform layers, for which the first order is exact." };
        if (correction < LargestCorrection) return Second(mode, uniform, second.Level, joints);
        var span = Math.Abs(Index(second.Level) - Index(uniform.Level));
        return mode with
        {
            Error = Math.Max(Rounding, Math.Max(joints, Math.Max(span, 0.25 * Math.PI * perRadian / (2 * Index(uniform.Level))))),
            Reason = "Stopped at first order: the second-order term moves the phase by more than a turning point's own π/4.",
        };
    }

    private static double Index(double level) => Math.Sqrt(level);

    /// <summary>What the Airy treatment of near joints and the finite barriers moved n_eff by.</summary>
    private static double Joints(in LevelSample uniform, double? classic, double perRadian)
    {
        if (uniform.EndShift == 0) return 0;
        var shift = uniform.EndShift * perRadian / (2 * Index(uniform.Level));
        return classic is { } n ? Math.Max(Math.Abs(n - Index(uniform.Level)), Math.Min(shift, 1e-6)) : shift;
    }

    private static FoundMode Barely(FoundMode mode, double second, double correction, double joints)
    {
        var kept = correction < LargestCorrection;
        var level = kept ? second : mode.Level;
        var error = Math.Max(joints, Math.Max(Math.Abs(Index(second) - Index(mode.Level)), 0.25 * mode.LevelPerRadian / Index(level)));
        return mode with
        {
            Level = level,
            Error = error,
            OrderKept = kept ? 2 : 1,
            Reason = "The first order has no solution here: the mode lies at the very end of its well's range, and the uncertainty is widened.",
        };
    }

    private FoundMode Second(FoundMode mode, in LevelSample uniform, double second, double joints)
    {
        var step = Math.Abs(Index(second) - Index(uniform.Level));
        var error = Math.Max(step, joints);
        var kept = mode with
        {
            Level = second,
            Error = Math.Max(error, Rounding),
            OrderKept = 2,
            Reason = "Stopped at second order: the fourth is known only for a TE well between two turning points of one analytic piece.",
        };
        if (mode.SecondOrder is null || map.IsTransverseMagnetic) return kept;
        var (fourth, moved) = Fourth(mode, second);
        if (!(moved < FourthShare * step))
            return kept with { Reason = "Stopped at second order: the fourth-order term is not well below the second." };
        return kept with
        {
            Level = fourth,
            Error = Math.Max(Rounding, Math.Max(Math.Sqrt(moved * step), joints)),
            OrderKept = 4,
            Reason = "Stopped at fourth order, the highest formed; the uncertainty is the geometric mean of the last two terms.",
        };
    }

    /// <summary>n_eff² to fourth order, and the change of n_eff it makes.</summary>
    private (double Level, double Moved) Fourth(FoundMode mode, double second)
    {
        var (node, order) = (mode.Node, mode.OrderInWell);
        var plain = mode.SecondOrder!.Value * mode.SecondOrder.Value;
        var level = plain;
        for (var pass = 0; pass < MostPasses; pass++)
        {
            finder.Find(level);
            if (!phase.TrySmooth(finder.Holding(node.Anchor), level, true, out var here)) return (second, double.PositiveInfinity);
            var target = order - here.Fourth / Math.PI;
            var next = LevelSearch.Find(e => SmoothSample(node, e), target, node.Lower, node.Upper, level, SearchTolerance);
            if (Math.Abs(next.Number - target) > 1e-9) return (second, double.PositiveInfinity);
            var change = Math.Abs(next.Level - level);
            level = next.Level;
            if (change < 1e-14 * level) break;
        }

        var moved = Index(level) - Index(plain);
        var index = Index(second) + moved;
        return (index * index, Math.Abs(moved));
    }

    /// <summary>The textbook first-order index; null where it has no solution.</summary>
    private double? Classic(WellNode node, int order, double lower, in LevelSample uniform)
    {
        if (uniform.EndShift == 0 && Math.Abs(uniform.Number - order) < 1e-6 && !HasInnerStep(node, uniform.Level)) return Index(uniform.Level);
        var s = LevelSearch.Find(e => Sample(node, e, PhaseKind.Classic), order, lower, node.Upper, uniform.Level);
        return Math.Abs(s.Number - order) < 1e-9 ? Index(s.Level) : null;
    }

    private bool HasInnerStep(WellNode node, double level)
    {
        finder.Find(level);
        var w = finder.Holding(node.Anchor);
        if (w < 0) return false;
        var well = finder.Wells[w];
        for (var i = 1; i < well.Count; i++)
        {
            if (map.IsStep(finder.Arcs[well.First + i].Piece)) return true;
        }

        return false;
    }

    /// <summary>Dunham's second order with joints ignored; null where the well is not between two turning points of one piece.</summary>
    private double? Smooth(WellNode node, int order, double lower, double? classic)
    {
        if (classic is not { } n) return null;
        finder.Find(n * n);
        var well = finder.Holding(node.Anchor);
        if (well < 0 || !phase.TrySmooth(well, n * n, false, out _)) return null;
        var s = LevelSearch.Find(e => SmoothSample(node, e), order, lower, node.Upper, n * n, SearchTolerance);
        return Math.Abs(s.Number - order) < 1e-9 ? Index(s.Level) : null;
    }

    private LevelSample SmoothSample(WellNode node, double level)
    {
        finder.Find(level);
        var well = finder.Holding(node.Anchor);
        return well >= 0 && phase.TrySmooth(well, level, false, out var s)
            ? new(level, s.Number, -map.Wavenumber / (2 * Math.PI) * s.InverseRoot, 0)
            : new(level, double.PositiveInfinity, -1, 0);
    }
}
