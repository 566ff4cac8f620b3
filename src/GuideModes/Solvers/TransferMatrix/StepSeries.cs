using System.Runtime.Intrinsics;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// The two solutions of u″ = (W + D(t))u on a step t ∈ [0, 1], (1, 0) and (0, 1) at its start, for a polynomial D, in a form
/// whose coefficients do not depend on W.
/// </summary>
/// <remarks>
/// With φ_m(t) = t^{2m+1} η_m(W t²) and φ₋₁ = ξ/t one has φ_m′ = t φ_{m−1} and φ_m″ − Wφ_m = 2m φ_{m−1}. Put
/// u = Q ξ + Σ S_m(t) φ_m with polynomials S_m: the equation holds when 2S₀′ = D·Q and
/// 2(t S_{m+1}′ + (m+1) S_{m+1}) = D·S_m − S_m″, which is solved power by power. First solution: Q = 1, S₀ = ½∫D; second:
/// Q = 0, S₀ = 1. Same basis functions as the piecewise perturbation methods of Ixaru (1984) and Ledoux &amp; Van Daele
/// (arXiv 0804.2605), but summed over all perturbation orders at once. The only truncations are in m (at
/// <see cref="Last"/>) and in the degree of S_m; <see cref="Remainder"/> sizes them.
/// </remarks>
internal sealed class StepSeries
{
    /// <summary>The highest m kept; the derivative in W needs η one higher.</summary>
    public const int Last = StepFunctions.Top - 1;

    private const int Terms = Last + 1;
    private const int Degree = 16;

    /// <summary>Zeros before each row's first power, so that products can be formed four at a time; some follow it too.</summary>
    private const int Pad = 8;

    private const int Stride = Pad + Degree + 1 + 7;

    /// <summary>Powers with smaller coefficients are dropped: the sums they enter are of order 1.</summary>
    private const double Negligible = 1e-20;

    private const int Lanes = 4;

    /// <summary>½, ¼, ⅙ …: place j holds 1/(2j).</summary>
    private static readonly double[] Halves = [.. Enumerable.Range(0, Degree + 1 + Terms).Select(j => 0.5 / j)];

    private static readonly double LastWeight = 1 / OddFactorial(2 * Last + 1);

    private readonly double[] _first = new double[Terms * Stride];
    private readonly double[] _second = new double[Terms * Stride];
    private readonly int[] _firstDegree = new int[Terms];
    private readonly int[] _secondDegree = new int[Terms];

    /// <summary>A bound, in units of the potential times h², on what the last kept term contributes.</summary>
    public double Remainder { get; private set; }

    /// <summary>Works out the S_m for a step's potential, given by its Legendre coefficients, less its mean.</summary>
    public void BuildFor(ReadOnlySpan<double> legendre, double length)
    {
        Span<double> monomials = stackalloc double[GaussRule.Points];
        GaussRule.Monomials(legendre, monomials);
        for (var j = 0; j < monomials.Length; j++) monomials[j] *= length * length;
        Build(monomials);
    }

    /// <summary>Works out the S_m for D = Σ d_j t^j, already multiplied by h².</summary>
    public void Build(ReadOnlySpan<double> d)
    {
        Array.Clear(_first);
        Array.Clear(_second);
        for (var j = 0; j < d.Length; j++) _first[Pad + j + 1] = 0.5 * d[j] / (j + 1);
        _firstDegree[0] = d.Length;
        _second[Pad] = 1;
        _secondDegree[0] = 0;
        Recur(_first, _firstDegree, d);
        Recur(_second, _secondDegree, d);
        var last = Math.Abs(ValueAndSlope(_first, _firstDegree[Last], Last, 1).Value)
            + Math.Abs(ValueAndSlope(_second, _secondDegree[Last], Last, 1).Value);
        Remainder = 2 * last * LastWeight;
    }

    /// <summary>
    /// The coefficients at t, for ξ and η₀ … η_Last of W t²: lanes are u₁, u₁′, u₂, u₂′. To u₁′ belongs a further W t η₀.
    /// </summary>
    public void Coefficients(double t, Span<Vector256<double>> into)
    {
        Span<double> powers = stackalloc double[Terms];
        powers[0] = t;
        for (var m = 1; m < Terms; m++) powers[m] = powers[m - 1] * t * t;
        double nextU = 0, nextV = 0;
        for (var m = Last; m >= 0; m--)
        {
            var (u, du) = ValueAndSlope(_first, _firstDegree[m], m, t);
            var (v, dv) = ValueAndSlope(_second, _secondDegree[m], m, t);
            into[m + 1] = powers[m] * Vector256.Create(u, du + nextU * t, v, dv + nextV * t);
            (nextU, nextV) = (u, v);
        }

        into[0] = Vector256.Create(1, nextU, 0, nextV);
    }

