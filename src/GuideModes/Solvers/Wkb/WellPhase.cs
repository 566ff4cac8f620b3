using GuideModes.Numerics;

namespace GuideModes.Solvers.Wkb;

/// <summary>Which terms a phase is asked with.</summary>
internal enum PhaseKind
{
    /// <summary>∫κ, π/4 at turning points, arctan of decay over phase rate at steps.</summary>
    Classic,

    /// <summary>The same, with Airy functions wherever a turning point is near a joint.</summary>
    Uniform,

    /// <summary>With the second-order term and the slopes of the amplitude at joints.</summary>
    SecondOrder,
}

/// <summary>What came up while a phase was formed.</summary>
/// <param name="Phase">The phase in excess of the ends' own, rad: πν.</param>
/// <param name="InverseRoot">∫dx/√q: −k₀/2 times it is the leading part of ∂phase/∂(n_eff²).</param>
/// <param name="EndShift">How far the treatment of near joints and finite barriers moved the phase, rad.</param>
internal readonly record struct PhaseValue(double Phase, double InverseRoot, double EndShift)
{
    public double Number => Phase / Math.PI;
}

/// <summary>ν by Dunham's rule to second order, ∫dx/√q, and the fourth-order term of the phase.</summary>
internal readonly record struct SmoothValue(double Number, double InverseRoot, double Fourth);

/// <summary>The continuous mode number of a well, ν(n_eff²), to first or second order.</summary>
/// <remarks>
/// Equation: u″ + Qu = 0 with Q = k₀²(n² − n_eff²) for u = E (TE), and with U = ¾(s′/s)² − ½s″/s, s = n², taken from
/// Q for u = H/n (TM). u = S′^(−½) cos S, S′ = κ + s₂, κ = √Q, s₂ = −(1/48)Q″Q^(−3/2) − (5/48)(Q′Q^(−3/2))′ − U/(2κ).
/// A mode has S from −φ_left to mπ + φ_right. S is carried from piece to piece through joints by the continuity of the
/// log-derivative; within an Airy length of a turning point, real or virtual, Airy functions take the cosine's place:
/// there S′ = θ′(ζ)ζ′ (<see cref="AiryPhase"/>) with ζ Langer's variable, so that ν does not jump as a turning point crosses a joint.
/// Sources: Dunham, Phys. Rev. 41 (1932) 713; Langer, Phys. Rev. 51 (1937) 669; Bender, Olaussen and Wang, Phys. Rev. D 16
/// (1977) 1740; Bender and Orszag, Advanced Mathematical Methods (1978), ch. 10.
/// Limits: asymptotic in k₀ times the length over which n² changes. Beyond a barrier another well is left out of account.
/// </remarks>
internal sealed class WellPhase(ProfileMap map, WellFinder finder, PhaseIntegral integral)
{
    private const double NearZeta = 2, FarZeta = 4, FarAction = 20, NearestZeta = 0.02;
    private readonly double k = map.Wavenumber;

