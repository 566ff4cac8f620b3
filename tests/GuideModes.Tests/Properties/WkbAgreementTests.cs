using CsCheck;
using GuideModes.Solvers.Wkb;
using GuideModes.Tests.Published;

namespace GuideModes.Tests.Properties;

/// <summary>Asymptotics must come nearer the exact answer as the guide grows.</summary>
public sealed class WkbAgreementTests
{
    /// <summary>Below this, in units of b, the two engines' rounding is compared and nothing else.</summary>
    private const double Floor = 1e-12;

    private static readonly Gen<(string Law, double V, double A, int Order)> Cases =
        Gen.Select(RandomGuides.OneOf("gaussian", "sech2", "exponential", "erfc"), Gen.Double[3, 8], Gen.Double[1, 20], Gen.Int[0, 3]);

    [Fact]
    public void FirstOrderIndex_VFourfold_ComesNearer() => Property.Holds(Cases, one => Compare(one, mode => mode.FirstOrderIndex));

    [Fact]
    public void EffectiveIndex_VFourfold_ComesNearer() => Property.Holds(Cases, one => Compare(one, mode => mode.EffectiveIndex.Value));

    private static void Compare((string Law, double V, double A, int Order) one, Func<WkbMode, double?> value)
    {
        if (Deviation(one.Law, one.V, one.A, one.Order, value) is not { } small) return;
        if (Deviation(one.Law, 4 * one.V, one.A, one.Order, value) is not { } large) return;
        Assert.True(large <= small + Floor, $"deviation of b {small:E2} at V, {large:E2} at 4V");
    }

    /// <summary>How far b is off; null where one of the two engines has no such mode.</summary>
    private static double? Deviation(string law, double v, double a, int order, Func<WkbMode, double?> value)
    {
        var isBuried = law is "gaussian" or "sech2";
        var guide = new NormalisedGuide(v, isBuried ? 0 : a);
        var center = law == "gaussian" ? 7 : law == "sech2" ? 20 : 0;
        var document = guide.Document(Documents.Region(null, Documents.Diffused(law, guide.NBase, guide.DeltaN, 1, center, "n2")));
        var exact = Documents.Solve(document).Modes;
        var asymptotic = new WkbSolver().Solve(Documents.Problem(document)).Modes.FirstOrDefault(mode => mode.Order == order);
        if (order >= exact.Length || asymptotic is null || value(asymptotic) is not { } index) return null;
        return Math.Abs((index * index - guide.BaseSquared) / guide.Rise - guide.NormalisedIndex(exact[order]));
    }
}
