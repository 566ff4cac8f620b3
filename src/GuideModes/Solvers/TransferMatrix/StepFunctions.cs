using System.Runtime.CompilerServices;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// The functions in which a step's matrix is written: ξ(Z) = cosh √Z, η₀(Z) = sinh √Z/√Z and
/// η_m = (η_{m−2} − (2m−1)·η_{m−1})/Z with η_{−1} = ξ; entire in Z, trigonometric for Z &lt; 0.
/// </summary>
/// <remarks>
/// Ixaru, Numerical Methods for Differential Equations and Applications (Reidel 1984), ch. 3; they satisfy
/// dξ/dZ = η₀/2 and dη_m/dZ = η_{m+1}/2. Below |Z| = 4 the two highest come from their power series and the recurrence
/// runs downward; above it runs upward from the sine and cosine. Either way the error stays within some tens of ε of
/// the largest. For Z ≥ 4 all are divided by exp √Z, which is returned, so that no barrier overflows.
/// </remarks>
internal static class StepFunctions
{
    /// <summary>The highest index: η₀ … η_Top are produced.</summary>
    public const int Top = 7;

    /// <summary>ξ, η₀ … η_Top: what <see cref="Evaluate"/> fills.</summary>
    public const int Count = Top + 2;

    private const double SeriesLimit = 4;
    private const int SeriesTerms = 10;

    private static readonly double[] TopSeries = Terms(Top);
    private static readonly double[] NextSeries = Terms(Top - 1);

    /// <summary>Fills <paramref name="f"/> with ξ, η₀ … η_Top, all divided by exp of the value returned.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Evaluate(double z, Span<double> f)
    {
        if (Math.Abs(z) < SeriesLimit)
        {
            Downward(z, f);
            return 0;
        }

        return Upward(z, f);
    }

    private static void Downward(double z, Span<double> f)
    {
        var high = Series(TopSeries, z);
        var low = Series(NextSeries, z);
        f = f[..Count];
        f[Top + 1] = high;
        f[Top] = low;
        for (var m = Top; m >= 1; m--)
        {
            // Written so that each step waits for one fused operation only.
            var below = Math.FusedMultiplyAdd(2 * m - 1, low, z * high);
            f[m - 1] = below;
            high = low;
            low = below;
        }
    }

    /// <summary>Ten terms of a power series, in pairs (Estrin's scheme), so that few operations wait for one another.</summary>
    private static double Series(double[] terms, double z)
    {
        ReadOnlySpan<double> a = terms;
        a = a[..SeriesTerms];
        var z2 = z * z;
        var z4 = z2 * z2;
        var p01 = Math.FusedMultiplyAdd(a[1], z, a[0]);
        var p23 = Math.FusedMultiplyAdd(a[3], z, a[2]);
        var p45 = Math.FusedMultiplyAdd(a[5], z, a[4]);
        var p67 = Math.FusedMultiplyAdd(a[7], z, a[6]);
        var p89 = Math.FusedMultiplyAdd(a[9], z, a[8]);
        var low = Math.FusedMultiplyAdd(p23, z2, p01);
        var high = Math.FusedMultiplyAdd(p67, z2, p45);
        return Math.FusedMultiplyAdd(Math.FusedMultiplyAdd(p89, z4, high), z4, low);
    }

    private static double Upward(double z, Span<double> f)
    {
        f = f[..Count];
        double scale = 0, xi, eta;
        if (z > 0)
        {
            scale = Math.Sqrt(z);
            var decayed = Math.Exp(-2 * scale);
            xi = 0.5 * (1 + decayed);
            eta = 0.5 * (1 - decayed) / scale;
        }
        else
        {
            var phase = Math.Sqrt(-z);
            var (sin, cos) = Math.SinCos(phase);
            xi = cos;
            eta = sin / phase;
        }

        f[0] = xi;
        f[1] = eta;
        var inverse = 1 / z;
        for (var m = 1; m <= Top; m++)
        {
            var above = (xi - (2 * m - 1) * eta) * inverse;
            f[m + 1] = above;
            xi = eta;
            eta = above;
        }

        return scale;
    }

    /// <summary>η_m(Z) = Σ_q 2^m (q+m)!/(q! (2q+2m+1)!) Z^q: the first term is 1/(2m+1)!!.</summary>
    private static double[] Terms(int m)
    {
        var terms = new double[SeriesTerms];
        var term = 1.0;
        for (var j = 1; j <= m; j++) term /= 2 * j + 1;
        for (var q = 0; q < SeriesTerms; q++)
        {
            terms[q] = term;
            term /= 2.0 * (q + 1) * (2 * q + 2 * m + 3);
        }

        return terms;
    }
}
