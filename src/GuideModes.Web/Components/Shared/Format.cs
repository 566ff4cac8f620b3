using System.Globalization;

namespace GuideModes.Web.Components.Shared;

/// <summary>Numbers for people to read: no more digits than a number's own uncertainty bears.</summary>
public static class Format
{
    private const int MostDecimals = 15;

    private const string Superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>A value with its bound as the trade writes it: 1.55719054645(5) is 1.55719054645 ± 0.00000000005.</summary>
    /// <remarks>The figure in brackets covers the bound and the rounding of the digits before it. A bound that reaches the units digit is written after ±.</remarks>
    public static string Bracketed(Estimate estimate)
    {
        if (!double.IsFinite(estimate.Value) || !double.IsFinite(estimate.Error)) return "–";
        var decimals = Decimals(estimate.Error);
        for (; decimals > 0; decimals--)
        {
            var text = Fixed(estimate.Value, decimals);
            var rounding = Math.Abs(double.Parse(text, CultureInfo.InvariantCulture) - estimate.Value);
            var last = Math.Ceiling((Math.Abs(estimate.Error) + rounding) * Math.Pow(10, decimals) - 1e-9);
            if (last < 10) return $"{text}({Math.Max(1, last).ToString("0", CultureInfo.InvariantCulture)})";
        }

        return $"{Fixed(estimate.Value, 0)} ± {Short(estimate.Error)}";
    }

    /// <summary>Three figures, with a power of ten where the number is very small or large: −2.41×10⁻⁶.</summary>
    public static string Short(double value)
    {
        if (!double.IsFinite(value)) return "–";
        if (value == 0) return "0";
        var exponent = (int)Math.Floor(Math.Log10(Math.Abs(value)));
        if (exponent is >= -3 and < 5) return Minus(value.ToString($"F{Math.Clamp(2 - exponent, 0, 6)}", CultureInfo.InvariantCulture));
        var mantissa = value.ToString("0.00E+0", CultureInfo.InvariantCulture);
        var at = mantissa.IndexOf('E', StringComparison.Ordinal);
        return Minus(mantissa[..at]) + "×10" + Superscript(int.Parse(mantissa.AsSpan(at + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture));
    }

    /// <summary>A length or rate with a fixed number of decimals.</summary>
    public static string Fixed(double value, int decimals) =>
        double.IsFinite(value) ? Minus(value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)) : "–";

    /// <summary>A share of one as a percentage; what is neither nothing nor everything is not rounded to it.</summary>
    public static string Percent(double share)
    {
        if (!double.IsFinite(share)) return "–";
        var percent = 100 * share;
        return percent switch
        {
            0 => "0 %",
            > 0 and < 0.01 => "< 0.01 %",
            100 => "100 %",
            > 99.99 and < 100 => "> 99.99 %",
            _ => percent.ToString("F2", CultureInfo.InvariantCulture) + " %",
        };
    }

    private static int Decimals(double error) =>
        error <= 0 ? MostDecimals : Math.Clamp(-(int)Math.Floor(Math.Log10(error)), 0, MostDecimals);

    private static string Minus(string text) => text.Replace('-', '−');

    private static string Superscript(int exponent) =>
        (exponent < 0 ? "⁻" : "") + string.Concat(Math.Abs(exponent).ToString(CultureInfo.InvariantCulture).Select(digit => Superscripts[digit - '0']));
}
