using System.Collections.Immutable;
using System.Text.Json.Nodes;

namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>One number that a law asks for.</summary>
/// <param name="Key">Its name in the document.</param>
/// <param name="Label">Its name on the page.</param>
/// <param name="Unit">Its unit; null for a pure number.</param>
/// <param name="IsIndex">True where a material or a formula may stand instead.</param>
/// <param name="Blank">What an absent value stands for; null where one is needed.</param>
public sealed record LawQuantity(string Key, string Label, string? Unit = null, bool IsIndex = false, string? Blank = null);

/// <summary>How one index law is entered: its name, its formula for people, its quantities, and a sketch of its shape.</summary>
/// <param name="Law">Its name in the document.</param>
/// <param name="Title">Its name on the page.</param>
/// <param name="Formula">n(x) as people write it.</param>
/// <param name="Quantities">What it asks for.</param>
/// <param name="Start">An index object to start from.</param>
/// <param name="Shape">A sketch: height from 0 to 1 over a picture's width from 0 to 1; no computation rests on it.</param>
public sealed record LawForm(
    string Law,
    string Title,
    string Formula,
    ImmutableArray<LawQuantity> Quantities,
    string Start,
    Func<double, double> Shape)
{
    private static readonly LawQuantity Base = new("nBase", "Base index", IsIndex: true);
    private static readonly LawQuantity Rise = new("deltaN", "Index rise Δn");
    private static readonly LawQuantity Depth = new("depthUm", "Depth", "µm");
    private static readonly LawQuantity Center = new("centerUm", "Measured from x =", "µm", Blank: "0");

    /// <summary>Every law there is, in the order they are offered.</summary>
    public static ImmutableArray<LawForm> All { get; } =
    [
        new("uniform", "Uniform", "n", [new("n", "Index n", IsIndex: true)],
            """{ "law": "uniform", "n": 1.52 }""", t => t is > 0.25 and < 0.75 ? 0.9 : 0.1),
        new("linear", "Linear", "nStart → nEnd, straight over the region",
            [new("nStart", "Index at its start", IsIndex: true), new("nEnd", "Index at its end", IsIndex: true)],
            """{ "law": "linear", "nStart": 1.54, "nEnd": 1.51 }""", t => t < 0.15 ? 0.1 : t > 0.85 ? 0.1 : 0.95 - 1.0 * (t - 0.15)),
        new("power", "Power (alpha)", "nCenter² − (nCenter² − nEdge²)·|s|^α,  s = (x − center)/half-width",
            [
                new("nCenter", "Index at its center", IsIndex: true), new("nEdge", "Index at its edge", IsIndex: true), new("alpha", "Exponent α"),
                new("halfWidthUm", "Half-width", "µm"), new("centerUm", "Center at x =", "µm", Blank: "0"),
            ],
            """{ "law": "power", "nCenter": 1.54, "nEdge": 1.51, "alpha": 2, "halfWidthUm": 5, "centerUm": 5 }""",
            t => Math.Max(0.1, 0.95 - 0.85 * Math.Pow((t - 0.5) / 0.4, 2))),
        new("gaussian", "Gaussian", "nBase + Δn·exp(−s²),  s = (x − x₀)/depth", [Base, Rise, Depth, Center],
            """{ "law": "gaussian", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5 }""", t => Grade(t, s => Math.Exp(-s * s))),
        new("exponential", "Exponential", "nBase + Δn·exp(−s),  s = (x − x₀)/depth", [Base, Rise, Depth, Center],
            """{ "law": "exponential", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5 }""", t => Grade(t, s => Math.Exp(-s))),
        new("erfc", "Complementary error function", "nBase + Δn·erfc(s),  s = (x − x₀)/depth", [Base, Rise, Depth, Center],
            """{ "law": "erfc", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5 }""", t => Grade(t, s => Math.Exp(-1.1 * s - 0.8 * s * s))),
        new("sech2", "Hyperbolic secant squared", "nBase + Δn·sech²(s),  s = (x − x₀)/depth", [Base, Rise, Depth, Center],
            """{ "law": "sech2", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5 }""", t => Grade(t, s => 1 / Math.Pow(Math.Cosh(s), 2))),
        new("fermi", "Fermi", "nBase + Δn/(1 + exp((x − depth)/edge))", [Base, Rise, Depth, new("edgeUm", "Edge width", "µm")],
            """{ "law": "fermi", "nBase": 1.51, "deltaN": 0.05, "depthUm": 5, "edgeUm": 0.5 }""", t => Grade(t, s => 1 / (1 + Math.Exp((s - 1.2) / 0.15)))),
        new("formula", "Formula", "n as an expression in x and lambda, both in µm", [],
            """{ "law": "formula", "n": "1.51 + 0.05*exp(-(x/5)^2)" }""", t => 0.5 + 0.35 * Math.Sin(7 * t) * (1 - 0.4 * t)),
        new("table", "Table", "measured points (x, n), joined by lines or by a monotone cubic", [],
            """{ "law": "table", "points": [[0, 1.55], [2, 1.545], [4, 1.53], [7, 1.515], [10, 1.51]], "interpolation": "linear" }""",
            t => t < 0.12 ? 0.1 : t < 0.3 ? 0.95 - 0.5 * (t - 0.12) : t < 0.55 ? 0.86 - 1.6 * (t - 0.3) : Math.Max(0.1, 0.46 - 0.9 * (t - 0.55))),
    ];

    public static LawForm? Find(string? law) => All.FirstOrDefault(form => form.Law == law);

    /// <summary>Laws that may grade n or n².</summary>
    public bool HasQuantity => Law is not ("uniform" or "formula" or "table");

    /// <summary>An index object of this law that keeps what an earlier one of another law had in common.</summary>
    public JsonNode StartFrom(JsonNode? earlier)
    {
        var index = JsonNode.Parse(Start)!.AsObject();
        if (earlier is JsonObject old)
        {
            foreach (var quantity in Quantities)
            {
                if (old[quantity.Key] is { } kept) index[quantity.Key] = kept.DeepClone();
            }
        }

        return index;
    }

    private static double Grade(double t, Func<double, double> shape) => t < 0.15 ? 0.08 : 0.08 + 0.87 * shape((t - 0.15) / 0.32);
}
