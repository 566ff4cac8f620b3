using GuideModes.Solvers.Certification;
using GuideModes.Web.Components.Shared;
using GuideModes.Web.Solving;

namespace GuideModes.Web.Components.Pages.Guides.Plots;

/// <summary>n(x), the effective indices as levels between their turning points, and chosen fields on their levels.</summary>
internal static class ProfileDrawing
{
    private const int FieldPoints = 800;

    /// <summary>With more modes than this only the chosen ones are named beside their levels.</summary>
    private const int MostLabels = 12;

    /// <summary>Names closer than this part of the index span would overlap.</summary>
    private const double LabelHeight = 0.045;

    public static (PlotSheet Sheet, byte[] Numbers) Of(GuideAnswer answer, IReadOnlyList<int> chosen)
    {
        var profile = answer.Guide.Profile;
        var view = ViewRange.ForPlots(answer);
        var samples = ProfileSamples.Of(profile);
        var packet = new PlotPacket();
        packet.Add(
            "profile",
            "n(x)",
            -1,
            [view.Start - view.Length, profile.Extent.Start, .. samples.XUm, profile.Extent.End, Math.Max(view.End, profile.Extent.End) + view.Length],
            [profile.Cover.Index, profile.Cover.Index, .. samples.Index, profile.Substrate.Index, profile.Substrate.Index]);

        var cutoff = Math.Sqrt(profile.CutoffIndexSquared);
        var top = Math.Max(samples.Index.Max(), cutoff);
        var span = Math.Max(top - Math.Min(cutoff, samples.Index.Max()), 1e-6 * top);
        AddLevels(packet, answer, view, chosen);
        AddLabels(packet, answer, chosen, span);
        var highest = AddFields(packet, answer, view, chosen, span);

        var low = cutoff - 0.14 * span;
        var note = profile.Cover.Index < low ? $"cover n = {Format.Fixed(profile.Cover.Index, 4)}, below this window" : null;
        var sheet = new PlotSheet("profile", "x (µm)", "index n, effective index", [view.Start, view.End], [low, Math.Max(top + 0.12 * span, highest + 0.04 * span)], packet.Curves, packet.Labels, note);
        return (sheet, packet.Bytes);
    }

    /// <summary>A level runs between its turning points; where the asymptotic engine names none, across the view.</summary>
    private static void AddLevels(PlotPacket packet, GuideAnswer answer, Interval view, IReadOnlyList<int> chosen)
    {
        foreach (var group in answer.Modes.GroupBy(mode => Slot(chosen, mode.Exact.Order)))
        {
            List<double> x = [];
            List<double> y = [];
            List<PlotPart> parts = [];
            foreach (var mode in group)
            {
                var n = Level(mode);
                var turns = mode.Wkb?.TurningPointsUm is { Length: >= 2 } points ? points : [view.Start, view.End];
                var before = x.Count;
                for (var i = 0; i + 1 < turns.Length; i += 2)
                {
                    x.AddRange([turns[i], turns[i + 1], double.NaN]);
                    y.AddRange([n, n, double.NaN]);
                }

                parts.Add(new($"{mode.Label}  n_eff = {Format.Bracketed(mode.Exact.EffectiveIndex)}", x.Count - before));
            }

            packet.Add("level", "levels", group.Key, x, y, parts);
        }
    }

    /// <summary>Names stand at the right end of their levels; levels too close to be told apart share a line.</summary>
    private static void AddLabels(PlotPacket packet, GuideAnswer answer, IReadOnlyList<int> chosen, double span)
    {
        List<CertifiedMode> together = [];
        foreach (var mode in answer.Modes.Where(mode => answer.Modes.Length <= MostLabels || chosen.Contains(mode.Exact.Order)))
        {
            if (together.Count > 0 && Level(together[0]) - Level(mode) > LabelHeight * span) Flush();
            together.Add(mode);
        }

        Flush();

        void Flush()
        {
            if (together.Count == 0) return;
            var end = together.Max(mode => mode.Wkb is { TurningPointsUm: [.., var last] } ? last : answer.Guide.Profile.Extent.Start);
            packet.Labels.Add(new(string.Join(", ", together.Select(mode => mode.Label)), end, Level(together[0]), together.Max(mode => Slot(chosen, mode.Exact.Order))));
            together.Clear();
        }
    }

    private static double Level(CertifiedMode mode) => mode.Exact.EffectiveIndex.Value;

    /// <summary>Draws the fields and says how high they reach.</summary>
    private static double AddFields(PlotPacket packet, GuideAnswer answer, Interval view, IReadOnlyList<int> chosen, double span)
    {
        if (chosen.Count == 0) return 0;
        var grid = FieldGrid.Over(view, FieldPoints);
        var height = Height(answer, chosen, span);
        var highest = 0.0;
        foreach (var (order, field) in chosen.Zip(answer.Fields([.. chosen], grid)))
        {
            var largest = field.Value.Max(Math.Abs);
            var level = answer.Modes[order].Exact.EffectiveIndex.Value;
            double[] drawn = [.. field.Value.Select(value => level + height * value / largest)];
            highest = Math.Max(highest, drawn.Max());
            packet.Add("field", answer.Modes[order].Label, Slot(chosen, order), field.XUm, drawn);
        }

        return highest;
    }

    /// <summary>Tall enough to be read, and where the levels allow it not into the next one.</summary>
    private static double Height(GuideAnswer answer, IReadOnlyList<int> chosen, double span)
    {
        var levels = chosen.Select(order => answer.Modes[order].Exact.EffectiveIndex.Value).Order().ToList();
        var gap = levels.Zip(levels.Skip(1), (a, b) => b - a).DefaultIfEmpty(span).Min();
        return Math.Clamp(0.7 * gap, 0.06 * span, 0.16 * span);
    }

    private static int Slot(IReadOnlyList<int> chosen, int order)
    {
        for (var i = 0; i < chosen.Count; i++)
        {
            if (chosen[i] == order) return i;
        }

        return -1;
    }
}
