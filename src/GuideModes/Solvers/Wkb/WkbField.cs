using System.Collections.Immutable;

namespace GuideModes.Solvers.Wkb;

/// <summary>The asymptotic field of one mode in its own well.</summary>
/// <remarks>
/// Method: u = A Q^(−¼) cos S between step ends; where the well ends in a turning point, Langer's uniform form
/// u = A √π (ζ/Q)^¼ Ai(−ζ) with ⅔ζ^(3/2) = ∫κ from it, the two of a well blended over its phase; what the phase lacks of mπ at the
/// mode's n_eff is spread over the well in proportion to the phase. Beyond the well (γ₀/γ)^½ exp(−∫γ), joined by value; TE E = u, TM H = n·u.
/// The norm is integrated numerically over the same field.
/// Source: Langer, Phys. Rev. 51 (1937) 669; Bender and Orszag (1978), §10.4.
/// Limits: first order in amplitude, so a few per cent off for the lowest modes at a step; another well beyond a barrier holds no field.
/// </remarks>
internal sealed class WkbField
{
    private const double Negligible = 10;
    private readonly ProfileMap map;
    private readonly WellFinder finder;
    private readonly PhaseIntegral integral;
    private readonly double k;
    private readonly double level;
    private readonly int order;
    private readonly Well well;
    private readonly double[] start;
    private readonly double[] length;
    private readonly double[] amplitude;
    private readonly double[] before;
    private readonly double total;
    private readonly double lack;
    private readonly (double X, double Field) left;
    private readonly (double X, double Field) right;
    private readonly double scale = 1;
    private int lastArc = -1;
    private double lastX;
    private double lastPhase;

    public WkbField(ModeProblem problem, WkbMode mode)
    {
        map = new(problem);
        finder = new(map);
        integral = new(map);
        k = map.Wavenumber;
        level = mode.EffectiveIndex.Value * mode.EffectiveIndex.Value;
        order = mode.OrderInWell;
        finder.Find(level);
        if (finder.Wells.Count == 0) throw new ArgumentException("The mode does not belong to this guide: no n² lies above its n_eff².", nameof(mode));
        var index = Math.Clamp(mode.Well, 0, finder.Wells.Count - 1);
        well = finder.Wells[index];
        (start, length, amplitude, before) = (new double[well.Count], new double[well.Count], new double[well.Count], new double[well.Count]);
        var excess = new WellPhase(map, finder, integral).ArcPhases(level, index, start, length);
        for (var i = 0; i < well.Count; i++)
        {
            before[i] = total;
            total += length[i];
        }

        lack = order * Math.PI - excess;
        amplitude[0] = 1;
        for (var i = 1; i < well.Count; i++) amplitude[i] = amplitude[i - 1] * AmplitudeRatio(i);
        left = (finder.LeftOf(well), 0);
        right = (finder.RightOf(well), 0);
        if (!First.LeftTurning) left.Field = Inside(0, left.X);
        if (!Last.RightTurning) right.Field = Inside(well.Count - 1, right.X);
        scale = Math.Sign(FirstLobe()) / Math.Sqrt(Norm());
    }

    private Arc First => finder.Arcs[well.First];

    private Arc Last => finder.Arcs[well.First + well.Count - 1];

    public SampledField Sample(ImmutableArray<double> xUm)
    {
        var values = ImmutableArray.CreateBuilder<double>(xUm.Length);
        foreach (var x in xUm) values.Add(At(x));
        return new(xUm, values.MoveToImmutable());
    }

    /// <summary>The field at x, scaled.</summary>
    private double At(double x)
    {
        if (x < left.X) return scale * Outside(x, -1);
        if (x > right.X) return scale * Outside(x, 1);
        var i = 0;
        while (i + 1 < well.Count && x >= finder.Arcs[well.First + i + 1].Left) i++;
        return scale * Inside(i, x);
    }

    private double FirstLobe() => Inside(0, First.LeftTurning ? First.Left + 1e-3 * (First.Right - First.Left) / (order + 1) : First.Left);

    /// <summary>The ratio of amplitudes across an interior joint, from the field or the slope, whichever is larger.</summary>
    private double AmplitudeRatio(int i)
    {
        var (a, b) = (start[i - 1] + length[i - 1], start[i]);
        var joint = finder.Arcs[well.First + i].Piece;
        var (left2, right2) = (map.LeftOf(joint), map.RightOf(joint));
        var roots = Math.Pow((left2 - level) / (right2 - level), 0.25);
        var medium = map.IsTransverseMagnetic ? Math.Sqrt(left2 / right2) : 1;
        return Math.Abs(Math.Cos(a)) > Math.Abs(Math.Sin(a))
            ? medium / roots * Math.Cos(a) / Math.Cos(b)
            : roots / medium * Math.Sin(a) / Math.Sin(b);
    }

