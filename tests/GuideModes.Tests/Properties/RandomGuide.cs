using System.Collections.Immutable;
using System.Globalization;
using System.Text.Json.Nodes;
using System.Text.RegularExpressions;
using CsCheck;
using GuideModes.Guides;

namespace GuideModes.Tests.Properties;

/// <summary>A region of a random guide: its thickness in µm (null: to infinity) and its law as the document states it.</summary>
internal sealed record RandomRegion(double? ThicknessUm, JsonObject Index)
{
    public string Law => (string)Index["law"]!;

    public string Quantity => (string?)Index["quantity"] ?? (Law == "power" ? "n2" : "n");

    public JsonObject Node => Documents.Region(ThicknessUm, Index);
}

/// <summary>A random planar guide that can be turned about, stretched, raised and cut, and written as a document.</summary>
internal sealed partial record RandomGuide(
    double WavelengthUm, Polarization Polarization, double Cover, ImmutableArray<RandomRegion> Regions, double Substrate)
{
    private static readonly string[] Lengths = ["depthUm", "centerUm", "edgeUm", "halfWidthUm"];

    private static readonly string[] Levels = ["n", "nBase", "nStart", "nEnd", "nCenter", "nEdge"];

    public GuideDocument Document =>
        Documents.Planar(WavelengthUm, Polarization, Cover, Substrate, [.. Regions.Select(region => region.Node)]);

    /// <summary>The thickness of all regions together, µm.</summary>
    public double ThicknessUm => Regions.Sum(region => region.ThicknessUm ?? 0);

    /// <summary>Every length and the wavelength, times a factor.</summary>
    public RandomGuide Scaled(double factor) => this with
    {
        WavelengthUm = WavelengthUm * factor,
        Regions = [.. Regions.Select(region => new RandomRegion(region.ThicknessUm * factor, Scaled(region.Index, factor)))],
    };

    /// <summary>The guide seen from the other side; every region must have a thickness.</summary>
    public RandomGuide Mirrored()
    {
        var total = ThicknessUm;
        return this with { Cover = Substrate, Substrate = Cover, Regions = [.. Regions.Reverse().Select(region => region with { Index = Mirrored(region, total) })] };
    }

    /// <summary>One region's index raised by a small number everywhere.</summary>
    public RandomGuide Raised(int region, double rise) => this with
    {
        Regions = Regions.SetItem(region, Regions[region] with { Index = Raised(Regions[region].Index, rise) }),
    };

    /// <summary>One region cut into two of the same law.</summary>
    public RandomGuide Split(int at, double share)
    {
        var region = Regions[at];
        var thickness = region.ThicknessUm!.Value;
        JsonObject first = Copy(region.Index), second = Copy(region.Index);
        if (region.Law == "linear")
        {
            var (start, end) = ((double)region.Index["nStart"]!, (double)region.Index["nEnd"]!);
            var between = region.Quantity == "n" ? start + share * (end - start) : Math.Sqrt(start * start + share * (end * end - start * start));
            first["nEnd"] = between;
            second["nStart"] = between;
        }

        return this with { Regions = Regions.SetItem(at, new(share * thickness, first)).Insert(at + 1, new(thickness - share * thickness, second)) };
    }

    public RandomGuide Inserted(int at, RandomRegion region) => this with { Regions = Regions.Insert(at, region) };

    /// <summary>
    /// The guide at another wavelength, on fused silica, with every region's index growing as 0.005 µm²/λ² towards the blue; tables stay as they are.
    /// </summary>
    public GuideDocument Dispersive(double wavelengthUm)
    {
        var dispersive = this with { WavelengthUm = wavelengthUm, Regions = [.. Regions.Select(region => region with { Index = Dispersive(region.Index) })] };
        return dispersive.Document.With("substrate", new JsonObject { ["material"] = "fused-silica" });
    }

    public override string ToString() => Document.ToString();

    private static JsonObject Copy(JsonObject index) => index.DeepClone().AsObject();

    private static JsonObject Scaled(JsonObject index, double factor)
    {
        var scaled = Copy(index);
        foreach (var name in Lengths.Where(scaled.ContainsKey)) scaled[name] = (double)scaled[name]! * factor;
        if (index["points"] is JsonArray points) scaled["points"] = Points(points, (x, n) => (x * factor, n));
        if (Formula(index) is { } formula) scaled["n"] = Coordinate().Replace(formula, $"(x/{Documents.Text(factor)})");
        return scaled;
    }

    private static JsonObject Dispersive(JsonObject index)
    {
        const string growth = " + 0.005/lambda^2";
        var dispersive = Copy(index);
        foreach (var name in Levels.Where(name => IsNumber(index, name)))
            dispersive[name] = new JsonObject { ["formula"] = Documents.Text((double)index[name]!) + growth };
        if (Formula(index) is { } formula) dispersive["n"] = formula + growth;
        return dispersive;
    }

    private static bool IsNumber(JsonObject index, string name) => index[name]?.GetValueKind() == System.Text.Json.JsonValueKind.Number;

    private static JsonObject Raised(JsonObject index, double rise)
    {
        var raised = Copy(index);
        foreach (var name in Levels.Where(name => IsNumber(index, name)))
            raised[name] = (double)raised[name]! + rise;
        if (index["points"] is JsonArray points) raised["points"] = Points(points, (x, n) => (x, n + rise));
        if (Formula(index) is { } formula) raised["n"] = $"{formula} + {Documents.Text(rise)}";
        return raised;
    }

    private static JsonObject Mirrored(RandomRegion region, double total)
    {
        var mirrored = Copy(region.Index);
        switch (region.Law)
        {
            case "linear":
                (mirrored["nStart"], mirrored["nEnd"]) = ((double)region.Index["nEnd"]!, (double)region.Index["nStart"]!);
                return mirrored;
            case "power" or "gaussian" or "sech2":
                mirrored["centerUm"] = total - (double)region.Index["centerUm"]!;
                return mirrored;
            case "table":
                mirrored["points"] = new JsonArray([.. Points(region.Index["points"]!.AsArray(), (x, n) => (total - x, n)).Reverse().Select(point => point!.DeepClone())]);
                return mirrored;
            case "uniform":
                return mirrored;
            default:
                return Documents.Formula(Coordinate().Replace(AsFormula(region), $"({Documents.Text(total)} - x)"), region.Quantity);
        }
    }

    /// <summary>A one-sided law written out.</summary>
    private static string AsFormula(RandomRegion region)
    {
        if (Formula(region.Index) is { } formula) return formula;
        double Of(string field) => (double)region.Index[field]!;
        var (basis, peak) = (Of("nBase"), Of("nBase") + Of("deltaN"));
        if (region.Quantity == "n2") (basis, peak) = (basis * basis, peak * peak);
        var shape = region.Law switch
        {
            "exponential" => $"exp(-(x - {Documents.Text(Of("centerUm"))})/{Documents.Text(Of("depthUm"))})",
            "erfc" => $"erfc((x - {Documents.Text(Of("centerUm"))})/{Documents.Text(Of("depthUm"))})",
            _ => $"1/(1 + exp((x - {Documents.Text(Of("depthUm"))})/{Documents.Text(Of("edgeUm"))}))",
        };
        return $"{Documents.Text(basis)} + {Documents.Text(peak - basis)}*({shape})";
    }

    private static string? Formula(JsonObject index) => (string)index["law"]! == "formula" ? (string)index["n"]! : null;

    private static JsonArray Points(JsonArray points, Func<double, double, (double X, double N)> map) =>
        [.. points.Select(point => map((double)point![0]!, (double)point[1]!)).Select(point => new JsonArray(point.X, point.N))];

    [GeneratedRegex(@"\bx\b", RegexOptions.CultureInvariant)]
    private static partial Regex Coordinate();
}

