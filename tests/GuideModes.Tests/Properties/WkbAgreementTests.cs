using CsCheck;
using GuideModes.Solvers.Wkb;
using GuideModes.Tests.Published;

namespace GuideModes.Tests.Properties;

/// <summary>Asymptotics must come nearer the exact answer as the guide grows.</summary>
public sealed class WkbAgreementTests
{
    /// <summary>Below this, in units of b, the two engines' rounding is compared and nothing else.</summary>
    private const double Floor = 1e-12;

    private static readonly Gen<(string Law, double V, double A)> Cases =
        Gen.Select(RandomGuides.OneOf("gaussian", "sech2", "exponential", "erfc"), Gen.Double[3, 8], Gen.Double[1, 20]);

    [Fact]
    public void FirstOrderIndex_VManyfold_ComesNearer() => Property.Holds(Cases, one => Compare(one, mode => mode.FirstOrderIndex));

    [Fact]
    public void EffectiveIndex_VManyfold_ComesNearer() => Property.Holds(Cases, one => Compare(one, mode => mode.EffectiveIndex.Value));

    /// <remarks>
    /// One mode's deviation may pass through zero on the way; the largest of all modes must fall. A profile that starts at a cover is
    /// given six times its V and many modes to begin with: its low modes sit in a nearly linear well, where b's error falls as V^(−2/3)
    /// alone, and with one or two modes an error can be small by accident.
    /// </remarks>
    private static void Compare((string Law, double V, double A) one, Func<WkbMode, double?> value)
    {
        var times = IsBuried(one.Law) ? 4 : 6;
        var v = IsBuried(one.Law) ? one.V : 2.5 * one.V;
        double small = Largest(one.Law, v, one.A, value), large = Largest(one.Law, times * v, one.A, value);
        Assert.True(large <= small + Floor, $"largest deviation of b {small:E2} at V={v}, {large:E2} at {times}V");
    }

    private static bool IsBuried(string law) => law is "gaussian" or "sech2";

    /// <summary>By how much b is off at most, among the modes that both engines have.</summary>
    private static double Largest(string law, double v, double a, Func<WkbMode, double?> value)
    {
        var guide = new NormalisedGuide(v, IsBuried(law) ? 0 : a);
        var center = law == "gaussian" ? 7 : law == "sech2" ? 20 : 0;
        var document = guide.Document(Documents.Region(null, Documents.Diffused(law, guide.NBase, guide.DeltaN, 1, center, "n2")));
        var exact = Documents.Solve(document).Modes;
        var deviations = new WkbSolver().Solve(Documents.Problem(document)).Modes
            .Where(mode => mode.Order < exact.Length && value(mode) is not null)
            .Select(mode => (value(mode)!.Value * value(mode)!.Value - guide.BaseSquared) / guide.Rise - guide.NormalisedIndex(exact[mode.Order]));
        return deviations.Max(Math.Abs);
    }
}
