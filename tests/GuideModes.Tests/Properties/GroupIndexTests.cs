using GuideModes.Guides;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Properties;

/// <summary>n_g from the field's integrals against n_eff − λ·dn_eff/dλ from the solver at neighbouring wavelengths.</summary>
public sealed class GroupIndexTests
{
    private const double Step = 2e-3;

    [Fact]
    public void GroupIndex_WithoutDispersion_IsTheSlopeOfTheIndex() => Property.Holds(
        RandomGuides.Any,
        guide => Compare(guide.WavelengthUm, wavelength => (guide with { WavelengthUm = wavelength }).Document));

    [Fact]
    public void GroupIndex_WithDispersion_IsTheSlopeOfTheIndex() => Property.Holds(
        RandomGuides.Bounded,
        guide => Compare(guide.WavelengthUm, guide.Dispersive));

    /// <remarks>
    /// The fourth-order difference at two steps: their difference is more than the better one's error (a sixteenth of the other's),
    /// and the solver's bounds go into it divided by the step.
    /// </remarks>
    private static void Compare(double wavelength, Func<double, GuideDocument> documentAt)
    {
        GuidedMode[] At(double steps) => [.. Documents.Solve(documentAt(wavelength * (1 + steps * Step))).Modes];
        GuidedMode[] here = At(0), back = At(-1), ahead = At(1), halfBack = At(-0.5), halfAhead = At(0.5), farBack = At(-2), farAhead = At(2);
        foreach (var mode in here.Where(mode => mode.Order < farAhead.Length && mode.Order < farBack.Length))
        {
            double Index(GuidedMode[] modes) => modes[mode.Order].EffectiveIndex.Value;
            var coarse = (8 * (Index(ahead) - Index(back)) - (Index(farAhead) - Index(farBack))) / (12 * Step);
            var fine = (8 * (Index(halfAhead) - Index(halfBack)) - (Index(ahead) - Index(back))) / (6 * Step);
            var tolerance = Math.Abs(coarse - fine) + 3 * mode.EffectiveIndex.Error / Step;
            var got = mode.EffectiveIndex.Value - mode.GroupIndex;
            Assert.True(Math.Abs(got - fine) <= tolerance, $"m={mode.Order}: λ·dn/dλ {got:R}, difference {fine:R}, off by {got - fine:E2}, allowed {tolerance:E2}");
        }
    }
}
