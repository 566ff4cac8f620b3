using System.Collections.Immutable;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>Every index law there is: the one list that the reader validates by and an editor is built from.</summary>
/// <remarks>
/// <c>quantity</c> says what the shape grades. With <c>n</c> it is the index itself. With <c>n2</c> every index parameter is squared first
/// (nBase² and (nBase + deltaN)², nStart² and nEnd², each n of a table) and the same shape runs between the squares; a <c>formula</c> is then read as n².
/// Coordinates are global, x = 0 at the cover interface.
/// </remarks>
public static class LawCatalogue
{
    private static readonly LawParameter NBase = Index("nBase", "Base index", "1.51");
    private static readonly LawParameter DeltaN =
        new("deltaN", "Index rise", LawParameterKind.IndexDifference, GuideLimits.IndexDifference, Json.Parse("0.02"), true);

    /// <summary>The laws, in the order in which an editor shows them.</summary>
    public static ImmutableArray<LawDescription> Laws { get; } =
    [
        new(a => new UniformLaw(a.Index("n")))
        {
            Name = "uniform",
            Label = "Uniform",
            Formula = "n(x) = n",
            Summary = "One index throughout: a film or a buffer layer.",
            Parameters = [Index("n", "Index", "1.53"), Quantity("n")],
            CanRunToInfinity = true,
        },
        new(a => new LinearLaw(a.Quantity, a.Index("nStart"), a.Index("nEnd")))
        {
            Name = "linear",
            Label = "Linear",
            Formula = "n(x) = nStart + (nEnd − nStart)·(x − start)/thickness",
            Summary = "A straight ramp from the region's start to its end.",
            Parameters = [Index("nStart", "Index at start", "1.53"), Index("nEnd", "Index at end", "1.51"), Quantity("n")],
        },
        new(a => new PowerLaw(
                a.Quantity, a.Index("nCenter"), a.Index("nEdge"), a.Number("halfWidthUm"), a.Number("alpha"), a.Number("centerUm")))
        {
            Name = "power",
            Label = "Power (alpha)",
            Formula = "n²(x) = nCenter² − (nCenter² − nEdge²)·|(x − centerUm)/halfWidthUm|^alpha",
            Summary = "The alpha-profile: a parabola for alpha 2, ever flatter with a steeper edge above.",
            Parameters =
            [
                Index("nCenter", "Index at center", "1.53"), Index("nEdge", "Index at edge", "1.51"), Length("halfWidthUm", "Half-width", "5"),
                new("alpha", "Alpha", LawParameterKind.Number, GuideLimits.Alpha, Json.Parse("2"), true), Center("0"), Quantity("n2"),
            ],
        },
        Diffused("gaussian", "Gaussian", "exp(−s²)", "Diffusion from an exhausted source, such as a titanium film driven in.",
            a => new GaussianLaw(a.Quantity, a.Index("nBase"), a.Index("deltaN"), a.Number("depthUm"), a.Number("centerUm"))),
        Diffused("exponential", "Exponential", "exp(−s)", "Out-diffusion, or an exhausted surface.",
            a => new ExponentialLaw(a.Quantity, a.Index("nBase"), a.Index("deltaN"), a.Number("depthUm"), a.Number("centerUm"))),
        Diffused("erfc", "Complementary error function", "erfc(s)", "Diffusion from a source that stays full, such as a dilute exchange melt.",
            a => new ErfcLaw(a.Quantity, a.Index("nBase"), a.Index("deltaN"), a.Number("depthUm"), a.Number("centerUm"))),
        Diffused("sech2", "Sech²", "sech²(s)", "A buried guide whose modes are known in closed form.",
            a => new SechSquaredLaw(a.Quantity, a.Index("nBase"), a.Index("deltaN"), a.Number("depthUm"), a.Number("centerUm"))),
        new(a => new FermiLaw(a.Quantity, a.Index("nBase"), a.Index("deltaN"), a.Number("depthUm"), a.Number("edgeUm")))
        {
            Name = "fermi",
            Label = "Fermi",
            Formula = "n(x) = nBase + deltaN/(1 + exp((x − depthUm)/edgeUm))",
            Summary = "A plateau with a soft edge: exchange from a pure melt.",
            Parameters = [NBase, DeltaN, Length("depthUm", "Depth", "5"), Length("edgeUm", "Edge width", "0.5"), Quantity("n")],
            CanRunToInfinity = true,
        },
        new(a => new FormulaLaw(a.Quantity, a.Formula("n")))
        {
            Name = "formula",
            Label = "Formula",
            Formula = "n(x) = an expression in x and lambda, both in µm",
            Summary = "Any profile that can be written down.",
            Parameters =
            [
                new("n", "n(x)", LawParameterKind.Formula, GuideLimits.Index, Json.Parse("\"1.51 + 0.02*exp(-(x/5)^2)\""), true), Quantity("n"),
            ],
            CanRunToInfinity = true,
        },
        new(a => new TableLaw(
                a.Quantity, a.Word("interpolation") == "linear" ? TableInterpolation.Linear : TableInterpolation.MonotoneCubic, a.Points("points")))
        {
            Name = "table",
            Label = "Table",
            Formula = "n(x) runs through the points, straight or as a monotone cubic",
            Summary = "A measured or imported profile.",
            Parameters =
            [
                new("points", "Points", LawParameterKind.Points, GuideLimits.Index, Json.Parse("[[0, 1.53], [2, 1.525], [5, 1.513], [8, 1.51]]"), true),
                Choice("interpolation", "Interpolation", "linear", "monotone-cubic"), Quantity("n"),
            ],
            CanRunToInfinity = true,
        },
    ];

    /// <summary>The law of a name; null if there is none.</summary>
    public static LawDescription? Find(string name) => Laws.FirstOrDefault(law => law.Name == name);

    private static LawDescription Diffused(string name, string label, string shape, string summary, Func<LawArguments, IndexLaw> create) => new(create)
    {
        Name = name,
        Label = label,
        Formula = $"n(x) = nBase + deltaN·{shape}, s = (x − centerUm)/depthUm",
        Summary = summary,
        Parameters = [NBase, DeltaN, Length("depthUm", "Depth", "5"), Center("0"), Quantity("n")],
        CanRunToInfinity = true,
    };

    private static LawParameter Index(string name, string label, string json) =>
        new(name, label, LawParameterKind.Index, GuideLimits.Index, Json.Parse(json), true);

    private static LawParameter Length(string name, string label, string json) =>
        new(name, label, LawParameterKind.Length, GuideLimits.LengthUm, Json.Parse(json), true);

    private static LawParameter Center(string json) =>
        new("centerUm", "Center", LawParameterKind.Length, GuideLimits.CoordinateUm, Json.Parse(json), false);

    private static LawParameter Quantity(string usual) =>
        Choice("quantity", "Grades", usual, usual == "n" ? "n2" : "n");

    private static LawParameter Choice(string name, string label, string usual, string other) =>
        new(name, label, LawParameterKind.Choice, default, Json.Parse($"\"{usual}\""), false) { Choices = [usual, other] };
}
