using GuideModes.Profiles;

namespace GuideModes.Solvers.Wkb;

/// <summary>∫√|q| dx and ∫dx/√|q| over part of a piece, q = n² − n_eff².</summary>
internal readonly record struct Action(double Root, double InverseRoot)
{
    public static Action operator +(Action a, Action b) => new(a.Root + b.Root, a.InverseRoot + b.InverseRoot);
}

/// <summary>The correction integrals over part of a piece, all per k₀ powers as named.</summary>
/// <param name="Curvature">finite part of ∫ q″ q^(−3/2) dx</param>
/// <param name="Medium">∫ U q^(−1/2) dx, with U = ¾(s′/s)² − ½s″/s and s = n² (TM)</param>
/// <param name="Fourth">finite part of ∫ (7q″² − 5q′q‴) q^(−7/2) dx</param>
/// <param name="Noise">What rounding in n² may do to the first.</param>
internal readonly record struct Correction(double Curvature, double Medium, double Fourth, double Noise)
{
    public static Correction operator +(Correction a, Correction b) =>
        new(a.Curvature + b.Curvature, a.Medium + b.Medium, a.Fourth + b.Fourth, a.Noise + b.Noise);
}

/// <summary>Phase integrals to rounding, with or without a turning point at one end.</summary>
/// <remarks>
/// Method: on a stretch that ends in a turning point x_t put x = x_t − h·y and q = y·g(y): g is smooth, and the power of y goes into
/// the weights (<see cref="HalfRangeRule"/>), the finite part included. Orders 8 to 32 are tried until two agree;
/// failing that the stretch is halved, the half without the turning point being ordinary Gauss–Legendre.
/// Limits: near a turning point q is a difference, so that the answer carries the rounding of n²; the tolerance knows.
/// </remarks>
internal sealed class PhaseIntegral(ProfileMap map)
{
    private const double Tolerance = 1e-11;
    private const double CorrectionTolerance = 1e-9;
    private const int HighestLevel = 4;

    // Stretches that one integral may try before it takes what it has: rounding may keep two orders from ever agreeing.
    private const int ActionBudget = 1000, CorrectionBudget = 40;
    private const int DeepestHalving = 48;
    private int halfHint = 1;
    private int plainHint;
    private int budget;

    /// <summary>The action over an arc of a well (sign +1), or of a barrier (sign −1), turning points where said.</summary>
    public Action Over(int piece, double level, double left, double right, bool leftTurning, bool rightTurning, double split, int sign = 1)
    {
        var p = map.Profile.Pieces[piece];
        budget = ActionBudget;
        if (p.IsUniform) return Uniform(p.IndexSquared(left) - level, right - left, sign);
        if (leftTurning && rightTurning)
            return Half(p, level, split, left, sign, DeepestHalving) + Half(p, level, split, right, sign, DeepestHalving);
        if (leftTurning) return Half(p, level, right, left, sign, DeepestHalving);
        if (rightTurning) return Half(p, level, left, right, sign, DeepestHalving);
        return Plain(p, level, left, right, sign, DeepestHalving);
    }

    /// <summary>∫√|q| from a to b by one low rule: for steps much shorter than the way to the next turning point.</summary>
    public double Short(int piece, double level, double a, double b, int sign) =>
        PlainSum(HalfRangeRule.Ladder[0], map.Profile.Pieces[piece], level, a, b - a, sign).Root;

    /// <summary>The corrections over an arc of a well.</summary>
    public Correction CorrectionOver(in Arc arc, double level, bool fourth)
    {
        var p = map.Profile.Pieces[arc.Piece];
        if (p.IsUniform) return default;
        budget = CorrectionBudget;
        if (arc.LeftTurning && arc.RightTurning)
        {
            return HalfCorrection(p, level, arc.Split, arc.Left, fourth, DeepestHalving)
                + HalfCorrection(p, level, arc.Split, arc.Right, fourth, DeepestHalving);
        }

        if (arc.LeftTurning) return HalfCorrection(p, level, arc.Right, arc.Left, fourth, DeepestHalving);
        if (arc.RightTurning) return HalfCorrection(p, level, arc.Left, arc.Right, fourth, DeepestHalving);
        return PlainCorrection(p, level, arc.Left, arc.Right, DeepestHalving);
    }

