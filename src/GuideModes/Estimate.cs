namespace GuideModes;

/// <summary>A computed number, and a bound on its distance from the exact one.</summary>
public readonly record struct Estimate(double Value, double Error)
{
    public double Lower => Value - Error;

    public double Upper => Value + Error;

    public bool Covers(double exact) => Math.Abs(exact - Value) <= Error;
}
