using System.Collections.Immutable;
using GuideModes.Numerics;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>Lays the regions of a draft side by side and checks the index they make.</summary>
internal sealed class ProfileBuilder(GuideDraft draft, FaultList faults)
{
    private const int SamplesPerPiece = 33;

    private static readonly double[] Chebyshev =
        [.. Enumerable.Range(0, SamplesPerPiece).Select(i => 0.5 - 0.5 * Math.Cos(Math.PI * i / (SamplesPerPiece - 1)))];

    private readonly List<SmoothPiece> _pieces = [];
    private int _compiledNodes;

    /// <summary>The profile, or null and at least one fault.</summary>
    public IndexProfile? Build()
    {
        var start = 0.0;
        for (var i = 0; i < draft.Regions.Length; i++)
        {
            var region = draft.Regions[i];
            var end = region.ThicknessUm is { } thickness ? start + thickness : EndOfTail(region.Law, i, start);
            if (end is not { } reached) return null;
            if (!Fill(region, i, new(start, reached))) return null;
            start = reached;
        }

        return faults.IsEmpty ? Profile() : null;
    }

    private IndexProfile Profile()
    {
        var isUnbounded = draft.Regions[^1].ThicknessUm is null;
        if (_pieces.Count == 0) _pieces.Add(Token());
        return new(draft.Wavelength, MediumOf(draft.Cover), [.. _pieces], MediumOf(draft.Substrate), draft.Regions.Length, isUnbounded);
    }

    /// <summary>A guide without extent is an interface of two media; a stretch of substrate stands for it, as a profile has at least one piece.</summary>
    private UniformPiece Token() => new(
        new(0, draft.Wavelength.Micrometres),
        draft.Regions.Length - 1,
        JetMath.Square(draft.Substrate.At(draft.Wavelength)));

    private Medium MediumOf(IndexSource source) => Medium.From(JetMath.Square(source.At(draft.Wavelength)), draft.Wavelength);

    private double? EndOfTail(IndexLaw law, int region, double start)
    {
        var path = $"regions[{region}].thicknessUm";
        var substrate = draft.Substrate.At(draft.Wavelength).Value;
        if (law.Limit(draft.Wavelength) is not { } limit)
        {
            faults.Add(path, "A region of this law cannot run to infinity; give it a thickness in µm.");
            return null;
        }

        if (!(Math.Abs(limit - substrate) <= GuideLimits.SubstrateTolerance))
        {
            faults.Add(path, $"This region runs to infinity, where its index is {limit}, but the substrate's is {substrate}: the two must agree within {GuideLimits.SubstrateTolerance}.");
            return null;
        }

        var end = law.SettlesAt(start, GuideLimits.FurthestUm, draft.Wavelength);
        if (end is null) faults.Add(path, $"The index has not reached the substrate's within {GuideLimits.FurthestUm} µm of the cover; give a thickness, or a shorter tail.");
        return end;
    }

    /// <summary>Adds a region's pieces; false when going on makes no sense.</summary>
    private bool Fill(RegionDraft region, int number, Interval extent)
    {
        var path = $"regions[{number}]";
        if (!(extent.Length > 0)) return true;
        if (region.Law.Misfit(extent, region.ThicknessUm is null, draft.Wavelength) is { } misfit)
        {
            faults.Add($"{path}.index.{misfit.Path}", misfit.Message);
            return true;
        }

        var pieces = region.Law.Pieces(extent, number, draft.Wavelength).ToArray();
        Check(pieces, region.Law.Landmarks(extent).ToArray(), $"{path}.index");
        _pieces.AddRange(pieces);
        _compiledNodes += pieces.Length * region.Law.FormulaSize;
        if (_compiledNodes > GuideLimits.MostCompiledNodes)
        {
            faults.Add("regions", "The formulas change branch (abs, min, max, roots) too often for their length; use shorter formulas or fewer branches.");
            return false;
        }

        if (_pieces.Count <= GuideLimits.MostPieces) return true;
        faults.Add("regions", $"The guide has more than {GuideLimits.MostPieces} smooth pieces (table intervals and the like); at most {GuideLimits.MostPieces} are allowed.");
        return false;
    }

    private void Check(SmoothPiece[] pieces, double[] landmarks, string path)
    {
        foreach (var piece in pieces)
        {
            var even = Chebyshev.Select(t => t == 1 ? piece.Extent.End : piece.Extent.Start + t * piece.Extent.Length);
            foreach (var x in piece.IsUniform ? [piece.Extent.Start] : even.Concat(landmarks.Where(piece.Extent.Contains)))
            {
                var index = Math.Sqrt(piece.IndexSquared(x));
                if (index >= GuideLimits.Index.Minimum - GuideLimits.SubstrateTolerance && index <= GuideLimits.Index.Maximum) continue;
                faults.Add(path, $"The index is {Shown(index)} at x = {x} µm; from {GuideLimits.Index.Minimum} to {GuideLimits.Index.Maximum} is allowed.");
                return;
            }
        }
    }

    private static string Shown(double index) =>
        double.IsNaN(index) ? "not a real number" : FormattableString.Invariant($"{index}");
}
