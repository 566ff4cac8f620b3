using System.Globalization;

namespace GuideModes.Numerics;

/// <summary>Reads a formula by recursive descent.</summary>
/// <remarks>
/// <code>
/// sum     = product { ("+" | "-") product }
/// product = signed { ("*" | "/") signed }
/// signed  = "-" signed | power
/// power   = primary [ "^" raised ]          right to left, above the unary minus: -x^2 = -(x^2)
/// raised  = "-" raised | power              so that 2^-1 may be written
/// primary = number | name | name "(" sum { "," sum } ")" | "(" sum ")"
/// </code>
/// Recursion is counted and refused beyond <see cref="Formula.MaximumDepth"/>, so no text can exhaust the stack.
/// </remarks>
internal sealed class FormulaParser(string text, string? coordinate)
{
    private int _at;
    private int _depth;

    /// <exception cref="FormulaException">The text is not a formula; the message has the column.</exception>
    public FormulaNode Parse()
    {
        if (text.Length > Formula.MaximumLength)
            throw Error(Formula.MaximumLength, $"A formula has at most {Formula.MaximumLength} characters; this one has {text.Length}");
        var node = Sum();
        if (!IsAtEnd()) throw Error(_at, $"Expected an operator or the end of the formula, but found '{Shown()}'");
        if (node.Size > Formula.MaximumSize) throw Error(0, $"The formula is too large: at most {Formula.MaximumSize} numbers, names and operators are allowed");
        return node;
    }

    private FormulaNode Sum()
    {
        var left = Product();
        while (Peek() is '+' or '-') left = new ArithmeticNode(text[_at++], left, Product());
        return left;
    }

    private FormulaNode Product()
    {
        var left = Signed();
        while (Peek() is '*' or '/') left = new ArithmeticNode(text[_at++], left, Signed());
        return left;
    }

    private FormulaNode Signed() => Nested(() => Accept('-') ? new NegateNode(Signed()) : Power());

    private FormulaNode Power()
    {
        var basis = Primary();
        return Accept('^') ? new PowerNode(basis, Raised()) : basis;
    }

    private FormulaNode Raised() => Nested(() => Accept('-') ? new NegateNode(Raised()) : Power());

    private FormulaNode Primary()
    {
        var c = Peek();
        if (char.IsAsciiDigit(c) || c == '.') return Number();
        if (char.IsAsciiLetter(c)) return Named();
        if (!Accept('(')) throw Error(_at, IsAtEnd() ? "The formula ends where a number, a name or '(' is expected" : $"Expected a number, a name or '(', but found '{Shown()}'");
        var opened = _at;
        var inner = Sum();
        return Accept(')') ? inner : throw Error(_at, $"Expected ')' to close the '(' of column {opened}");
    }

    private NumberNode Number()
    {
        var start = _at;
        while (char.IsAsciiDigit(Here(0))) _at++;
        if (Here(0) == '.') _at++;
        while (char.IsAsciiDigit(Here(0))) _at++;
        if (Here(0) is 'e' or 'E' && (char.IsAsciiDigit(Here(1)) || (Here(1) is '+' or '-' && char.IsAsciiDigit(Here(2)))))
        {
            _at += 2;
            while (char.IsAsciiDigit(Here(0))) _at++;
        }

        var digits = text.AsSpan(start, _at - start);
        if (!double.TryParse(digits, NumberStyles.Float, CultureInfo.InvariantCulture, out var value))
            throw Error(start, $"'{digits}' is not a number");
        return double.IsFinite(value) ? new NumberNode(value) : throw Error(start, $"The number {digits} is too large");
    }

    private FormulaNode Named()
    {
        var start = _at;
        while (char.IsAsciiLetterOrDigit(Here(0)) || Here(0) == '_') _at++;
        var name = text[start.._at];
        if (FormulaFunction.Find(name) is { } function) return Call(function, start);
        if (name == coordinate) return new CoordinateNode();
        return name switch
        {
            "lambda" => new LambdaNode(),
            "pi" => new NumberNode(Math.PI),
            _ => throw Error(start, $"'{name}' is unknown; known are {KnownVariables()}, pi and the functions {FormulaFunction.Names}"),
        };
    }

    private CallNode Call(FormulaFunction function, int start)
    {
        if (!Accept('(')) throw Error(_at, $"{function.Name} is a function: expected '(' after it");
        List<FormulaNode> arguments = [];
        if (Peek() != ')')
        {
            do arguments.Add(Sum());
            while (Accept(','));
        }

        if (!Accept(')')) throw Error(_at, $"Expected ')' to close the arguments of {function.Name}");
        return arguments.Count == function.Arity
            ? new(function, arguments)
            : throw Error(start, $"{function.Name} takes {Arguments(function.Arity)}, but has {arguments.Count}");
    }

    private FormulaNode Nested(Func<FormulaNode> read)
    {
        if (++_depth > Formula.MaximumDepth) throw Error(_at, $"The formula nests deeper than {Formula.MaximumDepth} levels");
        var node = read();
        _depth--;
        return node;
    }

    private char Peek()
    {
        while (_at < text.Length && text[_at] is ' ' or '\t' or '\r' or '\n') _at++;
        return Here(0);
    }

    private bool IsAtEnd()
    {
        Peek();
        return _at >= text.Length;
    }

    private char Here(int ahead) => _at + ahead < text.Length ? text[_at + ahead] : '\0';

    private bool Accept(char wanted)
    {
        if (Peek() != wanted) return false;
        _at++;
        return true;
    }

    private string Shown() => char.IsControl(text[_at]) || char.IsSurrogate(text[_at]) ? $"U+{(int)text[_at]:X4}" : text[_at].ToString();

    private string KnownVariables() => coordinate is null ? "lambda" : $"{coordinate}, lambda";

    private static string Arguments(int count) => count == 1 ? "1 argument" : $"{count} arguments";

    private static FormulaException Error(int at, string message) => new(at + 1, $"{message} (column {at + 1}).");
}
