using System.Collections.Frozen;
using System.Reflection;

namespace GuideModes.Numerics;

/// <summary>A function that formulas may call.</summary>
internal sealed record FormulaFunction(string Name, string MethodName, Func<double, double>? OfOne, Func<double, double, double>? OfTwo)
{
    private static readonly FormulaFunction[] All =
    [
        One("exp", RealMath.Exp), One("ln", RealMath.Log), One("log10", RealMath.Log10), One("sqrt", RealMath.Sqrt), One("abs", RealMath.Abs),
        One("sin", RealMath.Sin), One("cos", RealMath.Cos), One("tan", RealMath.Tan),
        One("sinh", RealMath.Sinh), One("cosh", RealMath.Cosh), One("tanh", RealMath.Tanh), One("sech", RealMath.Sech),
        One("erf", RealMath.Erf), One("erfc", RealMath.Erfc), Two("min", RealMath.Min), Two("max", RealMath.Max),
    ];

    private static readonly FrozenDictionary<string, FormulaFunction> ByName = All.ToFrozenDictionary(function => function.Name);

    /// <summary>The names, for people.</summary>
    public static string Names { get; } = string.Join(" ", All.Select(function => function.Name));

    public int Arity => OfOne is null ? 2 : 1;

    public static FormulaFunction? Find(string name) => ByName.GetValueOrDefault(name);

    public MethodInfo Method(Type home, Type argument) =>
        home.GetMethod(MethodName, [.. Enumerable.Repeat(argument, Arity)])!;

    private static FormulaFunction One(string name, Func<double, double> function) => new(name, function.Method.Name, function, null);

    private static FormulaFunction Two(string name, Func<double, double, double> function) => new(name, function.Method.Name, null, function);
}
