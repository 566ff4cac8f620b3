using GuideModes.Solvers.Certification;

namespace GuideModes.Web.Components.Shared;

/// <summary>The verdict as a word, the same on the page, in files and in the interface.</summary>
public static class TrustWords
{
    public static string Word(this Trust trust) => trust switch
    {
        Trust.Agree => "agree",
        Trust.Watch => "watch",
        _ => "disagree",
    };
}
