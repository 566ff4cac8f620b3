using System.Text.RegularExpressions;

namespace GuideModes.Tests;

/// <summary>The pages that come with the code: what they point to is there.</summary>
public sealed partial class DocumentationTests
{
    private static readonly string Root = FindRoot();

    public static TheoryData<string> Pages { get; } = [.. Find()];

    [Fact]
    public void Pages_OfTheRepository_AreFound() => Assert.Contains("README.md", Find());

    [Theory]
    [MemberData(nameof(Pages))]
    public void Links_OfAPage_LeadSomewhere(string page)
    {
        var folder = Path.GetDirectoryName(Path.Combine(Root, page))!;
        var broken = Link().Matches(File.ReadAllText(Path.Combine(Root, page)))
            .Select(match => match.Groups["target"].Value)
            .Where(target => !target.Contains("://", StringComparison.Ordinal))
            .Where(target => !Path.Exists(Path.Combine(folder, target)));

        Assert.Empty(broken);
    }

    [GeneratedRegex(@"\]\((?<target>[^)#\s]+)(#[^)]*)?\)")]
    private static partial Regex Link();

    private static IEnumerable<string> Find() =>
        Directory.EnumerateFiles(Root, "*.md")
            .Concat(Directory.EnumerateFiles(Path.Combine(Root, "docs"), "*.md", SearchOption.AllDirectories))
            .Concat(Directory.EnumerateFiles(Path.Combine(Root, "deploy"), "*.md"))
            .Select(path => Path.GetRelativePath(Root, path));

    private static string FindRoot()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "GuideModes.sln")))
            folder = folder.Parent ?? throw new DirectoryNotFoundException("GuideModes.sln is nowhere above the test.");
        return folder.FullName;
    }
}
