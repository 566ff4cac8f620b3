namespace GuideModes.Solvers.Wkb;

/// <summary>Nodes on (0, 1) with weights for ∫₀¹ yᵃ f(y) dy, f smooth, for the half-integer a of the WKB series.</summary>
/// <remarks>
/// Method: interpolation at the Gauss–Legendre nodes. With P*ₙ(y) = Pₙ(2y − 1) the moments are
/// μₙ(a) = ∫₀¹ P*ₙ yᵃ dy = Π_{j&lt;n}(a − j) / Π_{j≤n}(a + 1 + j), and wᵢ = gᵢ Σₙ (2n + 1) μₙ(a) P*ₙ(yᵢ) with gᵢ the
/// Gauss weights. For a &lt; −1 the same formula, continued in a, is Hadamard's finite part (no logarithms arise, a being
/// half an odd number), which is what a contour round the turning point gives.
/// Source: Gautschi, Orthogonal Polynomials (2004), §1.4 and 2.1 for the moments; Davis and Rabinowitz, Methods of
/// Numerical Integration (1984), §2.7 for interpolatory rules.
/// Limits: |μₙ| grows like n^(−2a−2), so that of the 16 digits about eight are left at a = −7/2 and 32 nodes.
/// </remarks>
internal sealed class HalfRangeRule
{
    private HalfRangeRule(int count)
    {
        (Nodes, Plain) = GaussLegendre(count);
        Half = Weighted(0.5);
        MinusHalf = Weighted(-0.5);
        MinusThreeHalves = Weighted(-1.5);
        MinusSevenHalves = Weighted(-3.5);
    }

    /// <summary>Rules of growing order; the next one up judges the last.</summary>
    public static HalfRangeRule[] Ladder { get; } = [.. new[] { 8, 12, 16, 24, 32, 48, 64 }.Select(n => new HalfRangeRule(n))];

    public double[] Nodes { get; }

    /// <summary>a = 0</summary>
    public double[] Plain { get; }

    /// <summary>a = ½</summary>
    public double[] Half { get; }

    /// <summary>a = −½</summary>
    public double[] MinusHalf { get; }

    /// <summary>a = −3/2, finite part</summary>
    public double[] MinusThreeHalves { get; }

    /// <summary>a = −7/2, finite part</summary>
    public double[] MinusSevenHalves { get; }

    /// <summary>Weights of this rule's nodes for yᵃ.</summary>
    public double[] Weighted(double a)
    {
        var weights = new double[Nodes.Length];
        for (var i = 0; i < weights.Length; i++)
            weights[i] = Plain[i] * WeightSeries(2 * Nodes[i] - 1, a);
        return weights;
    }

    private double WeightSeries(double t, double a)
    {
        var moment = 1 / (a + 1);
        double sum = moment, previous = 1, current = t;
        for (var n = 1; n < Nodes.Length; n++)
        {
            moment *= (a - (n - 1)) / (a + 1 + n);
            sum += (2 * n + 1) * moment * current;
            (previous, current) = (current, ((2 * n + 1) * t * current - n * previous) / (n + 1));
        }

        return sum;
    }

    private static (double[] Nodes, double[] Weights) GaussLegendre(int count)
    {
        var (nodes, weights) = (new double[count], new double[count]);
        for (var i = 0; i < count; i++)
        {
            var t = -Math.Cos(Math.PI * (i + 0.75) / (count + 0.5));
            var slope = 0.0;
            for (var pass = 0; pass < 6; pass++)
            {
                (var value, slope) = Legendre(count, t);
                t -= value / slope;
            }

            nodes[i] = 0.5 * (1 + t);
            weights[i] = 1 / ((1 - t * t) * slope * slope);
        }

        return (nodes, weights);
    }

    private static (double Value, double Slope) Legendre(int n, double t)
    {
        double previous = 1, current = t;
        for (var j = 1; j < n; j++)
            (previous, current) = (current, ((2 * j + 1) * t * current - j * previous) / (j + 1));
        return (current, n * (t * current - previous) / (t * t - 1));
    }
}
