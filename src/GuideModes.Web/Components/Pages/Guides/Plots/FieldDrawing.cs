using GuideModes.Solvers.Certification;
using GuideModes.Web.Solving;

namespace GuideModes.Web.Components.Pages.Guides.Plots;

/// <summary>The fields of chosen modes, or their squares.</summary>
internal static class FieldDrawing
{
    private const int Points = 800;

    public static (PlotSheet Sheet, byte[] Numbers) Of(GuideAnswer answer, IReadOnlyList<int> chosen, bool intensity)
    {
        var view = ViewRange.ForPlots(answer);
        var grid = FieldGrid.Over(view, Points);
        var packet = new PlotPacket();
        double low = 0, high = 0;
        var fields = answer.Fields([.. chosen], grid);
        for (var slot = 0; slot < chosen.Count; slot++)
        {
            var field = fields[slot];
            double[] values = [.. field.Value.Select(value => intensity ? value * value : value)];
            (low, high) = (Math.Min(low, values.Min()), Math.Max(high, values.Max()));
            packet.Add("field", answer.Modes[chosen[slot]].Label, slot, field.XUm, values);
        }

        var margin = 0.08 * Math.Max(high - low, 1e-12);
        var name = answer.Guide.Polarization == Polarization.TE ? "E" : "H";
        var title = intensity ? $"{name}² (µm<sup>−1</sup>)" : $"{name} (µm<sup>−½</sup>)";
        var sheet = new PlotSheet("field", "x (µm)", title, [view.Start, view.End], [intensity ? 0 : low - margin, high + margin], packet.Curves, packet.Labels);
        return (sheet, packet.Bytes);
    }
}