    /// <summary>The phase of a well that the finder holds for this level.</summary>
    /// <remarks>
    /// S is carried from the left to each arc in turn, and what the right end asks for is carried back to it. The two differ by the same
    /// multiple of π at a mode wherever they are compared; between modes a joint bends the scale. Where a joint is near the right turning
    /// point they are compared on its left, so that ν stays continuous while the turning point crosses it.
    /// </remarks>
    public PhaseValue Evaluate(double level, int wellIndex, PhaseKind kind)
    {
        var well = finder.Wells[wellIndex];
        Span<double> starts = well.Count <= 128 ? stackalloc double[well.Count] : new double[well.Count];
        Span<double> lengths = well.Count <= 128 ? stackalloc double[well.Count] : new double[well.Count];
        Span<Joint> joints = well.Count <= 128 ? stackalloc Joint[well.Count] : new Joint[well.Count];
        double inverse = 0, shift = 0, action = 0, before = 0;
        for (var i = 0; i < well.Count; i++)
        {
            var arc = finder.Arcs[well.First + i];
            var over = integral.Over(arc.Piece, level, arc.Left, arc.Right, arc.LeftTurning, arc.RightTurning, arc.Split);
            (before, action) = (action, k * over.Root);
            inverse += over.InverseRoot;
            lengths[i] = action + (kind == PhaseKind.SecondOrder ? SecondOrder(arc, level) : 0);
            if (i == 0)
            {
                starts[0] = -End(arc, level, -1, action, kind, ref shift);
                continue;
            }

            joints[i] = JointAt(finder.Arcs[well.First + i - 1], arc, level, before, action, kind);
            var phase = starts[i - 1] + lengths[i - 1];
            starts[i] = joints[i].Across(phase);
            if (joints[i].Blend > 0) shift += Math.Abs(starts[i] - phase);
        }

        var wanted = End(finder.Arcs[well.First + well.Count - 1], level, 1, action, kind, ref shift) - lengths[^1];
        var excess = starts[^1] - wanted;
        for (var i = well.Count - 1; i > 0; i--)
        {
            wanted = joints[i].Back(wanted) - lengths[i - 1];
            if (joints[i].NearRight > 0) excess += joints[i].NearRight * (starts[i - 1] - wanted - excess);
        }

        return new(excess, inverse, shift);
    }

    /// <summary>How S passes an interior joint: tan S₂ = α tan S₁ + δ at the joint itself, and the offsets of the cosine forms there.</summary>
    private readonly record struct Joint(double Alpha, double Delta, double LeftOffset, double RightOffset, double NearRight, double Blend)
    {
        public double Across(double phase) => Bend(phase + LeftOffset, Alpha, Delta) + RightOffset;

        public double Back(double phase) => Bend(phase - RightOffset, 1 / Alpha, -Delta / Alpha) - LeftOffset;

        private static double Bend(double phase, double alpha, double delta)
        {
            var turns = Math.Round(phase / Math.PI) * Math.PI;
            var (sin, cos) = Math.SinCos(phase - turns);
            return turns + Math.Atan2(alpha * sin + delta * cos, cos);
        }
    }

    /// <summary>First-order phases for a field: S at the start of each arc and what each adds; the phase in excess of the ends' own is returned.</summary>
    public double ArcPhases(double level, int wellIndex, Span<double> start, Span<double> length)
    {
        var well = finder.Wells[wellIndex];
        var none = 0.0;
        for (var i = 0; i < well.Count; i++)
        {
            var arc = finder.Arcs[well.First + i];
            length[i] = k * integral.Over(arc.Piece, level, arc.Left, arc.Right, arc.LeftTurning, arc.RightTurning, arc.Split).Root;
            start[i] = i == 0
                ? -End(arc, level, -1, length[0], PhaseKind.Classic, ref none)
                : JointAt(finder.Arcs[well.First + i - 1], arc, level, 0, 0, PhaseKind.Classic).Across(start[i - 1] + length[i - 1]);
        }

        var last = finder.Arcs[well.First + well.Count - 1];
        return start[well.Count - 1] + length[well.Count - 1] - End(last, level, 1, 0, PhaseKind.Classic, ref none);
    }

    /// <summary>
    /// How far n_eff² has to be lowered before no turning point is within a small part of an Airy length of a joint: nearer than that the
    /// second-order integrals nearly cancel, and what they leave hardly changes.
    /// </summary>
    public double SecondOrderClearance(double level, int wellIndex)
    {
        var well = finder.Wells[wellIndex];
        var clearance = 0.0;
        for (var i = 0; i < well.Count; i++)
        {
            var arc = finder.Arcs[well.First + i];
            if (!arc.LeftTurning) clearance = Math.Max(clearance, Clearance(JetAt(arc, -1), level));
            if (!arc.RightTurning) clearance = Math.Max(clearance, Clearance(JetAt(arc, 1), level));
        }

        return clearance;
    }

