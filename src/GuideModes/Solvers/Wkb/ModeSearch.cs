namespace GuideModes.Solvers.Wkb;

/// <summary>One search for all modes of one profile.</summary>
internal sealed class ModeSearch
{
    /// <summary>How near the end of its range a well is looked at, as a share of the range.</summary>
    private const double Inset = 1e-12;

    private readonly ProfileMap map;
    private readonly WellFinder finder;
    private readonly WellPhase phase;
    private readonly int mostModes;
    private readonly CancellationToken cancellation;
    private readonly List<FoundMode> found = [];

    public ModeSearch(ModeProblem problem, int mostModes, CancellationToken cancellation)
    {
        map = new(problem);
        finder = new(map);
        phase = new(map, finder, new(map));
        (this.mostModes, this.cancellation) = (mostModes, cancellation);
    }

    public WkbSolution Run()
    {
        var total = 0.0;
        foreach (var root in WellTree.Build(map))
        {
            Search(root);
            total += Math.Max(0, 1 + AtLower(root).Number);
            if (found.Count > mostModes) return new([], total, SearchOutcome.TooManyModes);
        }

        found.Sort((a, b) => b.Level.CompareTo(a.Level));
        return new([.. found.Select(Report)], total, SearchOutcome.Complete);
    }

    private LevelSample AtLower(WellNode node)
    {
        var level = node.Lower + Inset * (node.Upper - node.Lower);
        return Sample(node, level, PhaseKind.Uniform);
    }

    private LevelSample Sample(WellNode node, double level, PhaseKind kind)
    {
        finder.Find(level);
        var well = finder.Holding(node.Anchor);
        if (well < 0) return new(level, -1, -1, 0);
        var value = phase.Evaluate(level, well, kind);
        return new(level, value.Number, -map.Wavenumber / (2 * Math.PI) * value.InverseRoot, value.EndShift);
    }

    private int Search(WellNode node)
    {
        var first = 0;
        if (node.Left is not null && node.Right is not null) first = Search(node.Left) + Search(node.Right);
        var bottom = AtLower(node);
        var order = first;
        double guess = double.NaN;
        var previous = double.NaN;
        for (; order <= bottom.Number && found.Count <= mostModes; order++)
        {
            cancellation.ThrowIfCancellationRequested();
            var uniform = LevelSearch.Find(e => Sample(node, e, PhaseKind.Uniform), order, bottom.Level, node.Upper, guess);
            found.Add(new(node, order, uniform.Level));
            guess = double.IsNaN(previous) ? uniform.Level + 1 / uniform.Slope : 2 * uniform.Level - previous;
            previous = uniform.Level;
        }

        return order;
    }

    private sealed record FoundMode(WellNode Node, int OrderInWell, double Level);

    private WkbMode Report(FoundMode mode, int order) => new()
    {
        Order = order,
        EffectiveIndex = new(Math.Sqrt(mode.Level), 1e-3),
        FirstOrderIndex = Classic(mode),
        OrderKept = 1,
        OrderReason = "",
        TurningPointsUm = [],
        Well = 0,
        WellCount = 1,
        OrderInWell = mode.OrderInWell,
    };

    private double? Classic(FoundMode mode)
    {
        var bottom = Sample(mode.Node, mode.Node.Lower + Inset * (mode.Node.Upper - mode.Node.Lower), PhaseKind.Classic);
        if (bottom.Number < mode.OrderInWell) return null;
        var s = LevelSearch.Find(e => Sample(mode.Node, e, PhaseKind.Classic), mode.OrderInWell, bottom.Level, mode.Node.Upper, mode.Level);
        return Math.Abs(s.Number - mode.OrderInWell) < 1e-9 ? Math.Sqrt(s.Level) : null;
    }
}
