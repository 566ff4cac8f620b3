using System.Runtime.Intrinsics;
using MathNet.Numerics.Integration;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The seven Gauss–Legendre points of a step t ∈ [0, 1], and the fit through them by Legendre polynomials.</summary>
internal static class GaussRule
{
    /// <summary>How many points; a fit has degree <see cref="Degree"/>.</summary>
    public const int Points = 7;

    public const int Degree = Points - 1;

    public static readonly double[] Nodes = new double[Points];

    /// <summary>The nodes as two vectors, the last place empty.</summary>
    public static readonly (Vector256<double> Low, Vector256<double> High) PaddedNodes;

    public static readonly double[] Weights = new double[Points];

    /// <summary>Row n: the weights that turn values at the nodes into the coefficient of P_n(2t − 1).</summary>
    private static readonly double[] ToLegendre = new double[Points * Points];

    /// <summary>Row n: the monomial coefficients of P_n(2t − 1).</summary>
    private static readonly double[] LegendreMonomials = new double[Points * Points];

    static GaussRule()
    {
        var rule = new GaussLegendreRule(0, 1, Points);
        for (var i = 0; i < Points; i++)
        {
            Nodes[i] = rule.GetAbscissa(i);
            Weights[i] = rule.GetWeight(i);
        }

        PaddedNodes = (Vector256.Create<double>(Nodes), Vector256.Create(Nodes[4], Nodes[5], Nodes[6], 0));
        FillLegendre();
    }

    /// <summary>The Legendre coefficients of the polynomial through the values at the nodes.</summary>
    public static void Fit(ReadOnlySpan<double> values, Span<double> legendre)
    {
        for (var n = 0; n < Points; n++)
        {
            var sum = 0.0;
            for (var i = 0; i < Points; i++) sum += ToLegendre[n * Points + i] * values[i];
            legendre[n] = sum;
        }
    }

    /// <summary>Σ_{n≥1} c_n P_n(2t − 1) in powers of t; the mean, c_0, is left out.</summary>
    public static void Monomials(ReadOnlySpan<double> legendre, Span<double> monomials)
    {
        monomials.Clear();
        for (var n = 1; n < Points; n++)
        {
            for (var j = 0; j <= n; j++) monomials[j] += legendre[n] * LegendreMonomials[n * Points + j];
        }
    }

    /// <summary>Σ c_n P_n(2t − 1) at one t.</summary>
    public static double Evaluate(ReadOnlySpan<double> legendre, double t)
    {
        var y = 2 * t - 1;
        double previous = 1, current = y, sum = legendre[0] + legendre[1] * y;
        for (var n = 1; n < Degree; n++)
        {
            var next = ((2 * n + 1) * y * current - n * previous) / (n + 1);
            sum += legendre[n + 1] * next;
            previous = current;
            current = next;
        }

        return sum;
    }

    private static void FillLegendre()
    {
        // (n + 1) P_{n+1} = (2n + 1)(2t − 1) P_n − n P_{n−1}, on coefficients.
        LegendreMonomials[0] = 1;
        LegendreMonomials[Points] = -1;
        LegendreMonomials[Points + 1] = 2;
        for (var n = 1; n < Degree; n++)
        {
            for (var j = 0; j <= n + 1; j++)
            {
                var shifted = j > 0 ? 2 * LegendreMonomials[n * Points + j - 1] : 0;
                LegendreMonomials[(n + 1) * Points + j] =
                    ((2 * n + 1) * (shifted - LegendreMonomials[n * Points + j]) - n * LegendreMonomials[(n - 1) * Points + j]) / (n + 1);
            }
        }

        Span<double> unit = stackalloc double[Points];
        for (var n = 0; n < Points; n++)
        {
            unit.Clear();
            unit[n] = 1;
            for (var i = 0; i < Points; i++)
                ToLegendre[n * Points + i] = (2 * n + 1) * Weights[i] * Evaluate(unit, Nodes[i]);
        }
    }
}
