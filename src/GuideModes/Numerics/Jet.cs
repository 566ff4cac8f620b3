namespace GuideModes.Numerics;

/// <summary>
/// A function's value with its exact first three derivatives in the coordinate x and its first derivative in the
/// wavelength λ: a truncated Taylor series carried through arithmetic (forward-mode differentiation), so that no
/// derivative in the project comes from a finite difference.
/// </summary>
/// <param name="Value">f</param>
/// <param name="D1">∂f/∂x, per µm</param>
/// <param name="D2">∂²f/∂x², per µm²</param>
/// <param name="D3">∂³f/∂x³, per µm³</param>
/// <param name="DLambda">∂f/∂λ, per µm</param>
public readonly record struct Jet(double Value, double D1, double D2, double D3, double DLambda)
{
    /// <summary>A number that depends on neither x nor λ.</summary>
    public static Jet Constant(double value) => new(value, 0, 0, 0, 0);

    /// <summary>The coordinate x itself.</summary>
    public static Jet Coordinate(double x) => new(x, 1, 0, 0, 0);

    /// <summary>The wavelength λ itself.</summary>
    public static Jet Lambda(double lambda) => new(lambda, 0, 0, 0, 1);

    public static implicit operator Jet(double value) => Constant(value);

    public static Jet operator +(Jet a, Jet b) =>
        new(a.Value + b.Value, a.D1 + b.D1, a.D2 + b.D2, a.D3 + b.D3, a.DLambda + b.DLambda);

    public static Jet operator -(Jet a, Jet b) =>
        new(a.Value - b.Value, a.D1 - b.D1, a.D2 - b.D2, a.D3 - b.D3, a.DLambda - b.DLambda);

    public static Jet operator -(Jet a) => new(-a.Value, -a.D1, -a.D2, -a.D3, -a.DLambda);

    /// <summary>Leibniz' rule.</summary>
    public static Jet operator *(Jet a, Jet b) => new(
        a.Value * b.Value,
        a.D1 * b.Value + a.Value * b.D1,
        a.D2 * b.Value + 2 * a.D1 * b.D1 + a.Value * b.D2,
        a.D3 * b.Value + 3 * a.D2 * b.D1 + 3 * a.D1 * b.D2 + a.Value * b.D3,
        a.DLambda * b.Value + a.Value * b.DLambda);

    public static Jet operator /(Jet a, Jet b) => a * b.Compose(1 / b.Value, -1 / (b.Value * b.Value), 2 / Cube(b.Value), -6 / (b.Value * Cube(b.Value)));

    /// <summary>g(f), from the value and the first three derivatives of g at f (Faà di Bruno's rule).</summary>
    public Jet Compose(double g, double g1, double g2, double g3) => new(
        g,
        g1 * D1,
        g1 * D2 + g2 * D1 * D1,
        g1 * D3 + 3 * g2 * D1 * D2 + g3 * D1 * D1 * D1,
        g1 * DLambda);

    private static double Cube(double x) => x * x * x;
}