    private double Clearance(in Jet s, double level) =>
        s.D1 == 0 ? 0 : Math.Max(0, NearestZeta * Math.Pow(Math.Abs(k * k * s.D1), 2.0 / 3) / (k * k) - (s.Value - level));

    /// <summary>ν of a well between two turning points of one piece, by Dunham's rule to second order, joints ignored, and the fourth-order phase.</summary>
    public bool TrySmooth(int wellIndex, double level, bool fourth, out SmoothValue value)
    {
        value = default;
        if (wellIndex < 0 || finder.Wells[wellIndex].Count != 1) return false;
        var arc = finder.Arcs[finder.Wells[wellIndex].First];
        if (!arc.LeftTurning || !arc.RightTurning) return false;
        var action = integral.Over(arc.Piece, level, arc.Left, arc.Right, true, true, arc.Split);
        var c = integral.CorrectionOver(arc, level, fourth);
        var total = k * action.Root - c.Curvature / (48 * k) - c.Medium / (2 * k);
        value = new(total / Math.PI - 0.5, action.InverseRoot, -c.Fourth / (1536 * k * k * k));
        return true;
    }

    /// <summary>∫|κ| between two coordinates where n² &lt; n_eff² all along.</summary>
    public double BarrierAction(double level, double left, double right)
    {
        var total = 0.0;
        for (var i = 0; i < map.Starts.Length; i++)
        {
            var extent = map.Profile.Pieces[i].Extent;
            var (from, to) = (Math.Max(left, extent.Start), Math.Min(right, extent.End));
            if (!(to > from)) continue;
            var (leftTurning, rightTurning) = (from > extent.Start, to < extent.End);
            total += k * integral.Over(i, level, from, to, leftTurning, rightTurning, 0.5 * (from + to), -1).Root;
        }

        return total;
    }

    /// <summary>∫s₂ over an arc, the ends that are not turning points included.</summary>
    private double SecondOrder(in Arc arc, double level)
    {
        if (map.Profile.Pieces[arc.Piece].IsUniform) return 0;
        var c = integral.CorrectionOver(arc, level, fourth: false);
        var sum = -c.Curvature / (48 * k) - c.Medium / (2 * k);
        if (!arc.LeftTurning) sum += 5.0 / 48 * SlopeTerm(JetAt(arc, -1), level);
        if (!arc.RightTurning) sum -= 5.0 / 48 * SlopeTerm(JetAt(arc, 1), level);
        return sum;
    }

    private double SlopeTerm(in Jet s, double level)
    {
        var q = Math.Max(s.Value - level, 1e-30);
        return s.D1 / (q * Math.Sqrt(q) * k);
    }

    private Jet JetAt(in Arc arc, int side) => side > 0 ? map.Ends[arc.Piece] : map.Starts[arc.Piece];

    /// <summary>The end phase φ on one side (−1 left, +1 right).</summary>
    private double End(in Arc arc, double level, int side, double action, PhaseKind kind, ref double shift)
    {
        var turning = side > 0 ? arc.RightTurning : arc.LeftTurning;
        var joint = side > 0 ? arc.Piece + 1 : arc.Piece;
        if (turning)
        {
            if (kind == PhaseKind.Classic || map.IsSeamless(joint)) return Math.PI / 4;
            var bend = TunnelPhase(arc, level, side, kind);
            shift += Math.Abs(bend);
            return Math.PI / 4 - bend;
        }

        if (kind == PhaseKind.Classic) return ClassicEnd(arc, level, side, joint);
        var near = SideAt(arc, level, side, action, kind);
        var drive = Ratio(joint, -side) * DecayRate(joint, side, level, kind, 0);
        var phase = Math.Atan((drive - near.AmplitudeSlope + near.MediumSlope) / near.Rate) - near.Offset;
        if (kind == PhaseKind.Uniform) shift += ShiftFrom(ClassicEnd(arc, level, side, joint), phase);
        return phase;
    }

