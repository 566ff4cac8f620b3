using System.Globalization;
using System.Text;
using GuideModes.Guides;

namespace GuideModes.Web.Api;

/// <summary>Tables as CSV: a header block of lines starting with #, a line of column names with units, numbers that read back as the same double.</summary>
internal static class CsvFiles
{
    public static string Modes(Guide guide, ModesAnswer answer)
    {
        var file = Start("Modes", guide, answer);
        file.Append("# n_eff_lower and n_eff_upper bracket the exact value of the stated profile; share_in_guide is the share outside cover and substrate.\n");
        file.Append("mode,m,n_eff,n_eff_lower,n_eff_upper,wkb_n_eff,wkb_uncertainty,wkb_order_kept,wkb_minus_n_eff,verdict,turning_points_um,beta_rad_per_um,n_group,share_in_guide,centroid_um,rms_width_um,cover_penetration_um,substrate_penetration_um,reason\n");
        foreach (var mode in answer.Modes)
        {
            Row(
                file,
                mode.Label,
                Text(mode.M),
                Text(mode.NEff),
                Text(mode.NEffLower),
                Text(mode.NEffUpper),
                Text(mode.Wkb?.NEff),
                Text(mode.Wkb?.Uncertainty),
                Text(mode.Wkb?.OrderKept),
                Text(mode.Wkb?.NEff - mode.NEff),
                mode.Trust,
                string.Join(' ', mode.Wkb?.TurningPointsUm.Select(x => Text(x)) ?? []),
                Text(mode.BetaPerUm),
                Text(mode.NGroup),
                Text(mode.Confinement.Skip(1).SkipLast(1).Sum()),
                Text(mode.CentroidUm),
                Text(mode.RmsWidthUm),
                Text(mode.CoverPenetrationUm),
                Text(mode.SubstratePenetrationUm),
                Quoted(mode.TrustReason));
        }

        return file.ToString();
    }

    public static string Fields(Guide guide, ModesAnswer answer)
    {
        var shown = answer.Modes.Where(mode => mode.Field is not null).ToList();
        var file = Start("Field profiles", guide, answer);
        foreach (var mode in shown) file.Append(CultureInfo.InvariantCulture, $"# {mode.Label}: n_eff = {Text(mode.NEff)}\n");
        file.Append(guide.Polarization == Polarization.TE
            ? "# E scaled to the integral of E^2 dx = 1 with x in um; first lobe from the cover positive.\n"
            : "# H scaled to the integral of H^2/n^2 dx = 1 with x in um; first lobe from the cover positive.\n");
        Row(file, ["x_um", .. shown.Select(mode => $"{mode.Field!.Quantity}_{mode.Label}_um^-1/2")]);
        if (shown.Count == 0) return file.ToString();
        var x = shown[0].Field!.XUm;
        for (var i = 0; i < x.Length; i++) Row(file, [Text(x[i]), .. shown.Select(mode => Text(mode.Field!.Value[i]))]);
        return file.ToString();
    }

    private static StringBuilder Start(string what, Guide guide, ModesAnswer answer)
    {
        var file = new StringBuilder();
        file.Append(CultureInfo.InvariantCulture, $"# {what}\n");
        file.Append(CultureInfo.InvariantCulture, $"# guide: {OneLine(guide.Name)}\n");
        file.Append(CultureInfo.InvariantCulture, $"# vacuum wavelength: {Text(guide.Wavelength.Micrometres)} um\n");
        file.Append(CultureInfo.InvariantCulture, $"# polarization: {guide.Polarization}\n");
        file.Append(CultureInfo.InvariantCulture, $"# engine: {answer.Engine}\n");
        file.Append("# units: lengths um, x = 0 at the cover interface and growing into the guide; indices dimensionless\n");
        return file;
    }

    private static void Row(StringBuilder file, params IEnumerable<string> cells) => file.AppendJoin(',', cells).Append('\n');

    private static string Text(double? value) => value?.ToString("R", CultureInfo.InvariantCulture) ?? "";

    private static string Text(int? value) => value?.ToString(CultureInfo.InvariantCulture) ?? "";

    private static string Quoted(string text) => $"\"{OneLine(text).Replace("\"", "\"\"", StringComparison.Ordinal)}\"";

    private static string OneLine(string text) => text.ReplaceLineEndings(" ");
}
