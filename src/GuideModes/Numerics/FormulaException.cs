namespace GuideModes.Numerics;

/// <summary>A text is not a formula.</summary>
/// <remarks><see cref="Column"/> counts from 1; the message is a sentence that ends in it.</remarks>
public sealed class FormulaException : Exception
{
    public FormulaException()
    {
    }

    public FormulaException(string message)
        : base(message)
    {
    }

    public FormulaException(string message, Exception inner)
        : base(message, inner)
    {
    }

    internal FormulaException(int column, string message)
        : base(message) => Column = column;

    /// <summary>Where the fault stands, from 1.</summary>
    public int Column { get; }
}
