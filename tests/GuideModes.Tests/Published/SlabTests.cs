using GuideModes.Guides;

namespace GuideModes.Tests.Published;

/// <summary>The step slab, V√(1−b) = mπ + atan√(b/(1−b)) + atan√((b+a)/(1−b)).</summary>
/// <remarks>H. Kogelnik and V. Ramaswamy, Appl. Opt. 13, 1857 (1974); values are roots of their equation (worked_examples.json).</remarks>
public sealed class SlabTests
{
    private const string Source = "Kogelnik & Ramaswamy 1974";

    [Fact]
    public void NormalisedIndex_EveryRowOfTheTable_Agrees()
    {
        foreach (var row in WorkedExamples.Root["slab"]!["b_table"]!.AsArray())
        {
            var (a, m, v) = ((double)row!["a"]!, (int)row["m"]!, (double)row["V"]!);
            var guide = new NormalisedGuide(v, a);
            var b = guide.Solve(Film(guide));
            Deviation.Record($"step slab, b of m={m}, a={a}, V={v}", Source, WorkedExamples.Number(row["b"]!), b[m], guide.Rounding);
        }
    }

    [Theory]
    [InlineData(1, 0, 0.7853981633974)]
    [InlineData(1, 1, 3.926990816987)]
    [InlineData(1, 2, 7.068583470577)]
    [InlineData(10, 0, 1.264518957625)]
    [InlineData(10, 1, 4.406111611215)]
    [InlineData(10, 2, 7.547704264805)]
    public void Cutoff_OfAMode_IsWhereItsCountSteps(double a, int m, double expected)
    {
        var got = Cutoffs.Find(v => Film(v, a), m, expected);

        Deviation.Record($"step slab, cutoff V of m={m}, a={a}", Source, expected, got, 5e-12);
    }

    [Fact]
    public void PhysicalExamples_BothPolarizations_AgreeInIndexAndGroupIndex()
    {
        foreach (var row in WorkedExamples.Root["slab"]!["examples"]!.AsArray())
        {
            double Of(string field) => WorkedExamples.Number(row![field]!);
            var (m, polarization) = ((int)row!["m"]!, Enum.Parse<Polarization>((string)row["pol"]!));
            var document = Documents.Planar(Of("lam_um"), polarization, Of("nc"), Of("ns"), Documents.Region(Of("h_um"), Documents.Uniform(Of("nf"))));
            var mode = Documents.Solve(document).Modes[m];
            var check = $"slab {Of("nf")}/{Of("ns")}/{Of("nc")}, {Of("h_um")} µm, {polarization}{m}";
            Deviation.Record(check + " n_eff", Source, Of("neff"), mode.EffectiveIndex.Value, 2e-15 * Of("nf"));
            Deviation.Record(check + " n_g", Source + ", derivative", Of("ng_nondispersive"), mode.GroupIndex, 1e-11);
            Assert.True(mode.EffectiveIndex.Covers(Of("neff")), check);
        }
    }

    private static System.Text.Json.Nodes.JsonObject Film(NormalisedGuide guide) => Documents.Region(1, Documents.Uniform(guide.NPeak));

    private static GuideDocument Film(double v, double a)
    {
        var guide = new NormalisedGuide(v, a);
        return guide.Document(Film(guide));
    }
}
