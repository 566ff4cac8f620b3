using static GuideModes.Tests.Documents;

namespace GuideModes.Tests.Published;

/// <summary>Profiles whose modes are known in closed form or as roots of hypergeometric functions.</summary>
public sealed class ClosedFormTests
{
    /// <summary>b = ((s − m)/V)², s = (√(1 + 4V²) − 1)/2.</summary>
    [Theory]
    [InlineData(1.7)]
    [InlineData(6)]
    [InlineData(25.3)]
    public void SechSquared_AnyV_AgreesWithItsFormula(double v)
    {
        var guide = new NormalisedGuide(v, 0);
        var s = (Math.Sqrt(1 + 4 * v * v) - 1) / 2;
        var expected = Enumerable.Range(0, (int)Math.Ceiling(s)).Select(m => Math.Pow((s - m) / v, 2)).ToArray();
        var b = guide.Solve(Region(null, Diffused("sech2", guide.NBase, guide.DeltaN, 1, 20, "n2")));

        WorkedExamples.Compare($"sech², V={v}", "Pöschl & Teller 1933 (formula from memory)", expected, b, guide.Rounding);
    }

    [Fact]
    public void SechSquared_VOfSix_AgreesWithTheTable()
    {
        var guide = new NormalisedGuide(6, 0);
        var b = guide.Solve(Region(null, guide.Formula("sech(x - 20)^2")));

        WorkedExamples.Compare("sech² by formula, V=6", "worked_examples.json", WorkedExamples.ClosedForm("sech2_V6"), b, guide.Rounding);
    }

    [Theory]
    [InlineData(1, "halfparab_V8_A1.0")]
    [InlineData(20, "halfparab_V8_A20.0")]
    public void HalfParabola_WithACover_AgreesWithItsKummerFunctions(double a, string row)
    {
        var guide = new NormalisedGuide(8, a);
        var b = guide.Solve(Region(1, Power(guide.NPeak, guide.NBase, 1, 2, 0)));

        WorkedExamples.Compare($"half parabola, V=8, A={a}", "Kummer functions, worked_examples.json", WorkedExamples.ClosedForm(row), b, guide.Rounding);
    }

    [Fact]
    public void TruncatedParabola_Symmetric_AgreesWithItsKummerFunctions()
    {
        var guide = new NormalisedGuide(5, 0);
        double[] even = WorkedExamples.ClosedForm("symparab_V5_p0"), odd = WorkedExamples.ClosedForm("symparab_V5_p1");
        var b = guide.Solve(Region(2, Power(guide.NPeak, guide.NBase, 1, 2, 1)));

        WorkedExamples.Compare("truncated parabola, V=5", "Kummer functions, worked_examples.json", [even[0], odd[0], even[1]], b, guide.Rounding);
    }

    /// <summary>N² = n0² − (2m + 1)·n0·√(2Δ)/(ka) for n² = n0²(1 − 2Δx²/a²), with n0 1.5, Δ 0.01, a 5 µm, λ 1 µm.</summary>
    /// <remarks>The parabola is cut 25 µm from its axis, where n is still above 1 and the modes' field is e^(−83) of its peak.</remarks>
    [Fact]
    public void InfiniteParabola_LowModes_AgreeWithTheOscillator()
    {
        var document = Planar(1, Polarization.TE, 1.06, 1.06, Region(50, Power(1.5, 1.5 * Math.Sqrt(1 - 0.02 * 25), 25, 2, 25)));
        var modes = Solve(document).Modes;
        double[] expected = WorkedExamples.ClosedForm("parabola_slab");
        for (var m = 0; m < expected.Length; m++)
            Deviation.Record($"infinite parabola, n_eff of m={m}", "harmonic oscillator, worked_examples.json", expected[m], modes[m].EffectiveIndex.Value, 1e-14);
    }

    /// <summary>√b = 1 − (m + ½)/V for f = 2e^(−x) − e^(−2x) on the whole line.</summary>
    /// <remarks>
    /// f falls without bound to the left, n² with it. The guide starts at x = −2.5, where f = −124 and the mode's field is
    /// exp(−V·e^2.5) = 4e-27 of its peak, so that what stands before cannot be felt; the small rise keeps n² above 1 there.
    /// </remarks>
    [Fact]
    public void Morse_VOfFive_AgreesWithItsFormula()
    {
        const double start = 2.5, baseSquared = 2.25, rise = 0.008;
        var wavelength = Math.Tau * Math.Sqrt(rise) / 5;
        var formula = $"{Text(baseSquared)} + {Text(rise)}*(2*exp(-(x - {start})) - exp(-2*(x - {start})))";
        var document = Planar(wavelength, Polarization.TE, 1.1, 1.5, Region(null, Formula(formula, "n2")));
        var b = Solve(document).Modes.Select(mode => (mode.EffectiveIndex.Value * mode.EffectiveIndex.Value - baseSquared) / rise).ToArray();

        WorkedExamples.Compare("Morse, V=5", "Morse 1929 (formula from memory)", WorkedExamples.ClosedForm("morse_V5"), b, 100 * 2.2e-16 * baseSquared / rise);
    }