    /// <summary>∫κ from the start of an arc to x, from the last one asked for if that lies near.</summary>
    private double PhaseTo(in Arc arc, int i, double x, double s2)
    {
        var room = Math.Min(ShortStep(s2), Math.Min(Room(arc.LeftTurning, arc.Left, x), Room(arc.RightTurning, arc.Right, x)));
        var phase = lastArc == i && Math.Abs(x - lastX) < room
            ? lastPhase + k * integral.Short(arc.Piece, level, lastX, x, 1)
            : WholePhaseTo(arc, i, x);
        (lastArc, lastX, lastPhase) = (i, x, phase);
        return phase;
    }

    /// <summary>How long a step from the last coordinate to this one may be for the low rule.</summary>
    private double Room(bool turning, double end, double x) =>
        turning ? 0.3 * Math.Min(Math.Abs(x - end), Math.Abs(lastX - end)) : double.PositiveInfinity;

    /// <summary>The distance over which the phase moves by at most three radians at the rate of here.</summary>
    private double ShortStep(double s2) => 3 / (k * Math.Sqrt(Math.Abs(s2 - level)) + 1e-12);

    private double WholePhaseTo(in Arc arc, int i, double x)
    {
        if (arc.RightTurning && (!arc.LeftTurning || x > arc.Split))
            return length[i] - k * integral.Over(arc.Piece, level, x, arc.Right, false, true, x).Root;
        return k * integral.Over(arc.Piece, level, arc.Left, x, arc.LeftTurning, false, x).Root;
    }

    private double Inside(int i, double x)
    {
        var arc = finder.Arcs[well.First + i];
        var s2 = map.Profile.Pieces[arc.Piece].IndexSquared(x);
        var phase = PhaseTo(arc, i, x, s2);
        var share = total > 0 ? (before[i] + phase) / total : 0.5;
        var s = start[i] + phase + lack * share;
        var q = k * k * Math.Max(s2 - level, 1e-30);
        var medium = map.IsTransverseMagnetic ? Math.Sqrt(s2) : 1;
        var root = Math.Sqrt(Math.Sqrt(q));
        var weight = !First.LeftTurning ? 1 : !Last.RightTurning ? 0 : share * share * (3 - 2 * share);
        if (!First.LeftTurning && !Last.RightTurning) return medium * amplitude[i] * Math.Cos(s) / root;
        var wave = 0.0;
        if (weight < 1) wave += (1 - weight) * Uniform(s + Math.PI / 4, root, true);
        if (weight > 0) wave += weight * (order % 2 == 0 ? 1 : -1) * Uniform(order * Math.PI + Math.PI / 4 - s, root, false);
        return medium * amplitude[i] * wave;
    }

    private double Uniform(double xi, double root, bool atLeft) =>
        xi < 1e-4 ? AtTurning(atLeft ? First : Last, atLeft) : LangerWave.Oscillating(xi) / root;

    /// <summary>√π (ζ/Q)^¼ Ai(0) at a turning point: (ζ/Q)^¼ → a^(−1/6), a = |Q′|.</summary>
    private double AtTurning(in Arc arc, bool atLeft)
    {
        var slope = k * k * Math.Abs(map.Profile.Pieces[arc.Piece].Jet(atLeft ? arc.Left : arc.Right).D1);
        return Math.Sqrt(Math.PI) * 0.35502805388781724 / Math.Pow(Math.Max(slope, 1e-30), 1.0 / 6);
    }

    private double Outside(double x, int side)
    {
        var turning = side > 0 ? Last.RightTurning : First.LeftTurning;
        var edge = side > 0 ? right : left;
        var piece = side > 0 ? Last.Piece : First.Piece;
        var field = edge.Field;
        var from = edge.X;
        if (turning)
        {
            var end = side > 0 ? map.Profile.Pieces[piece].Extent.End : map.Profile.Pieces[piece].Extent.Start;
            var stop = side > 0 ? Math.Min(x, end) : Math.Max(x, end);
            field = Tunnel(piece, from, stop, side);
            if (stop == x) return field;
            from = end;
        }

        return Beyond(piece + side, from, x, side, field);
    }

    /// <summary>Langer's field from a turning point outward, in its own piece.</summary>
    private double Tunnel(int piece, double turning, double x, int side)
    {
        var p = map.Profile.Pieces[piece];
        var s2 = p.IndexSquared(x);
        if (s2 >= level && Math.Abs(x - turning) > 1e-9 * (1 + Math.Abs(turning))) return 0;
        var arc = side > 0 ? Last : First;
        var sign = side > 0 && order % 2 != 0 ? -1 : 1;
        var medium = map.IsTransverseMagnetic ? Math.Sqrt(s2) : 1;
        var a = side > 0 ? amplitude[^1] : amplitude[0];
        var slot = side > 0 ? -2 : -3;
        var xi = lastArc == slot && Math.Abs(x - lastX) < Math.Min(ShortStep(s2), Room(true, turning, x))
            ? lastPhase + side * k * integral.Short(piece, level, lastX, x, -1)
            : k * integral.Over(piece, level, Math.Min(x, turning), Math.Max(x, turning), side > 0, side < 0, 0, -1).Root;
        (lastArc, lastX, lastPhase) = (slot, x, xi);
        if (xi > 700) return 0;
        var q = k * k * Math.Max(level - s2, 1e-30);
        var wave = xi < 1e-4 ? AtTurning(arc, side < 0) : LangerWave.Decaying(xi) / Math.Sqrt(Math.Sqrt(q));
        return sign * medium * a * wave;
    }

