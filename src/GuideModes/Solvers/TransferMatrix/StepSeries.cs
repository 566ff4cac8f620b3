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
    private const int Stride = Degree + 1;

    /// <summary>Powers with smaller coefficients are dropped: the sums they enter are of order 1.</summary>
    private const double Negligible = 1e-20;

    private static readonly double LastWeight = 1 / OddFactorial(2 * Last + 1);

    private readonly double[] _first = new double[Terms * Stride];
    private readonly double[] _second = new double[Terms * Stride];
    private readonly int[] _firstDegree = new int[Terms];
    private readonly int[] _secondDegree = new int[Terms];

    /// <summary>A bound, in units of the potential times h², on what the last kept term contributes.</summary>
    public double Remainder { get; private set; }

    /// <summary>Works out the S_m for D = Σ d_j t^j, already multiplied by h².</summary>
    public void Build(ReadOnlySpan<double> d)
    {
        Array.Clear(_first);
        Array.Clear(_second);
        for (var j = 0; j < d.Length; j++) _first[j + 1] = 0.5 * d[j] / (j + 1);
        _firstDegree[0] = d.Length;
        _second[0] = 1;
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

    /// <summary>The coefficients for a step of constant potential.</summary>
    public static void UniformCoefficients(double t, Span<Vector256<double>> into)
    {
        into[..(Last + 2)].Clear();
        into[0] = Vector256.Create(1.0, 0, 0, 1);
        into[1] = Vector256.Create(0.0, 0, t, 0);
    }

    private static void Recur(double[] s, int[] degrees, ReadOnlySpan<double> d)
    {
        Span<double> right = stackalloc double[Stride];
        for (var m = 0; m < Last; m++)
        {
            var row = s.AsSpan(m * Stride, Stride);
            var degree = degrees[m];
            var top = Math.Min(degree + d.Length - 1, Degree);
            right[..(top + 1)].Clear();
            for (var i = 0; i <= degree; i++)
            {
                var factor = row[i];
                var count = Math.Min(d.Length, top - i + 1);
                for (var j = 0; j < count; j++) right[i + j] += factor * d[j];
            }

            for (var j = 0; j + 2 <= degree; j++) right[j] -= (j + 2) * (j + 1) * row[j + 2];
            var next = s.AsSpan((m + 1) * Stride, Stride);
            for (var j = 0; j <= top; j++) next[j] = 0.5 * right[j] / (j + m + 1);
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
            sum = sum * t + s[m * Stride + j];
        }

        return (sum, slope);
    }

    private static double OddFactorial(int n) => n <= 1 ? 1 : n * OddFactorial(n - 2);
}