    [Theory]
    [InlineData(1, "fermi_V8_w0.2_A1.0")]
    [InlineData(20, "fermi_V8_w0.2_A20.0")]
    public void Fermi_WithACover_AgreesWithItsHypergeometricFunction(double a, string row)
    {
        var guide = new NormalisedGuide(8, a);
        var b = guide.Solve(Region(null, Fermi(guide.NBase, guide.DeltaN, 1, 0.2, "n2")));

        WorkedExamples.Compare($"Fermi, V=8, w=0.2, A={a}", "₂F₁, worked_examples.json", WorkedExamples.ClosedForm(row), b, guide.Rounding);
    }

    /// <summary>k²a²(n² − n0²) = V²sech²x + 2B tanh x: w² = (s − m)² + B²/(s − m)², for (s − m)² &gt; B.</summary>
    /// <remarks>The left end medium starts 20 widths from the centre, where tanh is −1 to the last bit.</remarks>
    [Fact]
    public void AsymmetricWell_TanhAndSech_AgreesWithItsFormula()
    {
        const double v = 6, b = 4, baseSquared = 2.25, unit = 0.02;
        var formula = $"{Text(baseSquared)} + {Text(unit)}*({v * v}*sech(x - 20)^2 + {2 * b}*tanh(x - 20))";
        var document = Planar(Math.Tau * Math.Sqrt(unit), Polarization.TE, Math.Sqrt(baseSquared - 2 * b * unit), Math.Sqrt(baseSquared + 2 * b * unit), Region(null, Formula(formula, "n2")));
        var w2 = Solve(document).Modes.Select(mode => (mode.EffectiveIndex.Value * mode.EffectiveIndex.Value - baseSquared) / unit).ToArray();
        double[] expected = WorkedExamples.ClosedForm("rosenmorse_V6_B4");

        Assert.Equal(expected.Length, w2.Length);
        for (var m = 0; m < expected.Length; m++)
            Deviation.Record($"tanh + sech², w² of m={m}", "Rosen & Morse 1932 (formula from memory)", expected[m], w2[m], 100 * 2.2e-16 * baseSquared / unit);
    }

    /// <summary>f = 1 for ½ &lt; |x| &lt; 1½.</summary>
    [Fact]
    public void DoubleStep_VOfThree_AgreesWithItsRoots()
    {
        var guide = new NormalisedGuide(3, 0);
        var b = guide.Solve(Region(1, Uniform(guide.NPeak)), Region(1, Uniform(guide.NBase)), Region(1, Uniform(guide.NPeak)));

        WorkedExamples.Compare(
            "double step, V=3",
            "root of its equation, worked_examples.json",
            [WorkedExamples.ClosedForm("double_V3_p0")[0], WorkedExamples.ClosedForm("double_V3_p1")[0]],
            b,
            guide.Rounding);
    }

    /// <summary>−u″ + x⁴u = Eu.</summary>
    /// <remarks>n² = 81 − x⁴/8, x in µm and k² = 8, cut at |x| = 5, where n is 1.7 and the field of E = 50 has fallen to e^(−27).</remarks>
    [Fact]
    public void Quartic_Levels_AgreeWithTheTable()
    {
        const double unit = 0.125;
        var edge = Math.Sqrt(81 - unit * Math.Pow(5, 4));
        var document = Planar(Math.Tau * Math.Sqrt(unit), Polarization.TE, 1, 1, Region(10, Power(9, edge, 5, 4, 5)));
        var modes = Solve(document).Modes;
        foreach (var row in WorkedExamples.Root["wkb_quartic_and_exponential"]!["x4"]!.AsArray())
        {
            var n = (int)row!["n"]!;
            var energy = (81 - modes[n].EffectiveIndex.Value * modes[n].EffectiveIndex.Value) / unit;
            Deviation.Record($"x⁴ well, E of n={n}", "Bender, Olaussen & Wang 1977", WorkedExamples.Number(row["exact"]!), energy, 100 * 2.2e-16 * 81 / unit);
        }
    }
}