    private static Action Uniform(double q, double length, int sign)
    {
        var root = Math.Sqrt(Math.Max(0, sign * q));
        return new(root * length, length / Math.Max(root, 1e-150));
    }

    private Action Half(SmoothPiece piece, double level, double regular, double turning, int sign, int depth)
    {
        var h = Math.Abs(turning - regular);
        if (h <= 4e-16 * Math.Abs(turning)) return default;
        budget--;
        var last = HalfSum(HalfRangeRule.Ladder[halfHint], piece, level, regular, turning, sign);
        for (var k = halfHint + 1; k <= HighestLevel; k++)
        {
            var next = HalfSum(HalfRangeRule.Ladder[k], piece, level, regular, turning, sign);
            var change = Math.Abs(next.Root - last.Root);
            if (change <= Tolerance * next.Root + Noise(level, next) || depth == 0 || budget < 0)
            {
                halfHint = change <= 1e-4 * Tolerance * next.Root && halfHint > 0 ? halfHint - 1 : k - 1;
                return next;
            }

            last = next;
        }

        if (halfHint > 2) halfHint = 2;
        var middle = 0.5 * (regular + turning);
        return (regular < turning ? Plain(piece, level, regular, middle, sign, depth - 1) : Plain(piece, level, middle, regular, sign, depth - 1))
            + Half(piece, level, middle, turning, sign, depth - 1);
    }

    private Action Plain(SmoothPiece piece, double level, double left, double right, int sign, int depth)
    {
        var h = right - left;
        if (h <= 0) return default;
        budget--;
        var last = PlainSum(HalfRangeRule.Ladder[plainHint], piece, level, left, h, sign);
        for (var k = plainHint + 1; k <= HighestLevel; k++)
        {
            var next = PlainSum(HalfRangeRule.Ladder[k], piece, level, left, h, sign);
            var change = Math.Abs(next.Root - last.Root);
            if (change <= Tolerance * next.Root + Noise(level, next) || depth == 0 || budget < 0)
            {
                plainHint = change <= 1e-4 * Tolerance * next.Root && plainHint > 0 ? plainHint - 1 : k - 1;
                return next;
            }

            last = next;
        }

        if (plainHint > 2) plainHint = 2;
        var middle = left + 0.5 * h;
        return Plain(piece, level, left, middle, sign, depth - 1) + Plain(piece, level, middle, right, sign, depth - 1);
    }

    /// <summary>What rounding in n² may do to ∫√q, and what no mode would notice.</summary>
    private double Noise(double level, in Action action) => 1e-15 * (level * action.InverseRoot + 1 / map.Wavenumber);

    private static Action HalfSum(HalfRangeRule rule, SmoothPiece piece, double level, double regular, double turning, int sign)
    {
        var h = turning - regular;
        double root = 0, inverse = 0, least = 4e-16 * level;
        var nodes = rule.Nodes;
        for (var i = 0; i < nodes.Length; i++)
        {
            var y = nodes[i];
            var g = Math.Sqrt(Math.Max(sign * (piece.IndexSquared(turning - h * y) - level), least) / y);
            root += rule.Half[i] * g;
            inverse += rule.MinusHalf[i] / g;
        }

        return new(root * Math.Abs(h), inverse * Math.Abs(h));
    }

    private static Action PlainSum(HalfRangeRule rule, SmoothPiece piece, double level, double left, double h, int sign)
    {
        double root = 0, inverse = 0, least = 4e-16 * level;
        var nodes = rule.Nodes;
        for (var i = 0; i < nodes.Length; i++)
        {
            var g = Math.Sqrt(Math.Max(sign * (piece.IndexSquared(left + h * nodes[i]) - level), least));
            root += rule.Plain[i] * g;
            inverse += rule.Plain[i] / g;
        }

        return new(root * h, inverse * h);
    }

    private Correction HalfCorrection(SmoothPiece piece, double level, double regular, double turning, bool fourth, int depth)
    {
        budget--;
        var last = HalfCorrectionSum(HalfRangeRule.Ladder[1], piece, level, regular, turning, fourth);
        for (var k = 2; k <= HighestLevel; k++)
        {
            var next = HalfCorrectionSum(HalfRangeRule.Ladder[k], piece, level, regular, turning, fourth);
            if (Settled(last, next) || depth == 0 || budget < 0) return next;
            last = next;
        }

        var middle = 0.5 * (regular + turning);
        if (Math.Abs(turning - regular) < 1e-9 * (1 + Math.Abs(turning))) return last;
        return (fourth ? PlainFourth(piece, level, regular, middle, depth - 1) : PlainCorrection(piece, level, Math.Min(regular, middle), Math.Max(regular, middle), depth - 1))
            + HalfCorrection(piece, level, middle, turning, fourth, depth - 1);
    }

