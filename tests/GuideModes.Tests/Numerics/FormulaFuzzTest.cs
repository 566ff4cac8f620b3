using System.Text;
using GuideModes.Numerics;

namespace GuideModes.Tests.Numerics;

/// <summary>Random formulas, seeded: well-formed, damaged and garbage.</summary>
public sealed class FormulaFuzzTest
{
    private const int Count = 100_000;

    private static readonly TimeSpan Limit = TimeSpan.FromMilliseconds(100);

    private static readonly string[] Functions =
        ["exp", "ln", "log10", "sqrt", "abs", "sin", "cos", "tan", "sinh", "cosh", "tanh", "sech", "erf", "erfc"];

    /// <summary>None of 100,000 texts crashes the reader, and none takes 100 ms to read, compile and evaluate twice.</summary>
    [Fact]
    public void Parse_OfAHundredThousandTexts_NeverCrashesOrHangs()
    {
        var random = new Random(20240611);
        var (read, refused, slowest) = (0, 0, TimeSpan.Zero);
        Attempt("1 + x", ref read, ref refused);
        for (var i = 0; i < Count; i++)
        {
            var text = Text(random, i);
            var time = Timing.Of(() => Attempt(text, ref read, ref refused), Limit);
            if (time > slowest) slowest = time;
        }

        Assert.True(read > Count / 10, $"{read} read");
        Assert.True(refused > Count / 10, $"{refused} refused");
        Assert.True(slowest < Limit, $"slowest {slowest.TotalMilliseconds} ms");
    }

    /// <summary>The compiled number, the compiled jet and the tree walked node by node say the same.</summary>
    [Fact]
    public void Value_OfRandomFormulas_AgreesWithJetAndTree()
    {
        var random = new Random(7);
        var finite = 0;
        for (var i = 0; i < 500; i++)
        {
            var formula = Formula.Parse(Grammatical(random, 5), "x");
            var value = formula.Value(1.3, 0.8);
            Assert.Equal(value, formula.Root.Evaluate(1.3, 0.8));
            if (!double.IsFinite(value)) continue;
            finite++;
            Assert.Equal(value, formula.Jet(1.3, 0.8).Value, 1e-12 * Math.Max(1, Math.Abs(value)));
        }

        Assert.InRange(finite, 250, 500);
    }

    private static string Text(Random random, int i) => (i % 4) switch
    {
        0 => Grammatical(random, random.Next(1, 5)),
        1 => Damaged(random, Grammatical(random, random.Next(1, 6))),
        2 => Garbage(random),
        _ => Tokens(random),
    };

    private static void Attempt(string text, ref int read, ref int refused)
    {
        try
        {
            var formula = Formula.Parse(text, "x");
            if (read++ % 20 != 0) return;
            _ = formula.Value(1, 1);
            _ = formula.Jet(1, 1);
        }
        catch (FormulaException)
        {
            refused++;
        }
    }

    private static string Grammatical(Random random, int depth) => depth == 0
        ? random.Next(5) switch { 0 => "x", 1 => "lambda", 2 => "pi", 3 => "2", _ => (random.NextDouble() * 3).ToString("G4") }
        : random.Next(9) switch
        {
            0 => $"({Grammatical(random, depth - 1)})",
            1 => $"-{Grammatical(random, depth - 1)}",
            2 => $"{Functions[random.Next(Functions.Length)]}({Grammatical(random, depth - 1)})",
            3 => $"{(random.Next(2) == 0 ? "min" : "max")}({Grammatical(random, depth - 1)}, {Grammatical(random, depth - 1)})",
            4 => $"({Grammatical(random, depth - 1)})^{random.Next(4)}",
            var other => Grammatical(random, depth - 1) + "+-*/"[other - 5] + Grammatical(random, depth - 1),
        };

    private static string Damaged(Random random, string text)
    {
        var builder = new StringBuilder(text);
        for (var i = random.Next(1, 4); i > 0; i--)
        {
            var at = random.Next(builder.Length);
            if (random.Next(3) == 0) builder.Remove(at, 1);
            else if (random.Next(2) == 0) builder[at] = (char)random.Next(32, 127);
            else builder.Insert(at, "()^,.e-"[random.Next(7)]);
            if (builder.Length == 0) builder.Append('x');
        }

        return builder.ToString();
    }

    private static string Garbage(Random random) =>
        string.Create(random.Next(60), random, (span, source) =>
        {
            for (var i = 0; i < span.Length; i++) span[i] = (char)source.Next(source.Next(2) == 0 ? 128 : 65536);
        });

    private static string Tokens(Random random)
    {
        string[] tokens = ["(", ")", "+", "-", "*", "/", "^", ",", "x", "lambda", "pi", "1", ".5", "2e3", "sin", "min", "erfc(", " "];
        return string.Concat(Enumerable.Range(0, random.Next(400)).Select(_ => tokens[random.Next(tokens.Length)]));
    }
}
