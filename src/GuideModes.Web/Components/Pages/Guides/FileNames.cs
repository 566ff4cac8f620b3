namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>File names made from a guide's name: letters, digits and hyphens, on every system.</summary>
public static class FileNames
{
    private const int Longest = 60;

    public static string Stem(string name)
    {
        var kept = string.Concat(name.Select(c => char.IsAsciiLetterOrDigit(c) ? char.ToLowerInvariant(c) : '-'));
        var stem = string.Join('-', kept.Split('-', StringSplitOptions.RemoveEmptyEntries));
        return stem.Length == 0 ? "guide" : stem.Length > Longest ? stem[..Longest].TrimEnd('-') : stem;
    }
}
