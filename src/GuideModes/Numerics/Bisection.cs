namespace GuideModes.Numerics;

/// <summary>Halving an interval down to neighbouring numbers.</summary>
internal static class Bisection
{
    /// <summary>Between a point where the predicate fails and one where it holds, the place where it turns true, to the last bit.</summary>
    public static double FirstTrue(Func<double, bool> predicate, double isFalse, double isTrue)
    {
        while (true)
        {
            var middle = 0.5 * (isFalse + isTrue);
            if (middle == isFalse || middle == isTrue) return isTrue;
            if (predicate(middle)) isTrue = middle;
            else isFalse = middle;
        }
    }
}
