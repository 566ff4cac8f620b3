using System.Collections.Immutable;
using System.Linq.Expressions;

namespace GuideModes.Numerics;

/// <summary>An expression in a coordinate and the wavelength, compiled: a number, or a number with its exact derivatives.</summary>
/// <remarks>
/// <para>The language: <c>+ - * / ^ ( )</c>, unary minus, numbers such as 1e-6, .5 and 1., <c>pi</c>, the coordinate, <c>lambda</c>, and
/// <c>exp ln log10 sqrt abs sin cos tan sinh cosh tanh sech erf erfc min max</c>. <c>^</c> is power, binds right to left
/// and above the unary minus: −x^2 = −(x²). Names are lower case. There is nothing else: no text can reach beyond arithmetic.</para>
/// <para>Method: recursive descent (<see cref="FormulaParser"/>), then expression trees compiled on first use; derivatives by
/// forward-mode differentiation (<see cref="Jet"/>). Limits: length, depth and size below. A result may be infinite or not a number;
/// whoever asks must look. Immutable and safe to share.</para>
/// </remarks>
public sealed class Formula
{
    public const int MaximumLength = 1000;

    public const int MaximumDepth = 100;

    /// <summary>Numbers, names and operators in one formula.</summary>
    public const int MaximumSize = 500;

    private readonly Lazy<Func<double, double, double>> _number;
    private readonly Lazy<Func<double, double, Jet>> _jet;

    private Formula(string text, FormulaNode root)
    {
        Text = text;
        Root = root;
        var scope = new FormulaScope(Expression.Parameter(typeof(double), "x"), Expression.Parameter(typeof(double), "lambda"));
        _number = new(() => Compile<double>(root.ToNumber(scope), scope));
        _jet = new(() => Compile<Jet>(root.ToJet(scope), scope));
    }

    /// <summary>As it was written.</summary>
    public string Text { get; }

    internal FormulaNode Root { get; }

    /// <summary>Reads a formula.</summary>
    /// <param name="text">At most <see cref="MaximumLength"/> characters.</param>
    /// <param name="coordinate">The coordinate's name, such as x; null for a formula in lambda alone.</param>
    /// <exception cref="FormulaException">The text is not a formula; the message names the column.</exception>
    public static Formula Parse(string text, string? coordinate)
    {
        ArgumentNullException.ThrowIfNull(text);
        return new(text, new FormulaParser(text, coordinate).Parse());
    }

    /// <summary>The value at a coordinate and a wavelength, both in µm.</summary>
    public double Value(double x, double lambda) => _number.Value(x, lambda);

    /// <summary>The value with its derivatives in the coordinate and the wavelength.</summary>
    public Jet Jet(double x, double lambda) => _jet.Value(x, lambda);

    /// <summary>The compiled value, for loops.</summary>
    internal Func<double, double, double> Number => _number.Value;

    /// <summary>The compiled value with derivatives, for loops.</summary>
    internal Func<double, double, Jet> Derivatives => _jet.Value;

    /// <summary>The expressions at whose zeros the formula is not smooth: it changes branch (abs, min, max) or meets the end of a root.</summary>
    internal ImmutableArray<FormulaNode> Joints =>
        [.. Root.Descendants().SelectMany(node => new[] { node.SwitchesAt, node.SingularAt }).OfType<FormulaNode>().Where(node => !node.IsConstant)];

    /// <summary>The numbers that stand in it: likely places of its features.</summary>
    internal IEnumerable<double> Numbers => Root.Descendants().OfType<NumberNode>().Select(node => node.Value).Distinct();

    /// <summary>The same formula without branches, as it holds around (x, λ): analytic there and beyond.</summary>
    internal Formula OnBranchOf(double x, double lambda) => new(Text, Root.OnBranchOf(x, lambda));

    private static Func<double, double, T> Compile<T>(Expression body, FormulaScope scope) =>
        Expression.Lambda<Func<double, double, T>>(body, scope.Coordinate, scope.Lambda).Compile();
}
