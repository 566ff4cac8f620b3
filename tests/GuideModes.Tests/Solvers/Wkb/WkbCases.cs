using System.Collections.Immutable;
using System.Text.Json;
using GuideModes.Numerics;
using GuideModes.Profiles;
using GuideModes.Solvers;
using MathNet.Numerics;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>A piece given by a formula in jets, for tests that stand below the guide document.</summary>
internal class JetPiece(Interval extent, Func<Jet, Jet> indexSquared, Func<double, double>? fast = null) : SmoothPiece(extent, 0)
{
    public override double IndexSquared(double x) => fast is null ? Jet(x).Value : fast(x);

    public override Jet Jet(double x) => indexSquared(GuideModes.Numerics.Jet.Coordinate(x));
}

/// <summary>Counts what is asked of a piece.</summary>
internal sealed class CountingPiece(SmoothPiece inner) : SmoothPiece(inner.Extent, inner.Region)
{
    public int Values;
    public int Jets;

    public override double IndexSquared(double x)
    {
        Values++;
        return inner.IndexSquared(x);
    }

    public override Jet Jet(double x)
    {
        Jets++;
        return inner.Jet(x);
    }
}

/// <summary>The planar guides of modes.json, built from their parameters, and the functions they need in jets.</summary>
internal static class WkbCases
{
    private static readonly JsonElement Root = JsonDocument.Parse(
        File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "ReferenceData", "modes.json"))).RootElement;

    public static Jet Exp(Jet a) => Math.Exp(a.Value) is var e ? a.Compose(e, e, e, e) : default;

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

    private static (Func<Jet, Jet> IndexSquared, double End) Graded(string law, JsonElement r)
    {
        double Of(string name) => r.TryGetProperty(name, out var v) && v.ValueKind == JsonValueKind.Number ? v.GetDouble() : 0;
        double Square(string name) => Of(name) * Of(name);
        var (n, b, d, c) = (Of("nBase"), Square("nBase"), Of("depthUm"), Of("centerUm"));
        var (middle, edge, half, rise) = (Square("nCenter"), Square("nEdge"), Of("halfWidthUm"), Of("deltaN"));
        var (peak, width, surface, length) = (Square("nPeak"), Of("widthUm"), Square("nSurface"), Of("lengthUm"));
        var (start, slope) = (Square("nStart"), (Square("nEnd") - Square("nStart")) / Of("thicknessUm"));
        return law switch
        {
            "parabolic" when half > 0 => (x => middle - (middle - edge) * Sqr((x - c) / half), 0),
            "parabolic" => (x => middle * (1 - Sqr((x - c) / length)), 0),
            "power" => (x => middle - (middle - edge) * Sqr(Sqr((x - c) / half)), 0),
            "sech2" => (x => b + (peak - b) * SechSquared((x - c) / width), 100),
            "exponential" => (x => b + (surface - b) * Exp(-(x / d)), 37 * d),
            "gaussian" => (x => Sqr(n + rise * Exp(-Sqr(x / d))), 6.2 * d),
            "erfc" => (x => Sqr(n + rise * (1 - Erf(x / d))), 5.9 * d),
            "linear" => (x => start + slope * x, 0),
            "formula" when r.GetProperty("formula").GetString()!.Contains("erf") =>
                (x => Sqr(1.507 + 0.005 * (Erf((9.0 - x) / 2.5) + Erf((x - 3.0) / 1.8))), 24),
            "formula" => (x => Sqr(1.5125 + 0.04 / (1 + Exp((x - 3.0) / 0.5))), 21),
            _ => throw new NotSupportedException(law),
        };
    }
}
