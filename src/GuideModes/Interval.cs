namespace GuideModes;

/// <summary>A stretch of the transverse coordinate, in µm, from <see cref="Start"/> to <see cref="End"/> ≥ <see cref="Start"/>.</summary>
public readonly record struct Interval(double Start, double End)
{
    public double Length => End - Start;

    public double Middle => 0.5 * (Start + End);

    public bool Contains(double x) => x >= Start && x <= End;
}