    private static double ShiftFrom(double classic, double phase) => Math.Abs(phase - classic) is var d && d > 1e-13 ? d : 0;

    private double ClassicEnd(in Arc arc, double level, int side, int joint)
    {
        if (!map.IsStep(joint)) return Math.PI / 4;
        var inside = JetAt(arc, side).Value;
        var outside = side > 0 ? map.RightOf(joint) : map.LeftOf(joint);
        var ratio = Math.Sqrt(Math.Max(0, level - outside) / (inside - level));
        return Math.Atan(map.IsTransverseMagnetic ? inside / outside * ratio : ratio);
    }

    /// <summary>w_far/w_near = n²_near/n²_far for TM, 1 for TE; near is the side of the joint named (−1 left, +1 right).</summary>
    private double Ratio(int joint, int near)
    {
        if (!map.IsTransverseMagnetic) return 1;
        return near < 0 ? map.LeftOf(joint) / map.RightOf(joint) : map.RightOf(joint) / map.LeftOf(joint);
    }

    private Joint JointAt(in Arc from, in Arc to, double level, double actionFrom, double actionTo, PhaseKind kind)
    {
        var joint = to.Piece;
        if (kind == PhaseKind.Classic && !map.IsStep(joint)) return new(1, 0, 0, 0, 0, 0);
        var left = SideAt(from, level, 1, actionFrom, kind);
        var right = SideAt(to, level, -1, actionTo, kind);
        var ratio = Ratio(joint, 1);
        var delta = ratio * (left.AmplitudeSlope - left.MediumSlope) + right.AmplitudeSlope - right.MediumSlope;
        return new(
            ratio * left.Rate / right.Rate,
            delta / right.Rate,
            left.Offset,
            right.Offset,
            right.Inward ? right.Blend : 0,
            Math.Max(left.Blend, right.Blend));
    }

    /// <summary>What the field does at the inner side of a joint.</summary>
    /// <param name="Rate">S′</param>
    /// <param name="AmplitudeSlope">S″/(2S′), outward</param>
    /// <param name="MediumSlope">s′/(2s), outward (TM)</param>
    /// <param name="Offset">The phase at the joint less what the cosine form says of it, outward.</param>
    /// <param name="Blend">The weight of the Airy form.</param>
    /// <param name="Inward">True where the turning point of that form lies inside the well.</param>
    private readonly record struct Side(double Rate, double AmplitudeSlope, double MediumSlope, double Offset, double Blend, bool Inward = false);

    private Side SideAt(in Arc arc, double level, int side, double action, PhaseKind kind)
    {
        var s = JetAt(arc, side);
        var q = k * k * Math.Max(s.Value - level, 1e-30);
        var kappa = Math.Sqrt(q);
        if (map.Profile.Pieces[arc.Piece].IsUniform || kind == PhaseKind.Classic) return new(kappa, 0, 0, 0, 0);
        var slope = side * k * k * s.D1;
        var second = kind == PhaseKind.SecondOrder;
        var medium = second && map.IsTransverseMagnetic ? side * s.D1 / (2 * s.Value) : 0;
        var plain = new Side(kappa, second ? slope / (4 * q) : 0, medium, 0, 0);
        var langer = Nearest(arc, q, slope, k * k * s.D2, side, action, Opposite(arc, level, side));
        return langer.Weight > 0 ? Mix(plain, langer, second) : plain;
    }

    /// <summary>
    /// Langer's variable at a joint: ζ, ζ′ and ζ″ in the direction into the well from the turning point, whether that
    /// lies beyond the joint, and how much the Airy form counts.
    /// </summary>
    private readonly record struct Langer(double Zeta, double Slope, double Bend, bool Outward, double Weight);

