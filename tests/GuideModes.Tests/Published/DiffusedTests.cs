using System.Text.Json.Nodes;
using GuideModes.Guides;
using static GuideModes.Tests.Documents;

namespace GuideModes.Tests.Published;

/// <summary>Profiles that start at the surface and fade: with a real cover, and with a field that vanishes there (A = ∞).</summary>
/// <remarks>
/// No document states A = ∞. But the odd modes of a profile f(|x|) that runs both ways vanish at x = 0, so mode 2m + 1 of that guide
/// is exactly mode m of the half-space; these checks use it.
/// </remarks>
public sealed class DiffusedTests
{
    private const string Conwell = "Conwell 1973";
    private const string Marcuse = "Marcuse 1973";
    private const string Hocker = "Hocker & Burns 1975";

    /// <summary>J'_ν(2V) + √(b+A)·J_ν(2V) = 0, ν = 2V√b.</summary>
    [Theory]
    [InlineData(1, "exp_V4_A1.0")]
    [InlineData(40, "exp_V4_A40.0")]
    public void Exponential_WithACover_AgreesWithItsBesselFunctions(double a, string row)
    {
        var guide = new NormalisedGuide(4, a);
        WorkedExamples.Compare($"exponential, V=4, A={a}", Conwell, WorkedExamples.ClosedForm(row), Diffusion(guide, "exponential"), guide.Rounding);
    }

    [Fact]
    public void Exponential_Physical_AgreesInEveryIndex()
    {
        var document = Planar(0.6328, Polarization.TE, 1.0, 1.512, Region(null, Diffused("exponential", 1.512, 1.602 - 1.512, 2, 0, "n2")));
        var expected = WorkedExamples.Numbers(WorkedExamples.Root["closed_form_profiles"]!["exp_phys"]!["neff_TE"]!);
        var modes = Solve(document).Modes;

        Assert.Equal(expected.Length, modes.Length);
        foreach (var mode in modes)
            Deviation.Record($"exponential 1.602 on 1.512, n_eff of m={mode.Order}", Conwell, expected[mode.Order], mode.EffectiveIndex.Value, 1e-14);
    }

    [Theory]
    [InlineData(1, "lin_V8_A1.0")]
    [InlineData(40, "lin_V8_A40.0")]
    public void Linear_WithACover_AgreesWithItsAiryFunctions(double a, string row)
    {
        var guide = new NormalisedGuide(8, a);
        var b = guide.Solve(Region(1, Linear(guide.NPeak, guide.NBase, "n2")));
        WorkedExamples.Compare($"linear, V=8, A={a}", Marcuse, WorkedExamples.ClosedForm(row), b, guide.Rounding);
    }

    [Theory]
    [InlineData("exponential", 4, "exp_V4_Ainf", Conwell)]
    [InlineData("linear", 8, "lin_V8_Ainf", Marcuse)]
    public void OddModes_OfTheMirroredProfile_AreThoseOfAnOpaqueCover(string profile, double v, string row, string source)
    {
        var guide = new NormalisedGuide(v, 0);
        var b = Odd(guide.Solve(Mirrored(guide, profile)));
        WorkedExamples.Compare($"{profile}, V={v}, E(0)=0", source, WorkedExamples.ClosedForm(row), b, guide.Rounding);
    }

    [Fact]
    public void GaussianAndErfc_EveryRow_Agrees()
    {
        foreach (var row in WorkedExamples.Root["diffused_guide_b"]!.AsArray())
        {
            var (v, profile) = ((double)row!["V"]!, (string)row["profile"]! == "gauss" ? "gaussian" : "erfc");
            var isOpaque = row["A"]!.GetValueKind() == System.Text.Json.JsonValueKind.String;
            var guide = new NormalisedGuide(v, isOpaque ? 0 : (double)row["A"]!);
            var b = isOpaque ? Odd(guide.Solve(Mirrored(guide, profile))) : Diffusion(guide, profile);
            var check = $"{profile}, V={v}, {(isOpaque ? "E(0)=0" : $"A={row["A"]}")}";
            var lastDigit = WorkedExamples.HalfLastDigit(row["b"]![0]!);
            WorkedExamples.Compare(check, Hocker, WorkedExamples.Numbers(row["b"]!), b, lastDigit + guide.Rounding);
        }
    }

    [Theory]
    [InlineData("exp", "exponential")]
    [InlineData("gauss", "gaussian")]
    [InlineData("erfc", "erfc")]
    [InlineData("linear", "linear")]
    [InlineData("parab", "parabola")]
    [InlineData("sech2", "sech2")]
    public void Cutoffs_OfDiffusedGuides_AreWhereTheCountSteps(string row, string profile)
    {
        var expected = WorkedExamples.Root["diffused_guide_cutoffs_E0zero"]![row]!["exact"]!.AsArray();
        for (var m = 0; m < expected.Count; m++)
        {
            var published = WorkedExamples.Number(expected[m]!);
            var got = Cutoffs.Find(v => MirroredGuide(v, profile), 2 * m + 1, published);
            Deviation.Record($"{profile}, E(0)=0, cutoff V of m={m}", Hocker, published, got, WorkedExamples.HalfLastDigit(expected[m]!) + 1e-12);
        }
    }

    private static double[] Diffusion(NormalisedGuide guide, string law) =>
        guide.Solve(Region(null, Diffused(law, guide.NBase, guide.DeltaN, 1, 0, "n2")));

    private static GuideDocument MirroredGuide(double v, string profile)
    {
        var guide = new NormalisedGuide(v, 0);
        return guide.Document(Mirrored(guide, profile));
    }

    /// <summary>f(|x − c|) between two media of the base index; where f is unbounded, c is so far in that f has faded below ε at the cover.</summary>
    private static JsonObject[] Mirrored(NormalisedGuide guide, string profile) => profile switch
    {
        "exponential" => [Region(null, guide.Formula("exp(-abs(x - 40))"))],
        "erfc" => [Region(null, guide.Formula("erfc(abs(x - 7))"))],
        "gaussian" => [Region(null, Diffused("gaussian", guide.NBase, guide.DeltaN, 1, 7, "n2"))],
        "sech2" => [Region(null, Diffused("sech2", guide.NBase, guide.DeltaN, 1, 20, "n2"))],
        "parabola" => [Region(2, Power(guide.NPeak, guide.NBase, 1, 2, 1))],
        _ => [Region(1, Linear(guide.NBase, guide.NPeak, "n2")), Region(1, Linear(guide.NPeak, guide.NBase, "n2"))],
    };

    private static double[] Odd(double[] modes) => [.. modes.Where((_, m) => m % 2 == 1)];
}
