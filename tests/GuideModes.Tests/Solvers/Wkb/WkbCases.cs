using System.Collections.Immutable;
using System.Text.Json;
using GuideModes.Numerics;
using GuideModes.Profiles;
using GuideModes.Solvers;
using MathNet.Numerics;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>A piece given by a formula in jets, for tests that stand below the guide document.</summary>
internal sealed class JetPiece(Interval extent, Func<Jet, Jet> indexSquared, Func<double, double>? fast = null) : SmoothPiece(extent, 0)
{
    public override double IndexSquared(double x) => fast is null ? Jet(x).Value : fast(x);

    public override Jet Jet(double x) => indexSquared(GuideModes.Numerics.Jet.Coordinate(x));
}

/// <summary>The planar guides of modes.json, built from their parameters, and the functions they need in jets.</summary>
internal static class WkbCases
{
    private static readonly JsonElement Root = JsonDocument.Parse(
        File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "ReferenceData", "modes.json"))).RootElement;

    public static Jet Exp(Jet a) => a.Compose(Math.Exp(a.Value), Math.Exp(a.Value), Math.Exp(a.Value), Math.Exp(a.Value));

    public static Jet Sqr(Jet a) => a * a;

    public static Jet Erf(Jet a)
    {
        var x = a.Value;
        var g = 2 / Math.Sqrt(Math.PI) * Math.Exp(-x * x);
        return a.Compose(SpecialFunctions.Erf(x), g, -2 * x * g, (4 * x * x - 2) * g);
    }

    public static Jet SechSquared(Jet a)
    {
        var s = 1 / Math.Cosh(a.Value);
        var (f, t) = (s * s, Math.Tanh(a.Value));
        return a.Compose(f, -2 * f * t, 4 * f - 6 * f * f, f * t * (24 * f - 8));
    }

    public static IEnumerable<string> PlanarIds() => Root.GetProperty("cases").EnumerateArray()
        .Where(c => c.GetProperty("geometry").GetString() == "planar").Select(c => c.GetProperty("id").GetString()!);

    public static JsonElement Find(string id) => Root.GetProperty("cases").EnumerateArray().Single(c => c.GetProperty("id").GetString() == id);

    public static ModeProblem Problem(string id)
    {
        var c = Find(id);
        var regions = c.GetProperty("regions").EnumerateArray().ToArray();
        var (cover, substrate) = (Get(c, "cover"), Get(c, "substrate"));
        var pieces = new List<SmoothPiece>();
        var x = 0.0;
        foreach (var region in regions) x = AddRegion(pieces, region, x);
        return new(
            new(Wavelength.FromMicrometres(Get(c, "wavelengthUm")), Medium.FromIndex(cover), [.. pieces], Medium.FromIndex(substrate), regions.Length),
            Enum.Parse<Polarization>(c.GetProperty("polarization").GetString()!));
    }

    public static ModeProblem Problem(double wavelengthUm, double cover, double substrate, params SmoothPiece[] pieces) => new(
        new(Wavelength.FromMicrometres(wavelengthUm), Medium.FromIndex(cover), pieces.ToImmutableArray(), Medium.FromIndex(substrate), 1),
        Polarization.TE);

    private static double Get(JsonElement e, string name) => e.GetProperty(name).GetDouble();

    private static double AddRegion(List<SmoothPiece> pieces, JsonElement r, double x)
    {
        var law = r.GetProperty("law").GetString();
        var thickness = r.GetProperty("thicknessUm").ValueKind == JsonValueKind.Null ? (double?)null : Get(r, "thicknessUm");
        var end = x + (thickness ?? 0);
        switch (law)
        {
            case "uniform":
                pieces.Add(new UniformPiece(new(x, end), 0, Jet.Constant(Get(r, "n") * Get(r, "n"))));
                return end;
            case "table":
                var points = r.GetProperty("points").EnumerateArray().Select(p => (X: p[0].GetDouble(), N: p[1].GetDouble())).ToArray();
                for (var i = 1; i < points.Length; i++)
                {
                    var (a, b) = (points[i - 1], points[i]);
                    pieces.Add(new JetPiece(new(a.X, b.X), t => Sqr(a.N + (b.N - a.N) / (b.X - a.X) * (t - a.X))));
                }

                return end;
            default:
                var (f, tail) = Graded(law!, r);
                pieces.Add(new JetPiece(new(x, thickness is null ? tail : end), f));
                return end;
        }
    }

    private static (Func<Jet, Jet> IndexSquared, double End) Graded(string law, JsonElement r) => law switch
    {
        "parabolic" when r.TryGetProperty("halfWidthUm", out var half) =>
            (x => Power(r, half.GetDouble(), Sqr)(x), 0),
        "parabolic" => (x => Get(r, "nCenter") * Get(r, "nCenter") * (1 - Sqr((x - Get(r, "centerUm")) / Get(r, "lengthUm"))), 0),
        "power" => (x => Power(r, Get(r, "halfWidthUm"), s => Sqr(Sqr(s)))(x), 0),
        "sech2" => (x => Base(r) + (Sq(r, "nPeak") - Base(r)) * SechSquared((x - Get(r, "centerUm")) / Get(r, "widthUm")), 100),
        "exponential" => (x => Base(r) + (Sq(r, "nSurface") - Base(r)) * Exp(-(x / Get(r, "depthUm"))), 37 * Get(r, "depthUm")),
        "gaussian" => (x => Sqr(Get(r, "nBase") + Get(r, "deltaN") * Exp(-Sqr(x / Get(r, "depthUm")))), 6.2 * Get(r, "depthUm")),
        "erfc" => (x => Sqr(Get(r, "nBase") + Get(r, "deltaN") * (1 - Erf(x / Get(r, "depthUm")))), 5.9 * Get(r, "depthUm")),
        "linear" => (x => Sq(r, "nStart") + (Sq(r, "nEnd") - Sq(r, "nStart")) * x / Get(r, "thicknessUm"), 0),
        "formula" when r.GetProperty("formula").GetString()!.Contains("erf") =>
            (x => Sqr(1.507 + 0.005 * (Erf((9.0 - x) / 2.5) + Erf((x - 3.0) / 1.8))), 24),
        "formula" => (x => Sqr(1.5125 + 0.04 / (1 + Exp((x - 3.0) / 0.5))), 21),
        _ => throw new NotSupportedException(law),
    };

    private static Func<Jet, Jet> Power(JsonElement r, double half, Func<Jet, Jet> shape) =>
        x => Sq(r, "nCenter") - (Sq(r, "nCenter") - Sq(r, "nEdge")) * shape((x - Get(r, "centerUm")) / half);

    private static double Sq(JsonElement r, string name) => Get(r, name) * Get(r, name);

    private static double Base(JsonElement r) => Sq(r, "nBase");
}