    private Correction PlainFourth(SmoothPiece piece, double level, double a, double b, int depth) =>
        PlainCorrection(piece, level, Math.Min(a, b), Math.Max(a, b), depth, true);

    private Correction PlainCorrection(SmoothPiece piece, double level, double left, double right, int depth, bool fourth = false)
    {
        budget--;
        var last = PlainCorrectionSum(HalfRangeRule.Ladder[0], piece, level, left, right - left, fourth);
        for (var k = 1; k <= HighestLevel; k++)
        {
            var next = PlainCorrectionSum(HalfRangeRule.Ladder[k], piece, level, left, right - left, fourth);
            if (Settled(last, next) || depth == 0 || budget < 0) return next;
            last = next;
        }

        var middle = 0.5 * (left + right);
        if (right - left < 1e-9 * (1 + Math.Abs(left))) return last;
        return PlainCorrection(piece, level, left, middle, depth - 1, fourth) + PlainCorrection(piece, level, middle, right, depth - 1, fourth);
    }

    private bool Settled(in Correction a, in Correction b)
    {
        var k = map.Wavenumber;
        return Math.Abs(a.Curvature - b.Curvature) <= CorrectionTolerance * (Math.Abs(b.Curvature) + 48 * k) + b.Noise
            && Math.Abs(a.Medium - b.Medium) <= CorrectionTolerance * (Math.Abs(b.Medium) + 2 * k)
            && Math.Abs(a.Fourth - b.Fourth) <= 1e-6 * (Math.Abs(b.Fourth) + 1536 * k * k * k);
    }

    private Correction HalfCorrectionSum(HalfRangeRule rule, SmoothPiece piece, double level, double regular, double turning, bool fourth)
    {
        var h = turning - regular;
        double curvature = 0, medium = 0, high = 0, noise = 0;
        var nodes = rule.Nodes;
        for (var i = 0; i < nodes.Length; i++)
        {
            var y = nodes[i];
            var jet = piece.Jet(turning - h * y);
            var g = Math.Max(jet.Value - level, 1e-30) / y;
            var root = Math.Sqrt(g);
            var term = rule.MinusThreeHalves[i] * jet.D2 / (g * root);
            curvature += term;
            noise += Math.Abs(term) / (g * y);
            if (map.IsTransverseMagnetic) medium += rule.MinusHalf[i] * MediumTerm(jet) / root;
            if (fourth) high += rule.MinusSevenHalves[i] * (7 * jet.D2 * jet.D2 - 5 * jet.D1 * jet.D3) / (g * g * g * root);
        }

        h = Math.Abs(h);
        return new(curvature * h, medium * h, high * h, 1e-15 * level * noise * h);
    }

    private Correction PlainCorrectionSum(HalfRangeRule rule, SmoothPiece piece, double level, double left, double h, bool fourth)
    {
        double curvature = 0, medium = 0, high = 0, noise = 0;
        var nodes = rule.Nodes;
        for (var i = 0; i < nodes.Length; i++)
        {
            var jet = piece.Jet(left + h * nodes[i]);
            var q = Math.Max(jet.Value - level, 1e-30);
            var root = Math.Sqrt(q);
            var term = rule.Plain[i] * jet.D2 / (q * root);
            curvature += term;
            noise += Math.Abs(term) / q;
            if (map.IsTransverseMagnetic) medium += rule.Plain[i] * MediumTerm(jet) / root;
            if (fourth) high += rule.Plain[i] * (7 * jet.D2 * jet.D2 - 5 * jet.D1 * jet.D3) / (q * q * q * root);
        }

        return new(curvature * h, medium * h, high * h, 1e-15 * level * noise * h);
    }

    /// <summary>U of the TM equation.</summary>
    private static double MediumTerm(in Numerics.Jet s)
    {
        var slope = s.D1 / s.Value;
        return 0.75 * slope * slope - 0.5 * s.D2 / s.Value;
    }
}
