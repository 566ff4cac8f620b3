using System.Diagnostics;
using System.Text.Json.Nodes;
using System.Text.RegularExpressions;

namespace GuideModes.Web.Tests.Api;

/// <summary>Runs the examples of docs/api.md as they stand there, against the program on a real port.</summary>
public sealed partial class DocumentedExamplesTests
{
    [ProgramFact("curl")]
    public async Task Curl_AsDocumented_GetsTheModes()
    {
        var answer = JsonNode.Parse(await RunAsync("bash", "-c", Example("curl")))!;

        Assert.True(answer["modeCount"]!.GetValue<int>() > 0);
        Assert.Equal("TE0", answer["modes"]![0]!["label"]!.GetValue<string>());
    }

    [ProgramFact("python3")]
    public async Task Python_AsDocumented_PrintsModesAndRefusal()
    {
        var lines = (await RunAsync("python3", "-c", Example("python3"))).Split('\n', StringSplitOptions.RemoveEmptyEntries);

        Assert.Matches(@"^\d+ modes$", lines[0]);
        Assert.StartsWith("TM0 1.5", lines[1]);
        Assert.StartsWith("400 regions[0].thicknessUm ", lines[^1]);
        Assert.Equal(int.Parse(lines[0].Split(' ')[0], System.Globalization.CultureInfo.InvariantCulture), lines.Length - 2);
    }

    private static string Example(string program)
    {
        var match = Block().Matches(File.ReadAllText(DocumentPath())).Single(block => block.Groups["program"].Value == program);
        return match.Groups["code"].Value;
    }

    private static string DocumentPath()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "GuideModes.sln"))) folder = folder.Parent ?? throw new FileNotFoundException("GuideModes.sln is not above the tests.");
        return Path.Combine(folder.FullName, "docs", "api.md");
    }

    private static async Task<string> RunAsync(string program, params string[] arguments)
    {
        await using var host = new WebHost();
        host.UseKestrel(0);
        host.StartServer();
        var start = new ProcessStartInfo(program, arguments) { RedirectStandardOutput = true, RedirectStandardError = true };
        start.Environment["BASE"] = host.ClientOptions.BaseAddress.ToString().TrimEnd('/');
        start.Environment["PYTHONIOENCODING"] = "utf-8";
        using var process = Process.Start(start)!;
        var errors = process.StandardError.ReadToEndAsync();
        var output = await process.StandardOutput.ReadToEndAsync();
        await process.WaitForExitAsync();
        Assert.True(process.ExitCode == 0, $"{program} ended with {process.ExitCode}: {await errors}{output}");
        return output;
    }

    [GeneratedRegex(@"<!-- run: (?<program>\w+) -->\s*```\w+\n(?<code>.*?)```", RegexOptions.Singleline)]
    private static partial Regex Block();

    /// <summary>A test that needs a program: skipped, loudly, where it is missing, but never where CI is set.</summary>
    private sealed class ProgramFactAttribute : FactAttribute
    {
        public ProgramFactAttribute(string program)
        {
            var folders = (Environment.GetEnvironmentVariable("PATH") ?? "").Split(Path.PathSeparator);
            if (!folders.Any(folder => File.Exists(Path.Combine(folder, program))) && Environment.GetEnvironmentVariable("CI") != "true")
                Skip = $"NOT RUN: {program} is not on the path.";
        }
    }
}
