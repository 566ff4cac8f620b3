using System.Linq.Expressions;
using System.Reflection;

namespace GuideModes.Numerics;

/// <summary>The parameters of a compiled formula.</summary>
internal sealed record FormulaScope(ParameterExpression Coordinate, ParameterExpression Lambda);

/// <summary>One node of a formula's tree: it can be evaluated as it stands, or compiled to numbers or to jets.</summary>
internal abstract record FormulaNode
{
    private static readonly Type JetType = typeof(Jet);

    /// <summary>How many nodes hang here, this one included.</summary>
    public virtual int Size => 1;

    /// <summary>True if the value depends on neither x nor λ.</summary>
    public virtual bool IsConstant => false;

    public virtual IEnumerable<FormulaNode> Children => [];

    /// <summary>Where this is zero, the node itself passes from one branch to another; null for a smooth node.</summary>
    public virtual FormulaNode? SwitchesAt => null;

    /// <summary>Where this is zero, the node has no derivatives: the argument of a root; null for a node that has them everywhere.</summary>
    public virtual FormulaNode? SingularAt => null;

    public abstract double Evaluate(double x, double lambda);

    /// <summary>The same node without branches: each abs, min and max replaced by the branch it takes at (x, λ).</summary>
    public virtual FormulaNode OnBranchOf(double x, double lambda) => this;

    public abstract Expression ToNumber(FormulaScope scope);

    public abstract Expression ToJet(FormulaScope scope);

    public IEnumerable<FormulaNode> Descendants() => Children.SelectMany(child => child.Descendants()).Prepend(this);

    protected static Expression JetOf(string factory, Expression argument) =>
        Expression.Call(JetType.GetMethod(factory)!, argument);
}

internal sealed record NumberNode(double Value) : FormulaNode
{
    public override bool IsConstant => true;

    public override double Evaluate(double x, double lambda) => Value;

    public override Expression ToNumber(FormulaScope scope) => Expression.Constant(Value);

    public override Expression ToJet(FormulaScope scope) => JetOf(nameof(Jet.Constant), Expression.Constant(Value));
}

internal sealed record CoordinateNode : FormulaNode
{
    public override double Evaluate(double x, double lambda) => x;

    public override Expression ToNumber(FormulaScope scope) => scope.Coordinate;

    public override Expression ToJet(FormulaScope scope) => JetOf(nameof(Jet.Coordinate), scope.Coordinate);
}

internal sealed record LambdaNode : FormulaNode
{
    public override double Evaluate(double x, double lambda) => lambda;

    public override Expression ToNumber(FormulaScope scope) => scope.Lambda;

    public override Expression ToJet(FormulaScope scope) => JetOf(nameof(Jet.Lambda), scope.Lambda);
}

internal sealed record NegateNode(FormulaNode Of) : FormulaNode
{
    public override int Size { get; } = Of.Size + 1;

    public override bool IsConstant { get; } = Of.IsConstant;

    public override IEnumerable<FormulaNode> Children => [Of];

    public override double Evaluate(double x, double lambda) => -Of.Evaluate(x, lambda);

    public override FormulaNode OnBranchOf(double x, double lambda) => new NegateNode(Of.OnBranchOf(x, lambda));

    public override Expression ToNumber(FormulaScope scope) => Expression.Negate(Of.ToNumber(scope));

    public override Expression ToJet(FormulaScope scope) => Expression.Negate(Of.ToJet(scope));
}

internal sealed record ArithmeticNode(char Operator, FormulaNode Left, FormulaNode Right) : FormulaNode
{
    public override int Size { get; } = Left.Size + Right.Size + 1;

    public override bool IsConstant { get; } = Left.IsConstant && Right.IsConstant;

    public override IEnumerable<FormulaNode> Children => [Left, Right];

    public override double Evaluate(double x, double lambda)
    {
        var (left, right) = (Left.Evaluate(x, lambda), Right.Evaluate(x, lambda));
        return Operator switch
        {
            '+' => left + right,
            '-' => left - right,
            '*' => left * right,
            _ => left / right,
        };
    }

    public override FormulaNode OnBranchOf(double x, double lambda) =>
        new ArithmeticNode(Operator, Left.OnBranchOf(x, lambda), Right.OnBranchOf(x, lambda));

    public override Expression ToNumber(FormulaScope scope) => Combine(Left.ToNumber(scope), Right.ToNumber(scope));

    public override Expression ToJet(FormulaScope scope) =>
        Combine(Left.ToJet(scope), Right.ToJet(scope), JetMethod(nameof(JetMath.Product)), JetMethod(nameof(JetMath.Quotient)));