    /// <summary>
    /// The coefficients of the values alone, lanes u₁, u₂, at the points of <see cref="GaussRule"/>: one point's after the other's.
    /// </summary>
    public void ValueCoefficientsAtNodes(Span<Vector128<double>> into)
    {
        for (var m = 0; m <= Last; m++)
        {
            var (u, v) = (AtNodes(_first, _firstDegree[m], m), AtNodes(_second, _secondDegree[m], m));
            for (var i = 0; i < GaussRule.Points; i++)
            {
                into[i * (Terms + 1) + m + 1] = i < Lanes
                    ? Vector128.Create(u.Low[i], v.Low[i])
                    : Vector128.Create(u.High[i - Lanes], v.High[i - Lanes]);
            }
        }

        for (var i = 0; i < GaussRule.Points; i++) into[i * (Terms + 1)] = Vector128.Create(1.0, 0);
    }

    /// <summary>S_m(t)·t^{2m+1} at all Gauss points at once.</summary>
    private static (Vector256<double> Low, Vector256<double> High) AtNodes(double[] s, int degree, int m)
    {
        var (t, t2) = (GaussRule.PaddedNodes.Low, GaussRule.PaddedNodes.High);
        var (low, high) = (Vector256<double>.Zero, Vector256<double>.Zero);
        for (var j = degree; j >= 0; j--)
        {
            var c = Vector256.Create(s[m * Stride + Pad + j]);
            low = Vector256.FusedMultiplyAdd(low, t, c);
            high = Vector256.FusedMultiplyAdd(high, t2, c);
        }

        for (var j = 0; j < 2 * m + 1; j++)
        {
            low *= t;
            high *= t2;
        }

        return (low, high);
    }

    /// <summary>The coefficients for a step of constant potential.</summary>
    public static void UniformCoefficients(double t, Span<Vector256<double>> into)
    {
        into[..(Last + 2)].Clear();
        into[0] = Vector256.Create(1.0, 0, 0, 1);
        into[1] = Vector256.Create(0.0, 0, t, 0);
    }

    private static void Recur(double[] s, int[] degrees, ReadOnlySpan<double> d)
    {
        Span<Vector256<double>> factors = stackalloc Vector256<double>[GaussRule.Points];
        for (var k = 0; k < factors.Length; k++) factors[k] = Vector256.Create(d[k]);
        Span<double> right = stackalloc double[Stride];
        for (var m = 0; m < Last; m++)
        {
            var row = s.AsSpan(m * Stride, Stride);
            var next = s.AsSpan((m + 1) * Stride + Pad, Stride - Pad);
            var degree = degrees[m];
            var top = Math.Min(degree + factors.Length - 1, Degree);
            for (var j = 0; j <= top; j += Lanes)
            {
                // Four powers of D·S_m at a time; below its first power a row is padded with zeros.
                var sum = factors[0] * Vector256.Create<double>(row.Slice(Pad + j, Lanes));
                for (var k = 1; k < factors.Length; k++)
                    sum = Vector256.FusedMultiplyAdd(factors[k], Vector256.Create<double>(row.Slice(Pad + j - k, Lanes)), sum);
                sum.CopyTo(right[j..]);
            }

            for (var j = 0; j + 2 <= degree; j++) right[j] -= (j + 2) * (j + 1) * row[Pad + j + 2];
            for (var j = 0; j <= top; j++) next[j] = right[j] * Halves[j + m + 1];
            while (top > 0 && Math.Abs(next[top]) < Negligible) top--;
            degrees[m + 1] = top;
        }
    }

    private static (double Value, double Slope) ValueAndSlope(double[] s, int degree, int m, double t)
    {
        double sum = 0, slope = 0;
        for (var j = degree; j >= 0; j--)
        {
            slope = slope * t + sum;
            sum = sum * t + s[m * Stride + Pad + j];
        }

        return (sum, slope);
    }

    private static double OddFactorial(int n) => n <= 1 ? 1 : n * OddFactorial(n - 2);
}
