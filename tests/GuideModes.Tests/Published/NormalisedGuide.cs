using System.Text.Json.Nodes;
using GuideModes.Guides;
using GuideModes.Solvers.TransferMatrix;

namespace GuideModes.Tests.Published;

/// <summary>
/// A textbook guide in its own numbers, u″ + V²(f(x) − b)u = 0, turned into a guide document with quantity n2:
/// n² = nb² + (ns² − nb²)·f(x/d), V = kd√(ns² − nb²), A = (nb² − nc²)/(ns² − nb²), b = (n_eff² − nb²)/(ns² − nb²).
/// </summary>
/// <remarks>
/// d is 1 µm. TE depends on V, A and f alone, so that nb² and the rise ns² − nb² are free; they are chosen to keep every n
/// between 1 and 10 and the rise large, because b is read from n_eff² and inherits ε·ns²/(ns² − nb²).
/// </remarks>
internal sealed record NormalisedGuide(double V, double A)
{
    public double BaseSquared => A > 1 ? 81 : 2.25;

    /// <summary>ns² − nb².</summary>
    public double Rise => A > 1 ? Math.Min(4, 80 / A) : 1;

    public double NBase => Math.Sqrt(BaseSquared);

    public double NPeak => Math.Sqrt(BaseSquared + Rise);

    public double DeltaN => NPeak - NBase;

    public double NCover => Math.Sqrt(BaseSquared - A * Rise);

    public double WavelengthUm => Math.Tau * Math.Sqrt(Rise) / V;

    /// <summary>A hundred roundings of n², in units of b.</summary>
    public double Rounding => 100 * 2.2e-16 * (BaseSquared + Rise) / Rise;

    /// <summary>nb² + rise·f as text, f being a formula in x.</summary>
    public JsonObject Formula(string f) => Documents.Formula($"{Documents.Text(BaseSquared)} + {Documents.Text(Rise)}*({f})", "n2");

    public GuideDocument Document(params JsonObject[] regions) =>
        Documents.Planar(WavelengthUm, Polarization.TE, NCover, NBase, regions);

    public double NormalisedIndex(GuidedMode mode) =>
        (mode.EffectiveIndex.Value * mode.EffectiveIndex.Value - BaseSquared) / Rise;

    /// <summary>b of every mode of the guide made of these regions.</summary>
    public double[] Solve(params JsonObject[] regions) =>
        [.. Documents.Solve(Document(regions)).Modes.Select(NormalisedIndex)];
}
