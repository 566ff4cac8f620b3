namespace GuideModes.Web.Tests.Browser;

/// <summary>A test in a real browser: skipped, loudly, on a machine that has none, but never where CI is set.</summary>
public sealed class BrowserFactAttribute : FactAttribute
{
    public const string Chromium = "/usr/bin/chromium";

    public BrowserFactAttribute()
    {
        if (!File.Exists(Chromium) && Environment.GetEnvironmentVariable("CI") != "true")
            Skip = $"NOT RUN: there is no browser at {Chromium}. Install Chromium to run the browser tests.";
    }
}