    private static Side Mix(in Side plain, in Langer at, bool second)
    {
        var airy = AiryPhase.At(at.Zeta);
        var rate = airy.Rate * at.Slope;
        var amplitude = airy.HalfLogSlope * at.Slope + 0.5 * at.Bend / at.Slope;
        var offset = airy.Theta - AiryPhase.Asymptotic(Math.Max(at.Zeta, 1e-9), second);
        var sign = at.Outward ? -1 : 1;
        return new(
            plain.Rate + at.Weight * (rate - plain.Rate),
            plain.AmplitudeSlope + at.Weight * (sign * amplitude - plain.AmplitudeSlope),
            plain.MediumSlope,
            at.Weight * sign * offset,
            at.Weight,
            !at.Outward);
    }

    /// <summary>The virtual turning point beyond the other end of an arc.</summary>
    private Langer Opposite(in Arc arc, double level, int side)
    {
        var s = JetAt(arc, -side);
        var q = k * k * (s.Value - level);
        return q > 0 && side * s.D1 > 0 ? Virtual(q, side * k * k * s.D1, k * k * s.D2) : default;
    }

    private static Langer Nearest(in Arc arc, double q, double slope, double curvature, int side, double action, in Langer opposite)
    {
        var beyond = slope < 0 ? Virtual(q, -slope, curvature) : default;
        var inside = side > 0 ? arc.LeftTurning : arc.RightTurning;
        if (!inside && (opposite.Weight == 0 || slope <= 0)) return beyond;
        var phase = inside ? action : action + 2.0 / 3 * opposite.Zeta * Math.Sqrt(opposite.Zeta);
        var zeta = Math.Pow(1.5 * phase, 2.0 / 3);
        var weight = Far(zeta) * (inside ? 1 : opposite.Weight);
        if (weight <= beyond.Weight) return beyond;
        var rate = Math.Sqrt(q / Math.Max(zeta, 1e-150));
        var bend = zeta > 0.02 ? (slope - rate * rate * rate) / (2 * rate * zeta) : curvature / (5 * rate * rate);
        return new(zeta, rate, bend, false, weight);
    }

    /// <summary>The turning point that a parabola through Q, its slope and its curvature has beyond the joint.</summary>
    private static Langer Virtual(double q, double fall, double curvature)
    {
        if (q > 8 * Math.Pow(fall, 2.0 / 3)) return default;
        var discriminant = fall * fall - 2 * curvature * q;
        if (!(discriminant > 0)) return default;
        var a = Math.Sqrt(discriminant);
        var y = 2 * q / (fall + a);
        var bend = 0.5 * curvature * y / a;
        var scale = Math.Cbrt(a);
        var zeta = scale * y * (1 + bend / 5);
        var weight = Far(zeta) * (1 - Smooth((Math.Abs(bend) - 0.3) / 0.4));
        return new(zeta, scale * (1 + 0.4 * bend), curvature / (5 * scale * scale), true, weight);
    }

    private static double Far(double zeta) => 1 - Smooth((zeta - NearZeta) / (FarZeta - NearZeta));

    private static double Smooth(double t)
    {
        t = Math.Clamp(t, 0, 1);
        return t * t * t * (10 + t * (6 * t - 15));
    }

    /// <summary>atan c for the field Ai + c·Bi beyond a turning point: what a joint at a finite distance does to the end phase.</summary>
    private double TunnelPhase(in Arc arc, double level, int side, PhaseKind kind)
    {
        var turning = side > 0 ? arc.Right : arc.Left;
        if (!BarrierInPiece(arc.Piece, turning, level, side, out var action)) return 0;
        var s = JetAt(arc, side);
        var z = Math.Max(Math.Pow(1.5 * action, 2.0 / 3), 1e-9);
        var joint = side > 0 ? arc.Piece + 1 : arc.Piece;
        var medium = map.IsTransverseMagnetic && kind == PhaseKind.SecondOrder ? side * s.D1 / (2 * s.Value) : 0;
        var log = -Ratio(joint, -side) * DecayRate(joint, side, level, kind, 0) - medium;
        var (fall, rise) = EdgeRates(s, level, side, z, kind);
        var airy = AiryTable.At(z);
        return Math.Atan2((log + fall) * airy.Ai, (rise - log) * airy.Bi);
    }

