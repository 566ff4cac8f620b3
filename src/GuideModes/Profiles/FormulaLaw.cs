using GuideModes.Numerics;

namespace GuideModes.Profiles;

/// <summary>n (or, with <see cref="GradedQuantity.IndexSquared"/>, n²) is a formula in x and lambda.</summary>
/// <remarks>
/// The region is cut where an abs, min or max changes branch, and each piece keeps its own branch up to its ends; it is also cut where the argument of a
/// root is zero, and there, at a piece's end, derivatives may be unbounded. Those places, and where a region to infinity may be cut, are found by sampling (evenly, by doubling distance and at every number in the formula)
/// and bisection: two changes between neighbouring samples can be missed.
/// </remarks>
public sealed record FormulaLaw(GradedQuantity Quantity, Formula Formula) : IndexLaw
{
    /// <summary>How often a formula may change branch, or a root in it end, within one region.</summary>
    public const int MaximumJoints = 200;

    /// <summary>How many abs, min, max and roots a formula may have.</summary>
    public const int MaximumJointKinds = 20;

    /// <summary>How large the arguments of all of them may be together.</summary>
    public const int MaximumJointSize = 500;

    /// <summary>The formula's size times the pieces that its joints cut the region into.</summary>
    public const int MaximumCompiledSize = 20_000;

    private const int Samples = 2000;

    public override double? Limit(Wavelength wavelength) => Index(FurthestUm, wavelength);

    public override double? SettlesAt(double start, double furthest, Wavelength wavelength)
    {
        if (Limit(wavelength) is not { } limit || !double.IsFinite(limit)) return null;
        bool IsSettled(double x) =>
            Math.Abs(IndexSquared(x, wavelength) - limit * limit) <= DiffusedLaw.Settled * limit * limit;

        var samples = TailSamples(start, furthest);
        var lastUnsettled = Array.FindLastIndex(samples, x => !IsSettled(x));
        if (lastUnsettled < 0) return start;
        return lastUnsettled == samples.Length - 1
            ? null
            : Bisection.FirstTrue(IsSettled, samples[lastUnsettled], samples[lastUnsettled + 1]);
    }

    public override Fault? Misfit(Interval extent, bool isUnbounded, Wavelength wavelength)
    {
        if (Formula.Joints.Length > MaximumJointKinds)
            return new("n", $"The formula has {Formula.Joints.Length} abs, min, max and roots of x; at most {MaximumJointKinds} are allowed.");
        if (Formula.Joints.Sum(node => node.Size) > MaximumJointSize)
            return new("n", $"What stands inside abs, min, max and roots is too long: at most {MaximumJointSize} numbers, names and operators are allowed there together.");
        var joints = Joints(extent, wavelength).Count();
        if (joints > MaximumJoints)
            return new("n", $"The formula changes branch (abs, min, max, roots) more than {MaximumJoints} times in the region; at most {MaximumJoints} are allowed.");
        return (joints + 1) * FormulaSize > MaximumCompiledSize
            ? new("n", $"The formula changes branch (abs, min, max, roots) {joints} times, too often for its length; use a shorter formula or several regions.")
            : null;
    }

    public override IEnumerable<SmoothPiece> Pieces(Interval extent, int region, Wavelength wavelength)
    {
        var lambda = wavelength.Micrometres;
        if (Formula.Joints.IsEmpty) return [new FormulaPiece(extent, region, Quantity, Formula, lambda)];
        var branches = new Dictionary<FormulaNode, Formula>();
        return [.. extent.SplitAt(Joints(extent, wavelength).Take(MaximumJoints + 1)).Select(part =>
            new FormulaPiece(part, region, Quantity, BranchAt(part.Middle, lambda, branches), lambda))];
    }

    internal override int FormulaSize => Formula.Root.Size;

    internal override IEnumerable<double> Landmarks(Interval extent) => EvenSamples(extent);

    private double Index(double x, Wavelength wavelength) => Math.Sqrt(IndexSquared(x, wavelength));

    private double IndexSquared(double x, Wavelength wavelength) =>
        Quantity.ToIndexSquared(Formula.Value(x, wavelength.Micrometres));

    private Formula BranchAt(double x, double lambda, Dictionary<FormulaNode, Formula> known)
    {
        var branch = Formula.OnBranchOf(x, lambda);
        if (known.TryGetValue(branch.Root, out var compiled)) return compiled;
        known.Add(branch.Root, branch);
        return branch;
    }

    private IEnumerable<double> Joints(Interval extent, Wavelength wavelength)
    {
        var kinds = Formula.Joints;
        if (kinds.IsEmpty) return [];
        var samples = EvenSamples(extent);
        return kinds.SelectMany(node => SignChanges(x => node.Evaluate(x, wavelength.Micrometres), samples)).Order();
    }

    private static IEnumerable<double> SignChanges(Func<double, double> function, double[] samples)
    {
        var before = Sign(function(samples[0]));
        for (var i = 1; i < samples.Length; i++)
        {
            var sign = Sign(function(samples[i]));
            if (sign != before)
                yield return Bisection.FirstTrue(x => Sign(function(x)) != before, samples[i - 1], samples[i]);
            before = sign;
        }
    }

    private static int Sign(double value) => value > 0 ? 1 : value < 0 ? -1 : 0;

    private double[] EvenSamples(Interval extent)
    {
        var samples = new List<double>(Samples + 20);
        for (var i = 0; i < Samples; i++) samples.Add(extent.Start + extent.Length * i / Samples);
        samples.Add(extent.End);
        return WithNumbers(samples, extent);
    }

    private double[] TailSamples(double start, double furthest)
    {
        var samples = new List<double>(2 * Samples + 20);
        var tail = new Interval(start, furthest);
        for (var i = 0; i < Samples; i++) samples.Add(Math.Min(start + 0.25 * i, furthest));
        for (var i = 0; i < Samples; i++) samples.Add(start + tail.Length * Math.Pow(2, -17.0 * i / Samples));
        return WithNumbers(samples, tail);
    }

    /// <summary>With the numbers that stand in the formula, ascending: a feature is likely where a number points.</summary>
    private double[] WithNumbers(List<double> samples, Interval extent)
    {
        samples.AddRange(Formula.Numbers.Where(extent.Contains));
        samples.Sort();
        return [.. samples];
    }
}