    private BinaryExpression Combine(Expression left, Expression right, MethodInfo? product = null, MethodInfo? quotient = null) => Operator switch
    {
        '+' => Expression.Add(left, right),
        '-' => Expression.Subtract(left, right),
        '*' => Expression.Multiply(left, right, product),
        _ => Expression.Divide(left, right, quotient),
    };

    private static MethodInfo JetMethod(string name) => typeof(JetMath).GetMethod(name, BindingFlags.Static | BindingFlags.NonPublic)!;
}

internal sealed record PowerNode(FormulaNode Base, FormulaNode Exponent) : FormulaNode
{
    private bool IsSquare => Exponent is NumberNode { Value: 2 };

    public override int Size { get; } = Base.Size + Exponent.Size + 1;

    public override bool IsConstant { get; } = Base.IsConstant && Exponent.IsConstant;

    public override IEnumerable<FormulaNode> Children => [Base, Exponent];

    public override FormulaNode? SingularAt =>
        Exponent.IsConstant && double.IsInteger(Exponent.Evaluate(0, 0)) ? null : Base;

    public override double Evaluate(double x, double lambda)
    {
        var value = Base.Evaluate(x, lambda);
        return IsSquare ? value * value : Math.Pow(value, Exponent.Evaluate(x, lambda));
    }

    public override FormulaNode OnBranchOf(double x, double lambda) =>
        new PowerNode(Base.OnBranchOf(x, lambda), Exponent.OnBranchOf(x, lambda));

    public override Expression ToNumber(FormulaScope scope) => IsSquare
        ? Call(typeof(RealMath), nameof(RealMath.Square), Base.ToNumber(scope))
        : Call(typeof(RealMath), nameof(RealMath.Pow), Base.ToNumber(scope), Exponent.ToNumber(scope));

    public override Expression ToJet(FormulaScope scope)
    {
        if (IsSquare) return Call(typeof(JetMath), nameof(JetMath.Square), Base.ToJet(scope));
        var exponent = Exponent.IsConstant ? Exponent.ToNumber(scope) : Exponent.ToJet(scope);
        return Call(typeof(JetMath), nameof(JetMath.Pow), Base.ToJet(scope), exponent);
    }

    private static MethodCallExpression Call(Type type, string method, params Expression[] arguments) =>
        Expression.Call(type.GetMethod(method, [.. arguments.Select(argument => argument.Type)])!, arguments);
}

internal sealed record CallNode(FormulaFunction Function, IReadOnlyList<FormulaNode> Arguments) : FormulaNode
{
    public override int Size { get; } = Arguments.Sum(argument => argument.Size) + 1;

    public override bool IsConstant { get; } = Arguments.All(argument => argument.IsConstant);

    public override IEnumerable<FormulaNode> Children => Arguments;

    public override FormulaNode? SwitchesAt => Function.Name switch
    {
        "abs" => Arguments[0],
        "min" or "max" => new ArithmeticNode('-', Arguments[0], Arguments[1]),
        _ => null,
    };

    public override FormulaNode? SingularAt => Function.Name == "sqrt" ? Arguments[0] : null;

    public override double Evaluate(double x, double lambda) => Arguments.Count == 1
        ? Function.OfOne!(Arguments[0].Evaluate(x, lambda))
        : Function.OfTwo!(Arguments[0].Evaluate(x, lambda), Arguments[1].Evaluate(x, lambda));

    public override FormulaNode OnBranchOf(double x, double lambda)
    {
        var arguments = Arguments.Select(argument => argument.OnBranchOf(x, lambda)).ToArray();
        if (SwitchesAt is null) return new CallNode(Function, arguments);
        var isBelow = SwitchesAt.Evaluate(x, lambda) < 0;
        return Function.Name switch
        {
            "abs" => isBelow ? new NegateNode(arguments[0]) : arguments[0],
            "min" => isBelow ? arguments[0] : arguments[1],
            _ => isBelow ? arguments[1] : arguments[0],
        };
    }

    public bool Equals(CallNode? other) => other is not null && Function == other.Function && Arguments.SequenceEqual(other.Arguments);

    public override int GetHashCode() => Arguments.Aggregate(Function.GetHashCode(), HashCode.Combine);

    public override Expression ToNumber(FormulaScope scope) =>
        Expression.Call(Function.Method(typeof(RealMath), typeof(double)), Arguments.Select(argument => argument.ToNumber(scope)));

    public override Expression ToJet(FormulaScope scope) =>
        Expression.Call(Function.Method(typeof(JetMath), typeof(Jet)), Arguments.Select(argument => argument.ToJet(scope)));
}