    /// <summary>
    /// The outward rates of the falling and the rising solution where a barrier behind a turning point ends: Langer's, unless
    /// the local slope says that n² has long levelled off there.
    /// </summary>
    private (double Fall, double Rise) EdgeRates(in Jet s, double level, int side, double z, PhaseKind kind)
    {
        var local = Rates(s, level, side, kind);
        var q = k * k * Math.Max(level - s.Value, 1e-30);
        var slope = -side * k * k * s.D1;
        var spread = slope > 0 ? Math.Abs(Math.Log(q / Math.Pow(slope, 2.0 / 3) / z)) : 10;
        var weight = z < 1e-6 ? 1 : 1 - Smooth((spread - 0.5) / 0.7);
        if (weight == 0) return local;
        var rate = z < 1e-6 ? Math.Cbrt(Math.Max(slope, 1e-30)) : Math.Sqrt(q / z);
        var bend = z > 0.02 ? (slope - rate * rate * rate) / (2 * rate * z) : -k * k * s.D2 / (5 * rate * rate);
        var (fall, rise) = AiryRates(z, rate);
        var half = 0.5 * bend / rate;
        return (weight * (fall + half) + (1 - weight) * local.Fall, weight * (rise - half) + (1 - weight) * local.Rise);
    }

    /// <summary>The action from a turning point outward to the end of its piece; false where it is large or another well comes first.</summary>
    private bool BarrierInPiece(int piece, double turning, double level, int side, out double action)
    {
        action = 0;
        var end = side > 0 ? map.Profile.Pieces[piece].Extent.End : map.Profile.Pieces[piece].Extent.Start;
        if (Blocks(piece, turning, end, level, out var dark) || !dark) return false;
        action = k * integral.Over(piece, level, Math.Min(turning, end), Math.Max(turning, end), side > 0, side < 0, 0, -1).Root;
        return action < FarAction;
    }

    /// <summary>True where the barrier between two coordinates of one piece is surely thick; dark tells whether n² &lt; n_eff² all along.</summary>
    private bool Blocks(int piece, double a, double b, double level, out bool dark)
    {
        var (low, high) = (Math.Min(a, b), Math.Max(a, b));
        double least = 0;
        dark = true;
        foreach (ref readonly var segment in map.SegmentsOf(piece))
        {
            if (segment.Right <= low || segment.Left >= high) continue;
            var whole = segment.Left >= low && segment.Right <= high;
            if (whole && segment.Most > level) dark = false;
            var (from, to) = (Math.Max(low, segment.Left), Math.Min(high, segment.Right));
            for (var i = 1; i < 4; i++)
            {
                var x = from + 0.25 * i * (to - from);
                var depth = level - map.Profile.Pieces[piece].IndexSquared(x);
                if (depth > 0)
                    least = Math.Max(least, k * Math.Sqrt(depth) * (segment.LeftSquared > segment.RightSquared ? to - x : x - from));
            }
        }

        return least > FarAction;
    }

    /// <summary>Γ: the field beyond a joint falls off as −Γ times itself, slope and field as continuity asks for them, n² of the far side left out.</summary>
    private double DecayRate(int joint, int side, double level, PhaseKind kind, int depth)
    {
        var far = side > 0 ? map.RightOf(joint) : map.LeftOf(joint);
        var gamma = k * Math.Sqrt(Math.Max(0, level - far));
        var piece = side > 0 ? joint : joint - 1;
        if (piece < 0 || piece >= map.Starts.Length || depth > 256) return gamma;
        var next = side > 0 ? joint + 1 : joint - 1;
        var beyond = side > 0 ? map.RightOf(next) : map.LeftOf(next);
        if (map.Profile.Pieces[piece].IsUniform)
        {
            var eta = gamma * map.Profile.Pieces[piece].Extent.Length;
            if (eta > FarAction || beyond > level) return gamma;
            return Layer(gamma, eta, Ratio(next, -side) * DecayRate(next, side, level, kind, depth + 1), map.Profile.Pieces[piece].Extent.Length);
        }

        return GradedDecay(piece, next, side, level, beyond, kind, depth);
    }

