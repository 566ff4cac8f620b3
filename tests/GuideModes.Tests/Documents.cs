using System.Globalization;
using System.Text.Json.Nodes;
using GuideModes.Guides;
using GuideModes.Solvers;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests;

/// <summary>Guide documents written in one line, and the road from a document to its modes.</summary>
internal static class Documents
{
    public static GuideDocument Planar(double wavelengthUm, Polarization polarization, JsonNode cover, JsonNode substrate, params JsonObject[] regions) =>
        GuideDocument.Parse(new JsonObject
        {
            ["schema"] = GuideDocument.Schema,
            ["name"] = "",
            ["geometry"] = "planar",
            ["wavelengthUm"] = wavelengthUm,
            ["polarization"] = polarization.ToString(),
            ["cover"] = cover.DeepClone(),
            ["regions"] = new JsonArray([.. regions.Select(region => region.DeepClone())]),
            ["substrate"] = substrate.DeepClone(),
        }.ToJsonString());

    /// <summary>A region; without a thickness it runs to infinity.</summary>
    public static JsonObject Region(double? thicknessUm, JsonObject index) => new() { ["thicknessUm"] = thicknessUm, ["index"] = index.DeepClone() };

    public static JsonObject Uniform(double n) => new() { ["law"] = "uniform", ["n"] = n };

    public static JsonObject Linear(double nStart, double nEnd, string quantity) =>
        new() { ["law"] = "linear", ["quantity"] = quantity, ["nStart"] = nStart, ["nEnd"] = nEnd };

    public static JsonObject Power(double nCenter, double nEdge, double halfWidthUm, double alpha, double centerUm, string quantity = "n2") => new()
    {
        ["law"] = "power",
        ["quantity"] = quantity,
        ["nCenter"] = nCenter,
        ["nEdge"] = nEdge,
        ["halfWidthUm"] = halfWidthUm,
        ["alpha"] = alpha,
        ["centerUm"] = centerUm,
    };

    /// <summary>gaussian, exponential, erfc or sech2.</summary>
    public static JsonObject Diffused(string law, double nBase, double deltaN, double depthUm, double centerUm, string quantity) => new()
    {
        ["law"] = law,
        ["quantity"] = quantity,
        ["nBase"] = nBase,
        ["deltaN"] = deltaN,
        ["depthUm"] = depthUm,
        ["centerUm"] = centerUm,
    };

    public static JsonObject Fermi(double nBase, double deltaN, double depthUm, double edgeUm, string quantity) => new()
    {
        ["law"] = "fermi",
        ["quantity"] = quantity,
        ["nBase"] = nBase,
        ["deltaN"] = deltaN,
        ["depthUm"] = depthUm,
        ["edgeUm"] = edgeUm,
    };

    public static JsonObject Formula(string formula, string quantity) => new() { ["law"] = "formula", ["quantity"] = quantity, ["n"] = formula };

    public static JsonObject Table(IEnumerable<(double X, double N)> points, string interpolation, string quantity) => new()
    {
        ["law"] = "table",
        ["quantity"] = quantity,
        ["interpolation"] = interpolation,
        ["points"] = new JsonArray([.. points.Select(point => new JsonArray(point.X, point.N))]),
    };

    /// <summary>A number as a formula holds it, with all its digits.</summary>
    public static string Text(double value) => "(" + value.ToString("R", CultureInfo.InvariantCulture) + ")";

    /// <summary>The guide of a document that has no faults.</summary>
    public static Guide Read(GuideDocument document)
    {
        var reading = GuideReader.Read(document);
        return reading.Guide ?? throw new InvalidOperationException(string.Join(" ", reading.Faults) + " " + document);
    }

    public static ModeProblem Problem(GuideDocument document)
    {
        var guide = Read(document);
        return new(guide.Profile, guide.Polarization);
    }

    public static TransferMatrixSolution Solve(GuideDocument document) => Solve(document, new());

    /// <summary>The modes of a document's guide; the search must have ended well.</summary>
    public static TransferMatrixSolution Solve(GuideDocument document, TransferMatrixSolver solver)
    {
        var solution = solver.Solve(Problem(document));
        Assert.Equal(SearchOutcome.Complete, solution.Outcome);
        return solution;
    }
}
