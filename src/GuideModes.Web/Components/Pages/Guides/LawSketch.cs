namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>What each law looks like, for a small picture: heights from 0 to 1 over a width from 0 to 1. No computation rests on these.</summary>
public static class LawSketch
{
    private const double Low = 0.08;

    private const double Start = 0.15;

    private static readonly Dictionary<string, Func<double, double>> Shapes = new()
    {
        ["uniform"] = t => t is > 0.25 and < 0.75 ? 0.9 : Low,
        ["linear"] = t => t is < Start or > 1 - Start ? Low : 0.95 - (t - Start),
        ["power"] = t => Math.Max(Low, 0.95 - 0.87 * Math.Pow((t - 0.5) / 0.4, 2)),
        ["gaussian"] = t => Grade(t, s => Math.Exp(-s * s)),
        ["exponential"] = t => Grade(t, s => Math.Exp(-s)),
        ["erfc"] = t => Grade(t, s => Math.Exp(-1.1 * s - 0.8 * s * s)),
        ["sech2"] = t => Low + 0.87 / Math.Pow(Math.Cosh((t - 0.5) / 0.16), 2),
        ["fermi"] = t => Grade(t, s => 1 / (1 + Math.Exp((s - 1.2) / 0.15))),
        ["formula"] = t => 0.5 + 0.35 * Math.Sin(7 * t) * (1 - 0.4 * t),
        ["table"] = t => t < Start ? Low : t < 0.3 ? 0.95 - 0.5 * (t - Start) : t < 0.55 ? 0.875 - 1.6 * (t - 0.3) : Math.Max(Low, 0.475 - 0.9 * (t - 0.55)),
    };

    /// <summary>A law's sketch; a level line for a law that has none.</summary>
    public static Func<double, double> Of(string law) => Shapes.GetValueOrDefault(law, _ => 0.5);

    private static double Grade(double t, Func<double, double> shape) => t < Start ? Low : Low + 0.87 * shape((t - Start) / 0.32);
}