    private static double Layer(double gamma, double eta, double outer, double length)
    {
        if (eta < 1e-8) return outer / (1 + outer * length);
        var t = Math.Tanh(eta);
        return gamma * (outer + gamma * t) / (gamma + outer * t);
    }

    private double GradedDecay(int piece, int next, int side, double level, double beyond, PhaseKind kind, int depth)
    {
        var (near, far) = side > 0 ? (map.Starts[piece], map.Ends[piece]) : (map.Ends[piece], map.Starts[piece]);
        var medium = map.IsTransverseMagnetic && kind == PhaseKind.SecondOrder ? side * near.D1 / (2 * near.Value) : 0;
        var (fall, rise) = Rates(near, level, side, kind);
        var extent = map.Profile.Pieces[piece].Extent;
        var (a, b) = side > 0 ? (extent.Start, extent.End) : (extent.End, extent.Start);
        if (far.Value >= level || beyond > level || Blocks(piece, a, b, level, out var dark) || !dark) return fall - medium;
        var action = k * integral.Over(piece, level, extent.Start, extent.End, false, false, 0, -1).Root;
        if (action > FarAction) return fall - medium;
        var (fallFar, riseFar) = Rates(far, level, side, kind);
        var mediumFar = map.IsTransverseMagnetic && kind == PhaseKind.SecondOrder ? side * far.D1 / (2 * far.Value) : 0;
        var log = -Ratio(next, -side) * DecayRate(next, side, level, kind, depth + 1) - mediumFar;
        var growth = (log + fallFar) / (riseFar - log) * Through(near, level, side, action);
        return (fall - growth * rise) / (1 + growth) - medium;
    }

    /// <summary>What a wave that rises toward the near edge of a barrier has left there, against the falling one: e^(−2η), or its Airy form near a turning point.</summary>
    private double Through(in Jet near, double level, int side, double action)
    {
        var slope = -side * k * k * near.D1;
        var plain = Math.Exp(-2 * action);
        var z = slope > 0 ? k * k * Math.Max(level - near.Value, 1e-30) / Math.Pow(slope, 2.0 / 3) : FarZeta;
        var weight = Far(z);
        if (weight == 0) return plain;
        var far = Math.Pow(z * Math.Sqrt(z) + 1.5 * action, 2.0 / 3);
        var (there, here) = (AiryTable.At(far), AiryTable.At(z));
        return weight * there.Ai * here.Bi / (there.Bi * here.Ai) + (1 - weight) * plain;
    }

    /// <summary>The outward rates of the falling and the rising solution at the edge of a graded barrier.</summary>
    private (double Fall, double Rise) Rates(in Jet s, double level, int side, PhaseKind kind)
    {
        var q = k * k * Math.Max(level - s.Value, 1e-30);
        var gamma = Math.Sqrt(q);
        var slope = -side * k * k * s.D1;
        var bend = kind == PhaseKind.SecondOrder ? slope / (4 * q) : 0;
        if (slope <= 0) return (gamma + Math.Max(bend, -0.5 * gamma), gamma - Math.Max(bend, -0.5 * gamma));
        var z = q / Math.Pow(slope, 2.0 / 3);
        if (z >= FarZeta) return (gamma + bend, gamma - bend);
        var (fall, rise) = AiryRates(z, Math.Cbrt(slope));
        var weight = Far(z);
        return (weight * fall + (1 - weight) * (gamma + bend), weight * rise + (1 - weight) * (gamma - bend));
    }

    private static (double Fall, double Rise) AiryRates(double z, double scale)
    {
        var airy = AiryTable.At(z);
        return (-scale * airy.AiSlope / airy.Ai, scale * airy.BiSlope / airy.Bi);
    }
}
