using GuideModes.Numerics;

namespace GuideModes.Tests.Numerics;

public sealed class FormulaTest
{
    [Theory]
    [InlineData("1 + 2*3", 7)]
    [InlineData("2^3^2", 512)]
    [InlineData("-2^2", -4)]
    [InlineData("(-2)^2", 4)]
    [InlineData("2^-1", 0.5)]
    [InlineData("2^-1^2", 0.5)]
    [InlineData("2*-3", -6)]
    [InlineData("--3", 3)]
    [InlineData("7-4-2", 1)]
    [InlineData("8/4/2", 1)]
    [InlineData("-2*3^2", -18)]
    [InlineData(".5 + 1.", 1.5)]
    [InlineData("1e-6 + 1E+2", 100.000001)]
    [InlineData("min(3, max(1, 2))", 2)]
    [InlineData("pi", Math.PI)]
    [InlineData("x + lambda", 3.5)]
    [InlineData(" sqrt ( 4 ) ", 2)]
    [InlineData("log10(1000)", 3)]
    [InlineData("abs(-3)", 3)]
    [InlineData("sech(0)", 1)]
    public void Value_OfAFormula_FollowsTheGrammar(string text, double expected) =>
        Assert.Equal(expected, Formula.Parse(text, "x").Value(2, 1.5), 1e-15 * Math.Max(1, Math.Abs(expected)));

    [Theory]
    [InlineData("", 1, "ends where")]
    [InlineData("   ", 4, "ends where")]
    [InlineData("1 +", 4, "ends where")]
    [InlineData("1 + * 2", 5, "found '*'")]
    [InlineData("(1 + 2", 7, "close the '(' of column 1")]
    [InlineData("1 + 2)", 6, "Expected an operator")]
    [InlineData("2 x", 3, "Expected an operator")]
    [InlineData("2x", 2, "Expected an operator")]
    [InlineData("1 + y", 5, "'y' is unknown; known are x, lambda, pi")]
    [InlineData("Sin(x)", 1, "'Sin' is unknown")]
    [InlineData("sin x", 5, "expected '('")]
    [InlineData("sin()", 1, "sin takes 1 argument, but has 0")]
    [InlineData("1+sin(x, 2)", 3, "sin takes 1 argument, but has 2")]
    [InlineData("min(x)", 1, "min takes 2 arguments, but has 1")]
    [InlineData("min(x,)", 7, "found ')'")]
    [InlineData("1e400", 1, "too large")]
    [InlineData(".", 1, "not a number")]
    [InlineData("1..2", 3, "found '.'")]
    [InlineData("x = 3", 3, "found '='")]
    [InlineData("x**2", 3, "found '*'")]
    [InlineData("+x", 1, "found '+'")]
    [InlineData("x\u0000", 2, "U+0000")]
    public void Parse_OfSomethingElse_SaysWhatAndWhere(string text, int column, string saying)
    {
        var fault = Assert.Throws<FormulaException>(() => Formula.Parse(text, "x"));
        Assert.Contains(saying, fault.Message, StringComparison.Ordinal);
        Assert.EndsWith($"(column {column}).", fault.Message, StringComparison.Ordinal);
        Assert.Equal(column, fault.Column);
    }

    [Fact]
    public void Parse_InLambdaAlone_RefusesTheCoordinate()
    {
        var fault = Assert.Throws<FormulaException>(() => Formula.Parse("1.5 + x", null));
        Assert.Contains("'x' is unknown; known are lambda, pi", fault.Message, StringComparison.Ordinal);
    }

    public static TheoryData<string> Attacks =>
    [
        new string('(', 990),
        new string('-', 999) + "1",
        string.Concat(Enumerable.Repeat("sin(", 240)),
        string.Concat(Enumerable.Repeat("2^", 490)) + "2",
        string.Concat(Enumerable.Repeat("2^-", 300)) + "2",
        new string('x', 5000),
        string.Concat(Enumerable.Repeat("1+", 100_000)) + "1",
        new string('(', 1_000_000),
    ];

    [Theory]
    [MemberData(nameof(Attacks))]
    public void Parse_OfAnAttack_IsRefused(string text) => Assert.Throws<FormulaException>(() => Formula.Parse(text, "x"));

    [Fact]
    public void Value_AtTheLimitsOfDepthAndSize_IsComputed()
    {
        var deep = new string('(', 98) + "x" + new string(')', 98);
        Assert.Equal(3, Formula.Parse(deep, "x").Value(3, 1));
        var wide = string.Concat(Enumerable.Repeat("x+", 249)) + "x";
        Assert.Equal(750, Formula.Parse(wide, "x").Value(3, 1));
        Assert.Equal(250, Formula.Parse(wide, "x").Jet(3, 1).D1);
    }

    /// <summary>The costliest formulas that are allowed still compile, number and jet, within the 100 ms of an edit.</summary>
    [Theory]
    [InlineData("sin(x)", 142)]
    [InlineData("x^x", 120)]
    [InlineData("x/3", 120)]
    [InlineData("x*x", 120)]
    public void Jet_OfTheLargestFormulas_IsReadyInTime(string term, int count)
    {
        var text = string.Join("+", Enumerable.Repeat(term, count));
        _ = Formula.Parse(term, "x").Jet(1, 1);
        var limit = TimeSpan.FromMilliseconds(100);
        var time = Timing.Of(
            () =>
            {
                var formula = Formula.Parse(text, "x");
                Assert.Equal(formula.Value(1.2, 1), formula.Jet(1.2, 1).Value, 1e-10);
            },
            limit);
        Assert.InRange(time, TimeSpan.Zero, limit);
    }

    [Fact]
    public void OnBranchOf_AFormulaWithBranches_KeepsOneBranch()
    {
        var formula = Formula.Parse("abs(x-3) + max(x, 5) + min(2, x)", "x");
        var branch = formula.OnBranchOf(1, 1);
        Assert.Equal(3, formula.Joints.Length);
        Assert.Empty(branch.Joints);
        Assert.Equal(3 - 10 + 5 + 10, branch.Value(10, 1));
        Assert.Equal(0, branch.Jet(3, 1).D1);
    }
}
