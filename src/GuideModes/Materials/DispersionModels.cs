using GuideModes.Numerics;

namespace GuideModes.Materials;

/// <summary>The forms in which n² is given as a function of the wavelength in µm.</summary>
internal static class DispersionModels
{
    /// <summary>n² = 1 + c0 + Σ Aᵢ λ²/(λ² − Bᵢ²), as pairs (Aᵢ, Bᵢ): B is the resonance wavelength in µm.</summary>
    public static Func<Jet, double, Jet> Sellmeier(double c0, params (double A, double B)[] terms) =>
        (lambda, _) => Sum(lambda, c0, terms.Select(term => (term.A, term.B * term.B)));

    /// <summary>n² = 1 + Σ Aᵢ λ²/(λ² − Cᵢ), as pairs (Aᵢ, Cᵢ): C is the square of the resonance wavelength, µm².</summary>
    public static Func<Jet, double, Jet> SellmeierOfSquares(params (double A, double C)[] terms) =>
        (lambda, _) => Sum(lambda, 0, terms);

    /// <summary>Two glasses mixed: Aᵢ and Bᵢ both run linearly in the mole fraction (Fleming 1984).</summary>
    public static Func<Jet, double, Jet> Mixture((double A, double B)[] pure, (double A, double B)[] dopant) => (lambda, percent) =>
    {
        var share = percent / 100;
        return Sum(lambda, 0, pure.Zip(dopant, (p, d) => (Mix(p.A, d.A, share), RealMath.Square(Mix(p.B, d.B, share)))));
    };

    /// <summary>n² = Σ cᵢ λ^pᵢ.</summary>
    public static Func<Jet, double, Jet> Powers(params (double Coefficient, int Power)[] terms) => (lambda, _) => Polynomial(lambda, terms);

    /// <summary>n = Σ cᵢ λ^pᵢ: the index itself, not its square.</summary>
    public static Func<Jet, double, Jet> IndexPowers(params (double Coefficient, int Power)[] terms) =>
        (lambda, _) => JetMath.Square(Polynomial(lambda, terms));

    private static Jet Sum(Jet lambda, double c0, IEnumerable<(double A, double C)> terms)
    {
        var squared = JetMath.Square(lambda);
        return terms.Aggregate(Jet.Constant(1 + c0), (sum, term) => sum + term.A * squared / (squared - term.C));
    }

    private static Jet Polynomial(Jet lambda, (double Coefficient, int Power)[] terms) =>
        terms.Aggregate(Jet.Constant(0), (sum, term) => sum + term.Coefficient * JetMath.Pow(lambda, (double)term.Power));

    private static double Mix(double a, double b, double share) => a + share * (b - a);
}
