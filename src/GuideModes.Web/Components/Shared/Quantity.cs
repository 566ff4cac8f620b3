using System.Globalization;

namespace GuideModes.Web.Components.Shared;

/// <summary>Numbers as people type them: a decimal point, an exponent if they like, no thousands separators.</summary>
public static class Quantity
{
    /// <summary>Reads a number; where it is none, says in a sentence what would be one.</summary>
    public static bool TryParse(string? text, out double value, out string error)
    {
        value = 0;
        error = "";
        var typed = (text ?? "").Trim().Replace('−', '-');
        if (typed.Length == 0)
        {
            error = "Type a number.";
        }
        else if (typed.Contains(',', StringComparison.Ordinal))
        {
            error = $"Use a point, not a comma: {typed.Replace(',', '.')}";
        }
        else if (!double.TryParse(typed, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent, CultureInfo.InvariantCulture, out value))
        {
            error = "This is not a number. Type one like 1.4444 or 1e-6, without its unit.";
        }
        else if (!double.IsFinite(value))
        {
            value = 0;
            error = "This number is too large to compute with.";
        }

        return error.Length == 0;
    }

    /// <summary>The shortest text that reads back as the same number.</summary>
    public static string Text(double value)
    {
        var text = value.ToString("R", CultureInfo.InvariantCulture);
        var at = text.IndexOf('E', StringComparison.Ordinal);
        return at < 0 ? text : $"{text[..at]}e{int.Parse(text.AsSpan(at + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture).ToString(CultureInfo.InvariantCulture)}";
    }
}
