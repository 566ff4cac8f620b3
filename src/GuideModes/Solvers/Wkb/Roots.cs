using GuideModes.Profiles;

namespace GuideModes.Solvers.Wkb;

/// <summary>Bracketed root of n²(x) = level on a monotone stretch.</summary>
/// <remarks>
/// Method: inverse quadratic interpolation kept in bounds by bisection. Source: Chandrupatla, Adv. Eng. Software 28 (1997) 145.
/// Limits: the answer is as sharp as n² itself, rounding ε·n² over its slope.
/// </remarks>
internal static class Roots
{
    public static double Bracketed(SmoothPiece piece, double level, double a, double b, double fa, double fb)
    {
        if (fa == 0) return a;
        if (fb == 0) return b;
        var (c, fc) = (a, fa);
        var t = Math.Clamp(fa / (fa - fb), 0.02, 0.98);
        for (var pass = 0; pass < 100; pass++)
        {
            var x = a + t * (b - a);
            var f = piece.IndexSquared(x) - level;
            if (Math.Sign(f) == Math.Sign(fa)) (c, fc) = (a, fa);
            else (c, fc, b, fb) = (b, fb, a, fa);
            (a, fa) = (x, f);
            var best = Math.Abs(fa) < Math.Abs(fb) ? a : b;
            var share = (4e-16 * Math.Abs(best) + 1e-300) / Math.Abs(b - a);
            if (f == 0 || share > 0.5) return f == 0 ? a : best;
            t = Math.Clamp(NextShare(a, b, c, fa, fb, fc), share, 1 - share);
        }

        return a;
    }

    private static double NextShare(double a, double b, double c, double fa, double fb, double fc)
    {
        var xi = (a - b) / (c - b);
        var phi = (fa - fb) / (fc - fb);
        if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
        return fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb);
    }
}
