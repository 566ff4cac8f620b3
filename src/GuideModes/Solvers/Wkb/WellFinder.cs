namespace GuideModes.Solvers.Wkb;

/// <summary>The part of a well in one piece; Split is where n² is largest in it, the place to halve an arc between two turning points.</summary>
internal readonly record struct Arc(int Piece, double Left, double Right, bool LeftTurning, bool RightTurning, double Split);

/// <summary>A run of arcs, one per piece, on which n² &gt; n_eff².</summary>
internal readonly record struct Well(int First, int Count);

/// <summary>Finds the wells of a profile at one level of n_eff².</summary>
/// <remarks>Holds its lists between calls; one per solve, not shared between threads.</remarks>
internal sealed class WellFinder(ProfileMap map)
{
    private readonly List<Arc> arcs = [];
    private readonly List<Well> wells = [];
    private bool open;
    private double splitSquared;

    public List<Arc> Arcs => arcs;

    public List<Well> Wells => wells;

    public double LeftOf(in Well well) => arcs[well.First].Left;

    public double RightOf(in Well well) => arcs[well.First + well.Count - 1].Right;

    public void Find(double level)
    {
        arcs.Clear();
        wells.Clear();
        open = false;
        foreach (ref readonly var segment in map.Segments.AsSpan())
            Visit(segment, level);
    }

    /// <summary>The index of the well that holds x; −1 if none does.</summary>
    public int Holding(double x)
    {
        for (var i = 0; i < wells.Count; i++)
        {
            if (x >= LeftOf(wells[i]) && x <= RightOf(wells[i])) return i;
        }

        return -1;
    }

    private void Visit(in Segment segment, double level)
    {
        var (left, right) = (segment.LeftSquared > level, segment.RightSquared > level);
        if (!left && !right)
        {
            open = false;
            return;
        }

        var crossing = left && right ? 0 : map.Crossing(segment, level);
        var from = left ? segment.Left : crossing;
        var to = right ? segment.Right : crossing;
        if (!left) open = false;
        Append(new(segment.Piece, from, to, !left, !right, segment.LeftSquared > segment.RightSquared ? from : to), segment.Most);
        open = right;
    }

    private void Append(in Arc arc, double most)
    {
        if (open && arcs[^1].Piece == arc.Piece)
        {
            var last = arcs[^1];
            arcs[^1] = last with { Right = arc.Right, RightTurning = arc.RightTurning, Split = most > splitSquared ? arc.Split : last.Split };
            splitSquared = Math.Max(splitSquared, most);
            return;
        }

        arcs.Add(arc);
        splitSquared = most;
        if (open) wells[^1] = wells[^1] with { Count = wells[^1].Count + 1 };
        else wells.Add(new(arcs.Count - 1, 1));
    }
}
