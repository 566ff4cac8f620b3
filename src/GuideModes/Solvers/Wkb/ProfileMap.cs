using GuideModes.Numerics;
using GuideModes.Profiles;

namespace GuideModes.Solvers.Wkb;

/// <summary>A stretch of one piece on which n² is monotone.</summary>
internal readonly record struct Segment(int Piece, double Left, double Right, double LeftSquared, double RightSquared)
{
    public double Least => Math.Min(LeftSquared, RightSquared);

    public double Most => Math.Max(LeftSquared, RightSquared);
}

/// <summary>What the phase integrals need of a profile and that no mode changes: monotone segments and the jets at joints.</summary>
/// <remarks>
/// Turning points of n² are found from sign changes of its slope on a mesh that is halved until the cubic through
/// values and slopes predicts the middle; limits: a ripple narrower than a third of a wavelength or so may pass unseen, and
/// its phase is then negligible.
/// </remarks>
internal sealed class ProfileMap
{
    /// <summary>Below this share of n² a jump at a joint is rounding.</summary>
    public const double JumpTolerance = 1e-11;

    private const int DeepestHalving = 10;
    private readonly List<Segment> segments = [];
    private readonly double range;
    private readonly int[] firstSegments;

    public ProfileMap(ModeProblem problem)
    {
        Profile = problem.Profile;
        IsTransverseMagnetic = problem.Polarization == Polarization.TM;
        Wavenumber = Profile.Wavelength.Wavenumber;
        var pieces = Profile.Pieces;
        (Starts, Ends) = (new Jet[pieces.Length], new Jet[pieces.Length]);
        range = 0;
        for (var i = 0; i < pieces.Length; i++)
        {
            Starts[i] = pieces[i].Jet(pieces[i].Extent.Start);
            Ends[i] = pieces[i].Jet(pieces[i].Extent.End);
            range = Math.Max(range, Math.Max(Starts[i].Value, Ends[i].Value) - Profile.CutoffIndexSquared);
        }

        range = Math.Max(range, 1e-6 * Profile.CutoffIndexSquared);
        for (var i = 0; i < pieces.Length; i++)
        {
            if (pieces[i].Extent.Length > 0) Divide(i);
        }

        Segments = [.. segments];
        firstSegments = new int[pieces.Length + 1];
        foreach (var segment in Segments) firstSegments[segment.Piece + 1]++;
        for (var i = 0; i < pieces.Length; i++) firstSegments[i + 1] += firstSegments[i];
    }

    public IndexProfile Profile { get; }

    public bool IsTransverseMagnetic { get; }

    /// <summary>k₀, rad/µm</summary>
    public double Wavenumber { get; }

    /// <summary>From left to right, without gaps.</summary>
    public Segment[] Segments { get; }

    /// <summary>The segments of one piece.</summary>
    public ReadOnlySpan<Segment> SegmentsOf(int piece) => Segments.AsSpan(firstSegments[piece]..firstSegments[piece + 1]);

    /// <summary>n² with its derivatives at the start of each piece.</summary>
    public Jet[] Starts { get; }

    /// <summary>n² with its derivatives at the end of each piece.</summary>
    public Jet[] Ends { get; }

    /// <summary>n² on the left of a joint; joint i is the start of piece i.</summary>
    public double LeftOf(int joint) => joint == 0 ? Profile.Cover.IndexSquared : Ends[joint - 1].Value;

    /// <summary>n² on the right of a joint.</summary>
    public double RightOf(int joint) => joint == Starts.Length ? Profile.Substrate.IndexSquared : Starts[joint].Value;

    /// <summary>True where n² jumps at the joint.</summary>
    public bool IsStep(int joint) => Math.Abs(LeftOf(joint) - RightOf(joint)) > JumpTolerance * RightOf(joint);