/// <summary>Generators of random guides of every law, of some tens of modes at most.</summary>
internal static class RandomGuides
{
    private static readonly Gen<string> Quantity = OneOf("n", "n2");

    private static readonly Gen<Polarization> Polarization = OneOf(GuideModes.Polarization.TE, GuideModes.Polarization.TM);

    /// <summary>One to four regions, each with a thickness.</summary>
    public static readonly Gen<RandomGuide> Bounded = Layers(Gen.Double[0.02, 0.5], Gen.Double[0.2, 2.5], Gen.Bool);

    /// <summary>The same with hardly any contrast, between two equal media, and so much the thicker.</summary>
    public static readonly Gen<RandomGuide> Faint = Layers(Gen.Double[1e-4, 2e-3], Gen.Double[5, 30], Gen.Const(true));

    /// <summary>A surface or buried guide whose last region fades into the substrate.</summary>
    public static readonly Gen<RandomGuide> Unbounded =
        from wavelength in Gen.Double[0.5, 2]
        from polarization in Polarization
        from basis in Gen.Double[1.4, 2.2]
        from cover in Gen.Double[1, 1.4]
        from law in OneOf("gaussian", "exponential", "erfc", "sech2", "fermi")
        from quantity in Quantity
        from contrast in Gen.Double[0.02, 0.4]
        from depth in Gen.Double[0.5, 3]
        from center in Gen.Double[0, 3]
        from film in Gen.Double[0, 0.5]
        select new RandomGuide(
            wavelength,
            polarization,
            cover,
            [new(film, Documents.Uniform(basis)), new(null, Faded(law, quantity, basis, contrast, depth, center))],
            basis);

