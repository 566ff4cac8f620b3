namespace GuideModes.Solvers.Wkb;

/// <summary>One search for all modes of one profile.</summary>
/// <remarks>
/// Method: the wells and how they join as n_eff falls (<see cref="WellTree"/>); in each the levels at which ν = m with uniform ends;
/// from there the higher orders (<see cref="OrderChoice"/>). A well that two others joined to make goes on counting
/// where they stopped, so that every mode number appears once.
/// </remarks>
internal sealed class ModeSearch
{
    /// <summary>How near the end of its range a well is looked at, as a share of the range.</summary>
    private const double Inset = 1e-12;

    /// <summary>The same for the second order, whose integrals rounding spoils earlier.</summary>
    private const double SecondOrderInset = 1e-9;

    /// <summary>A profile with more maxima is not for asymptotics: its ripples are not slow against the field.</summary>
    private const int MostPeaks = 100;

    private readonly ProfileMap map;
    private readonly WellFinder finder;
    private readonly WellPhase phase;
    private readonly OrderChoice orders;
    private readonly int mostModes;
    private readonly CancellationToken cancellation;
    private readonly List<FoundMode> found = [];

    public ModeSearch(ModeProblem problem, int mostModes, CancellationToken cancellation)
    {
        map = new(problem);
        finder = new(map);
        phase = new(map, finder, new(map));
        orders = new(map, finder, phase);
        (this.mostModes, this.cancellation) = (mostModes, cancellation);
    }

    public WkbSolution Run()
    {
        var wells = WellTree.Peaks(map) <= MostPeaks ? WellTree.Build(map) : null;
        if (wells is null) return new([], double.NaN, SearchOutcome.Unresolved);
        var total = 0.0;
        foreach (var root in wells)
        {
            Search(root, out var number);
            total += Math.Max(0, 1 + number);
            if (found.Count > mostModes) return new([], total, SearchOutcome.TooManyModes);
        }

        found.Sort((a, b) => b.Level.CompareTo(a.Level));
        return new([.. new CoupledWells(finder, phase).Report(found)], total, SearchOutcome.Complete);
    }

    /// <summary>ν at the lower end of a well's range, to second order where that is a small correction.</summary>
    private double NumberAtLower(WellNode node, double first)
    {
        var level = Just(node, SecondOrderInset);
        var correction = orders.Sample(node, level, PhaseKind.SecondOrder).Number - orders.Sample(node, level, PhaseKind.Uniform).Number;
        return Math.Abs(correction) < OrderChoice.LargestCorrection / Math.PI ? first + correction : first;
    }

    private static double Just(WellNode node, double inset) => node.Lower + inset * (node.Upper - node.Lower);

    /// <summary>Finds the modes of a well and of those that joined in it; the count of them all, and ν at the lower end of its range.</summary>
    private int Search(WellNode node, out double number)
    {
        var order = 0;
        if (node.Left is not null && node.Right is not null) order = Search(node.Left, out _) + Search(node.Right, out _);
        var lower = Just(node, Inset);
        var first = orders.Sample(node, lower, PhaseKind.Uniform).Number;
        number = NumberAtLower(node, first);
        var last = Math.Max(number, first);
        var (guess, previous) = (double.NaN, double.NaN);
        for (; order <= last && found.Count <= mostModes; order++)
        {
            cancellation.ThrowIfCancellationRequested();
            var uniform = LevelSearch.Find(e => orders.Sample(node, e, PhaseKind.Uniform), order, lower, node.Upper, guess);
            if (orders.Choose(node, order, lower, uniform) is not { } mode) break;
            found.Add(mode);
            guess = double.IsNaN(previous) ? uniform.Level + 1 / uniform.Slope : 2 * uniform.Level - previous;
            previous = uniform.Level;
        }

        return order;
    }
}