    /// <summary>The field further out, from its value at a joint.</summary>
    private double Beyond(int piece, double from, double x, int side, double field)
    {
        while (piece >= 0 && piece < map.Starts.Length && field != 0)
        {
            var extent = map.Profile.Pieces[piece].Extent;
            var end = side > 0 ? extent.End : extent.Start;
            var stop = side > 0 ? Math.Min(x, end) : Math.Max(x, end);
            field *= Decay(piece, from, stop, side);
            if (stop == x) return field;
            (from, piece) = (end, piece + side);
        }

        var outer = side > 0 ? map.Profile.Substrate.IndexSquared : map.Profile.Cover.IndexSquared;
        return field * Math.Exp(-k * Math.Sqrt(Math.Max(0, level - outer)) * Math.Abs(x - from));
    }

    private double Decay(int piece, double from, double to, int side)
    {
        var p = map.Profile.Pieces[piece];
        var (a, b) = (p.IndexSquared(from), p.IndexSquared(to));
        if (a >= level || b >= level) return 0;
        var action = k * integral.Over(piece, level, Math.Min(from, to), Math.Max(from, to), false, false, 0, -1).Root;
        var medium = map.IsTransverseMagnetic ? Math.Sqrt(b / a) : 1;
        return medium * Math.Sqrt(Math.Sqrt((level - a) / (level - b))) * Math.Exp(-Math.Min(action, 700));
    }

    /// <summary>∫E² dx, or ∫H²/n² dx, of the unscaled field.</summary>
    private double Norm()
    {
        var sum = 0.0;
        for (var i = 0; i < well.Count; i++)
        {
            var arc = finder.Arcs[well.First + i];
            var panels = 3 + (int)Math.Ceiling(length[i] / 2.5);
            for (var j = 0; j < panels; j++)
                sum += Panel(arc.Piece, arc.Left + (arc.Right - arc.Left) * j / panels, arc.Left + (arc.Right - arc.Left) * (j + 1) / panels);
        }

        return sum + Tail(-1) + Tail(1);
    }

    private double Tail(int side)
    {
        var turning = side > 0 ? Last.RightTurning : First.LeftTurning;
        var piece = side > 0 ? (turning ? Last.Piece : Last.Piece + 1) : turning ? First.Piece : First.Piece - 1;
        var x = side > 0 ? right.X : left.X;
        var (sum, action) = (0.0, 0.0);
        while (piece >= 0 && piece < map.Starts.Length && action < Negligible)
        {
            var p = map.Profile.Pieces[piece];
            var end = side > 0 ? p.Extent.End : p.Extent.Start;
            var jet = p.Jet(x);
            var rate = Math.Max(k * Math.Sqrt(Math.Abs(level - jet.Value)), Math.Cbrt(k * k * Math.Abs(jet.D1)));
            var step = Math.Min(Math.Abs(end - x), Math.Max(1 / Math.Max(rate, 1e-9), 1e-6 * Math.Abs(end - x) + 1e-9));
            var next = step >= Math.Abs(end - x) ? end : x + side * step;
            sum += Panel(piece, Math.Min(x, next), Math.Max(x, next));
            action += rate * Math.Abs(next - x);
            x = next;
            if (next == end) piece += side;
        }

        if (action >= Negligible) return sum;
        var outer = side > 0 ? map.Profile.Substrate.IndexSquared : map.Profile.Cover.IndexSquared;
        var edge = At(side > 0 ? Math.BitIncrement(x) : Math.BitDecrement(x));
        return sum + edge * edge / (2 * k * Math.Sqrt(Math.Max(level - outer, 1e-15))) / (map.IsTransverseMagnetic ? outer : 1);
    }

    private double Panel(int piece, double a, double b)
    {
        var rule = HalfRangeRule.Ladder[0];
        var sum = 0.0;
        for (var i = 0; i < rule.Nodes.Length; i++)
        {
            var x = a + (b - a) * rule.Nodes[i];
            var field = At(x);
            sum += rule.Plain[i] * field * field / (map.IsTransverseMagnetic ? map.Profile.Pieces[piece].IndexSquared(x) : 1);
        }

        return sum * (b - a);
    }
}