    /// <summary>Both kinds.</summary>
    public static readonly Gen<RandomGuide> Any = Gen.OneOf(Bounded, Bounded, Unbounded);

    public static Gen<T> OneOf<T>(params T[] values) => Gen.Int[0, values.Length - 1].Select(i => values[i]);

    private static JsonObject Faded(string law, string quantity, double basis, double contrast, double depth, double center) => law switch
    {
        "fermi" => Documents.Fermi(basis, contrast, center + depth, 0.3 * depth, quantity),
        "gaussian" or "sech2" => Documents.Diffused(law, basis, contrast, depth, center, quantity),
        _ => Documents.Diffused(law, basis, contrast, depth, 0, quantity),
    };

    private static Gen<RandomGuide> Layers(Gen<double> contrasts, Gen<double> thickness, Gen<bool> immersed) =>
        from wavelength in Gen.Double[0.5, 2]
        from polarization in Polarization
        from basis in Gen.Double[1.4, 2.2]
        from cover in Gen.Double[1, 1.4]
        from isImmersed in immersed
        from count in Gen.Int[1, 4]
        from thicknesses in thickness.Array[count]
        from contrast in contrasts
        from picks in Law(basis, contrast).Array[count]
        select new RandomGuide(wavelength, polarization, isImmersed ? basis : cover, Place(thicknesses, picks), basis);

    private static ImmutableArray<RandomRegion> Place(double[] thicknesses, Func<double, double, JsonObject>[] laws)
    {
        var regions = ImmutableArray.CreateBuilder<RandomRegion>();
        var start = 0.0;
        for (var i = 0; i < laws.Length; i++)
        {
            regions.Add(new(thicknesses[i], laws[i](start, thicknesses[i])));
            start += thicknesses[i];
        }

        return regions.ToImmutable();
    }

    /// <summary>A law for a region that starts at x and is t thick; its index stays between base and base + contrast, or near it.</summary>
    private static Gen<Func<double, double, JsonObject>> Law(double basis, double contrast) =>
        from name in OneOf("uniform", "linear", "power", "gaussian", "exponential", "erfc", "sech2", "fermi", "formula", "table")
        from quantity in Quantity
        from low in Gen.Double[0, 0.6]
        from high in Gen.Double[0.5, 1]
        from place in Gen.Double[0, 1]
        from width in Gen.Double[0.3, 1.5]
        from alpha in Gen.OneOf(OneOf(1.0, 2, 4), Gen.Double[1, 6])
        from cubic in Gen.Bool
        from heights in Gen.Double[0, 1].Array[3, 9]
        select (Func<double, double, JsonObject>)((x, t) => name switch
        {
            "uniform" => Documents.Uniform(basis + high * contrast),
            "linear" => Documents.Linear(basis + low * contrast, basis + high * contrast, quantity),
            "power" => Documents.Power(basis + high * contrast, basis, Math.Max(place, 1 - place) * t * (1 + width), alpha, x + place * t, quantity),
            "fermi" => Documents.Fermi(basis, high * contrast, x + Math.Max(0.05, place) * t, 0.2 * width * t, quantity),
            "exponential" or "erfc" => Documents.Diffused(name, basis, high * contrast, width * t, x, quantity),
            "formula" => Documents.Formula(Wave(basis, contrast, x + place * t, width * t, high, quantity), quantity),
            "table" => Documents.Table(heights.Select((height, i) => (x + t * i / (heights.Length - 1), basis + height * contrast)), cubic ? "monotone-cubic" : "linear", quantity),
            _ => Documents.Diffused(name, basis, high * contrast, width * t, x + place * t, quantity),
        });

    private static string Wave(double basis, double contrast, double center, double period, double height, string quantity)
    {
        var n = string.Create(CultureInfo.InvariantCulture, $"{basis + 0.5 * contrast:R} + {0.5 * contrast * height:R}*cos((x - {center:R})/{period:R})");
        return quantity == "n" ? n : $"({n})^2";
    }
}