    /// <summary>
    /// True where the profile's first or last joint is none that a field could feel: no jump, and a kink whose Airy length is longer than
    /// the whole profile. So ends a tail that was followed until it could not be told from its medium.
    /// </summary>
    public bool IsSeamless(int joint)
    {
        if (IsStep(joint) || (joint > 0 && joint < Starts.Length)) return false;
        var slope = joint == 0 ? Starts[0].D1 : Ends[^1].D1;
        var length = Profile.Extent.Length;
        return Wavenumber * Wavenumber * Math.Abs(slope) * length * length * length < 1;
    }

    /// <summary>Where n² equals the level on a segment whose ends enclose it.</summary>
    public double Crossing(in Segment segment, double level)
    {
        var piece = Profile.Pieces[segment.Piece];
        return Roots.Bracketed(piece, level, segment.Left, segment.Right, segment.LeftSquared - level, segment.RightSquared - level);
    }

    private void Divide(int index)
    {
        var piece = Profile.Pieces[index];
        var (left, right) = (piece.Extent.Start, piece.Extent.End);
        if (piece.IsUniform)
        {
            segments.Add(new(index, left, right, Starts[index].Value, Starts[index].Value));
            return;
        }

        var count = Math.Clamp((int)Math.Ceiling(piece.Extent.Length / Profile.Wavelength.Micrometres), 8, 96);
        var start = left;
        var (x0, jet0) = (left, Starts[index]);
        for (var i = 1; i <= count; i++)
        {
            var x1 = i == count ? right : left + (right - left) * i / count;
            var jet1 = i == count ? Ends[index] : piece.Jet(x1);
            Scan(index, x0, jet0, x1, jet1, DeepestHalving, ref start);
            (x0, jet0) = (x1, jet1);
        }

        Close(index, start, right);
    }

    private void Scan(int index, double x0, in Jet jet0, double x1, in Jet jet1, int depth, ref double start)
    {
        var piece = Profile.Pieces[index];
        var h = x1 - x0;
        var middle = 0.5 * (x0 + x1);
        var predicted = 0.5 * (jet0.Value + jet1.Value) + h * (jet0.D1 - jet1.D1) / 8;
        if (depth > 0 && double.IsFinite(predicted) && Math.Abs(piece.IndexSquared(middle) - predicted) > 2e-3 * range)
        {
            var jet = piece.Jet(middle);
            Scan(index, x0, jet0, middle, jet, depth - 1, ref start);
            Scan(index, middle, jet, x1, jet1, depth - 1, ref start);
            return;
        }

        var flatHere = jet1.D1 == 0 && x1 < piece.Extent.End;
        if (!(jet0.D1 * jet1.D1 < 0 || flatHere) || !(h * (Math.Abs(jet0.D1) + Math.Abs(jet1.D1)) > 1e-13)) return;
        var critical = flatHere ? x1 : FlatPoint(piece, x0, jet0.D1, x1);
        Close(index, start, critical);
        start = critical;
    }

    private void Close(int index, double left, double right)
    {
        if (!(right > left)) return;
        var piece = Profile.Pieces[index];
        segments.Add(new(index, left, right, piece.IndexSquared(left), piece.IndexSquared(right)));
    }

    private static double FlatPoint(SmoothPiece piece, double a, double slopeA, double b)
    {
        for (var i = 0; i < 60; i++)
        {
            var middle = 0.5 * (a + b);
            if (middle <= a || middle >= b) break;
            var jet = piece.Jet(middle);
            if (jet.D1 == 0) return middle;
            if (jet.D1 > 0 == slopeA > 0) a = middle;
            else b = middle;
            var newton = middle - jet.D1 / jet.D2;
            if (i < 3 || !(newton > a && newton < b)) continue;
            var polished = newton - piece.Jet(newton).D1 / piece.Jet(newton).D2;
            if (Math.Abs(polished - newton) < 1e-9 * (Math.Abs(newton) + 1)) return Math.Clamp(polished, a, b);
        }

        return 0.5 * (a + b);
    }
}
