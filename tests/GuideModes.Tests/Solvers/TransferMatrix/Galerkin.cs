using GuideModes.Profiles;
using GuideModes.Solvers;
using MathNet.Numerics.Integration;
using MathNet.Numerics.LinearAlgebra;

namespace GuideModes.Tests.Solvers.TransferMatrix;

/// <summary>
/// An independent value of every n_eff at once: the weak form on elements of polynomials in a box, as a matrix eigenvalue problem.
/// TE: ∫(k²n²uv − u′v′) = β²∫uv; TM: ∫(k²uv − u′v′/n²) = β²∫uv/n².
/// </summary>
/// <remarks>Hats and integrated Legendre polynomials; no element across a joint; the box reaches 15 wavelengths to either side.</remarks>
internal static class Galerkin
{
    private const int Degree = 10;

    private static readonly GaussLegendreRule Rule = new(-1, 1, 20);

    private readonly record struct Element(double Start, double End, Func<double, double> IndexSquared);

    /// <summary>Every n_eff above cutoff, decreasing.</summary>
    public static double[] Indices(ModeProblem problem)
    {
        var elements = Elements(problem.Profile);
        var size = elements.Count * Degree - 1;
        Matrix<double> stiffness = Matrix<double>.Build.Dense(size, size), mass = Matrix<double>.Build.Dense(size, size);
        for (var e = 0; e < elements.Count; e++) Assemble(problem, elements[e], e, elements.Count, stiffness, mass);
        var lower = mass.Cholesky().Factor;
        var half = lower.Solve(stiffness);
        var standard = lower.Solve(half.Transpose());
        var k2 = Math.Pow(problem.Profile.Wavelength.Wavenumber, 2);
        return [.. ((standard + standard.Transpose()) * 0.5).Evd(Symmetricity.Symmetric).EigenValues
            .Select(value => value.Real / k2)
            .Where(squared => squared > problem.Profile.CutoffIndexSquared)
            .Select(Math.Sqrt)
            .OrderDescending()];
    }

    private static List<Element> Elements(IndexProfile profile)
    {
        var wavelength = profile.Wavelength.Micrometres;
        var elements = new List<Element>();
        for (int i = 3, from = 15; i >= 0; from -= 1 << i, i--)
            elements.Add(new(profile.Extent.Start - from * wavelength, profile.Extent.Start - (from - (1 << i)) * wavelength, _ => profile.Cover.IndexSquared));
        foreach (var piece in profile.Pieces)
        {
            var count = (int)Math.Ceiling(piece.Extent.Length / (0.4 * wavelength));
            var length = piece.Extent.Length / count;
            for (var i = 0; i < count; i++)
                elements.Add(new(piece.Extent.Start + i * length, piece.Extent.Start + (i + 1) * length, piece.IndexSquared));
        }

        for (int i = 0, from = 0; i <= 3; from += 1 << i, i++)
            elements.Add(new(profile.Extent.End + from * wavelength, profile.Extent.End + (from + (1 << i)) * wavelength, _ => profile.Substrate.IndexSquared));
        return elements;
    }

    private static void Assemble(ModeProblem problem, Element element, int e, int count, Matrix<double> stiffness, Matrix<double> mass)
    {
        var length = element.End - element.Start;
        var k2 = Math.Pow(problem.Profile.Wavelength.Wavenumber, 2);
        var places = Enumerable.Range(0, Degree + 1).Select(i => Place(i, e, count)).ToArray();
        double[] value = new double[Degree + 1], slope = new double[Degree + 1];
        for (var p = 0; p < Rule.Order; p++)
        {
            var s = Rule.GetAbscissa(p);
            var weight = Rule.GetWeight(p) * length / 2;
            var n2 = element.IndexSquared(element.Start + length * (s + 1) / 2);
            var (potential, gradient, norm) = problem.Polarization == Polarization.TE ? (k2 * n2, 1.0, 1.0) : (k2, 1 / n2, 1 / n2);
            Shapes(s, value, slope);
            for (var i = 0; i <= Degree; i++)
            {
                for (var j = 0; j <= Degree; j++)
                {
                    if (places[i] < 0 || places[j] < 0) continue;
                    stiffness[places[i], places[j]] += weight * (potential * value[i] * value[j] - gradient * slope[i] * slope[j] * 4 / (length * length));
                    mass[places[i], places[j]] += weight * norm * value[i] * value[j];
                }
            }
        }
    }

    /// <summary>Shape 0 and 1 are the hats at the element's ends, zero at the ends of the box; the rest live inside.</summary>
    private static int Place(int shape, int element, int count) => shape switch
    {
        0 => element == 0 ? -1 : element * Degree - 1,
        1 => element == count - 1 ? -1 : (element + 1) * Degree - 1,
        _ => element * Degree + shape - 2,
    };

    private static void Shapes(double s, double[] value, double[] slope)
    {
        Span<double> legendre = stackalloc double[Degree + 1];
        legendre[0] = 1;
        legendre[1] = s;
        for (var n = 1; n < Degree; n++) legendre[n + 1] = ((2 * n + 1) * s * legendre[n] - n * legendre[n - 1]) / (n + 1);
        (value[0], slope[0], value[1], slope[1]) = ((1 - s) / 2, -0.5, (1 + s) / 2, 0.5);
        for (var n = 2; n <= Degree; n++)
        {
            var norm = Math.Sqrt(2 * (2 * n - 1));
            value[n] = (legendre[n] - legendre[n - 2]) / norm;
            slope[n] = (2 * n - 1) * legendre[n - 1] / norm;
        }
    }
}
