using System.Text;
using System.Text.Json.Nodes;
using GuideModes.Web.Tests.Api;
using Microsoft.Playwright;

namespace GuideModes.Web.Tests.Browser;

/// <summary>What a person does on the page, in a real browser.</summary>
[Collection("browser")]
public sealed class GuidePageTests(BrowserHost host)
{
    [BrowserFact]
    public async Task MainTask_FromTheGalleryToTheModes_Works()
    {
        List<string> complaints = [];
        var page = await host.OpenAsync("/", complaints);
        Assert.True(await page.Locator(".gallery a").CountAsync() >= 6);

        await page.Locator(".gallery a", new() { HasText = "Polymer slab" }).ClickAsync();
        await Drawn(page);
        Assert.Equal(await Count(page), await page.Locator(".modes tbody tr").CountAsync());

        await Type(page, "#at-regions-0-index-n", "1.6");
        await page.Locator("input[aria-label='TM1 on the plots']").CheckAsync();
        await page.WaitForFunctionAsync("() => document.getElementById('field-plot').data.length === 2");

        await page.Locator(".verdict").First.PressAsync("Enter");
        Assert.EndsWith(".", (await page.Locator("#reason-0").TextContentAsync())!.Trim());
        await page.GetByRole(AriaRole.Button, new() { Name = "TM1", Exact = true }).ClickAsync();
        Assert.Equal("Mode TM1", await page.Locator("#mode-title").TextContentAsync());

        var levels = await page.EvaluateAsync<int>("() => document.getElementById('profile-plot').data.filter(t => t.name === 'levels').reduce((names, t) => names.concat([...new Set(t.text)]), []).length");
        Assert.Equal(await Count(page), levels);
        Assert.Empty(complaints);
    }

    /// <remarks>A click that comes while the circuit starts once left the address of the guide under the sight of the gallery.</remarks>
    [BrowserFact]
    public async Task Gallery_CardClickedBeforeTheCircuitIsUp_OpensTheGuide()
    {
        for (var i = 0; i < 6; i++)
        {
            var page = await host.OpenAsync("about:blank");
            await page.GotoAsync(host.Address.ToString(), new() { WaitUntil = WaitUntilState.Commit });
            await page.Locator(".gallery a").Nth(i).ClickAsync();
            await Drawn(page);
            await page.CloseAsync();
        }
    }

    [BrowserFact]
    public async Task Error_CommaForPoint_StandsAtItsFieldAndKeepsTheAnswer()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);

        await page.Locator("#at-wavelengthUm").FillAsync("1,4444");
        await page.Locator("#at-wavelengthUm").BlurAsync();

        await page.Locator("#at-wavelengthUm-error").WaitForAsync();
        Assert.Contains("point, not a comma", await page.Locator("#at-wavelengthUm-error").TextContentAsync());
        Assert.Equal("1,4444", await page.Locator("#at-wavelengthUm").InputValueAsync());
        Assert.Equal(4, await Count(page));
    }

    [BrowserFact]
    public async Task Error_OutOfRange_MarksTheAnswerAsOld()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);

        await page.Locator("#at-regions-0-thicknessUm").FillAsync("-2");
        await page.Locator("#at-regions-0-thicknessUm").PressAsync("Enter");

        await page.Locator("#at-regions-0-thicknessUm-error").WaitForAsync();
        await page.Locator(".results.stale").WaitForAsync();
        Assert.Contains("older", await page.Locator(".status").TextContentAsync());
        Assert.Equal(4, await Count(page));
    }

    [BrowserFact]
    public async Task Undo_ByKeyAndButton_WalksBackAndForth()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        await Type(page, "#at-wavelengthUm", "0.5");
        Assert.NotEqual(4, await Count(page));

        await page.Locator("main").FocusAsync();
        await page.Keyboard.PressAsync("Control+z");
        await page.WaitForFunctionAsync("() => document.getElementById('mode-count').textContent === '4'");
        Assert.Equal("1", await page.Locator("#at-wavelengthUm").InputValueAsync());

        await page.Locator("[aria-label=Redo]").ClickAsync();
        await page.WaitForFunctionAsync("() => document.getElementById('mode-count').textContent !== '4'");
        await page.Keyboard.PressAsync("Control+z");
        await page.WaitForFunctionAsync("() => document.getElementById('mode-count').textContent === '4'");
        await page.Locator("main").FocusAsync();
        await page.Keyboard.PressAsync("Control+Shift+z");
        await page.WaitForFunctionAsync("() => document.getElementById('mode-count').textContent !== '4'");
    }

    /// <summary>Ninety kilobytes from a file of the bench, comments and all: far more than one message of the circuit may carry.</summary>
    [BrowserFact]
    public async Task Paste_ALargeTable_IsPreviewedAndSolvedAndKeptAsADraft()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        await Settled(page, () => page.Locator("#at-regions-0-law").SelectOptionAsync("table"));
        await page.Locator("#at-regions-0-index-points-paste").ClickAsync();
        var points = Enumerable.Range(0, 601).Select(i => FormattableString.Invariant($"{i / 150.0:F14}\t{1.5 + 0.05 * Math.Exp(-Math.Pow(i / 300.0 - 1, 2)):F14}"));
        var text = "Depth (um)\tIndex\n" + string.Join('\n', points) + string.Concat(Enumerable.Repeat("\n# " + new string('-', 60), 1000));
        Assert.True(text.Length > 80_000);

        await Paste(page, "#at-regions-0-index-points-text", text);
        await page.GetByText("601 points read, 1001 heading").WaitForAsync();
        await Settled(page, () => page.GetByRole(AriaRole.Button, new() { Name = "Use these points" }).ClickAsync());

        Assert.Contains("601 points, x from 0 to 4 µm", await page.Locator(".table-editor").TextContentAsync());
        var count = await Count(page);
        Assert.True(count > 0);
        Assert.Contains("/guide?d=", page.Url);
        await page.ReloadAsync();
        await Drawn(page);
        Assert.Equal(count, await Count(page));
    }

    [BrowserFact]
    public async Task Paste_WithAFault_NamesTheLine()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        await page.Locator("#at-regions-0-law").SelectOptionAsync("table");
        await page.Locator("#at-regions-0-index-points-paste").ClickAsync();

        await page.Locator("#at-regions-0-index-points-text").PressSequentiallyAsync("0;1,52\n1;1,51");

        await page.GetByText("Line 1: Index “1,52”: Use a point, not a comma").WaitForAsync();
        Assert.True(await page.GetByRole(AriaRole.Button, new() { Name = "Use these points" }).IsDisabledAsync());
    }

    [BrowserFact]
    public async Task Reload_AfterEdits_KeepsGuideAndChosenModes()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        await Type(page, "#at-regions-0-thicknessUm", "6.25");
        await page.Locator("input[aria-label='TE2 on the plots']").CheckAsync();
        await page.WaitForURLAsync("**m=0,2");
        var count = await Count(page);

        await page.ReloadAsync();
        await Drawn(page);

        Assert.Equal("6.25", await page.Locator("#at-regions-0-thicknessUm").InputValueAsync());
        Assert.Equal(count, await Count(page));
        Assert.True(await page.Locator("input[aria-label='TE2 on the plots']").IsCheckedAsync());
    }

    [BrowserFact]
    public async Task BrokenLink_OffersTheExamples()
    {
        foreach (var query in new[] { "g=%00%ff", "g=AAAAAAAA", "d=0123456789abcdef0123456789abcdef" })
        {
            var page = await host.OpenAsync("/guide?" + query);
            await page.GetByText("does not hold a guide that can be read").WaitForAsync();
            Assert.True(await page.Locator(".gallery a").CountAsync() >= 6);
        }
    }

    [BrowserFact]
    public async Task NothingGuided_IsSaidWithItsReason()
    {
        var page = await host.OpenGuideAsync(Samples.Nothing);

        Assert.Equal(0, await Count(page));
        Assert.Contains("Nothing is guided", await page.Locator(".remark").First.TextContentAsync());
    }

    [BrowserFact]
    public async Task Zoom_OverAnEdit_IsKept()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        await page.EvaluateAsync("() => { window.start = [...document.getElementById('profile-plot')._fullLayout.xaxis.range]; }");
        await page.Locator("[aria-label='Zoom in, Profile and modes']").ClickAsync();
        await page.WaitForFunctionAsync("() => document.getElementById('profile-plot')._fullLayout.xaxis.range[0] > window.start[0] + 0.01");
        var before = await page.EvaluateAsync<double[]>("() => [...document.getElementById('profile-plot')._fullLayout.xaxis.range]");

        await Type(page, "#at-regions-0-index-n", "1.52");

        Assert.Equal(before, await page.EvaluateAsync<double[]>("() => [...document.getElementById('profile-plot')._fullLayout.xaxis.range]"));
    }

    [BrowserFact]
    public async Task Files_EachOne_AgreesWithTheInterface()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        var answer = await Ask();
        await page.Locator(".downloads summary").ClickAsync();

        var modes = CsvTable.Parse(await Download(page, "Mode table (CSV)"));
        Assert.Equal(answer["modes"]!.AsArray().Select(mode => mode!["nEff"]!.GetValue<double>()), modes.Numbers("n_eff"));

        var fields = CsvTable.Parse(await Download(page, "Field profiles of the ticked modes (CSV)"));
        Assert.Equal(["x_um", "E_TE0_um^-1/2"], fields.Columns);
        Assert.Equal(answer["modes"]![0]!["field"]!["value"]!.AsArray()[0]!.GetValue<double>(), fields.Numbers("E_TE0_um^-1/2")[0], 1e-3);

        Assert.Equal(Samples.Document(Samples.Slab), Guides.GuideDocument.Parse(await Download(page, "The guide (JSON)")));
        Assert.True(JsonNode.DeepEquals(answer, JsonNode.Parse(await Download(page, "Everything: guide, modes, fields (JSON)"))!["answer"]));
    }

    [BrowserFact]
    public async Task Plots_SavedAsPictures_AreThose()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);

        var svg = await Bytes(page, () => page.Locator("[aria-label='Save as SVG, Profile and modes']").ClickAsync());
        Assert.Contains("<svg", Encoding.UTF8.GetString(svg));
        Assert.Contains("TE0", Encoding.UTF8.GetString(svg));
        var png = await Bytes(page, () => page.Locator("[aria-label='Save as PNG, Fields']").ClickAsync());
        Assert.Equal<byte>([0x89, 0x50, 0x4e, 0x47], png[..4]);
        Assert.True(png.Length > 10_000);
    }

    [BrowserFact]
    public async Task Theme_Switched_IsRemembered()
    {
        var page = await host.OpenAsync("/");
        await page.WaitForFunctionAsync("() => document.documentElement.dataset.theme === 'light'");
        await page.WaitForFunctionAsync("() => window.Blazor && document.querySelector('.theme-switch')");
        await page.WaitForTimeoutAsync(500);

        await page.Locator(".theme-switch").ClickAsync();
        await page.WaitForFunctionAsync("() => document.documentElement.dataset.theme === 'dark'");
        await page.ReloadAsync();
        Assert.Equal("dark", await page.EvaluateAsync<string>("() => document.documentElement.dataset.theme"));
        await page.Locator("[aria-label='Switch to light colours']").WaitForAsync();
    }

    [BrowserFact]
    public async Task Narrow_360_NothingOverflows()
    {
        foreach (var page in new[] { await host.OpenAsync("/", width: 360), await host.OpenGuideAsync(Samples.TwoRegions, width: 360) })
            Assert.True(await page.EvaluateAsync<int>("() => document.documentElement.scrollWidth") <= 360);
    }

    [BrowserFact]
    public async Task Keyboard_Alone_ReachesFieldTickVerdictAndFile()
    {
        var page = await host.OpenGuideAsync(Samples.Slab);
        await page.EvaluateAsync("() => document.activeElement?.blur()");
        HashSet<string> reached = [];
        for (var i = 0; i < 80; i++)
        {
            await page.Keyboard.PressAsync("Tab");
            reached.Add(await page.EvaluateAsync<string>("() => document.activeElement.id || document.activeElement.getAttribute('aria-label') || document.activeElement.textContent.trim()"));
        }

        foreach (var name in new[] { "at-wavelengthUm", "at-polarization", "at-regions-0-law", "Duplicate region 1", "Files", "TE0 on the plots", "TE0", "Table of modes" }) Assert.Contains(name, reached);
        Assert.Contains(reached, name => name.StartsWith("TE0: ", StringComparison.Ordinal));
    }

    [BrowserFact]
    public async Task Axe_BothThemes_FindsNothing()
    {
        foreach (var scheme in new[] { ColorScheme.Light, ColorScheme.Dark })
        {
            var gallery = await host.OpenAsync("/", scheme: scheme);
            await gallery.WaitForFunctionAsync("() => document.querySelector('.theme-switch')");
            Assert.Equal("", await BrowserHost.FindingsAsync(gallery));

            var guide = await host.OpenGuideAsync(Samples.TwoRegions, scheme: scheme);
            await guide.Locator(".verdict").First.ClickAsync();
            await guide.Locator("#reason-0").WaitForAsync();
            await guide.Locator(".downloads summary").ClickAsync();
            Assert.Equal("", await BrowserHost.FindingsAsync(guide));

            await guide.Locator("#at-regions-0-thicknessUm").FillAsync("1,5");
            await guide.Locator("#at-regions-0-thicknessUm").BlurAsync();
            await guide.Locator("#at-regions-0-thicknessUm-error").WaitForAsync();
            await guide.Locator("#at-regions-0-law").SelectOptionAsync("table");
            await guide.Locator("#at-regions-0-index-points-paste").ClickAsync();
            await guide.Locator("#at-regions-0-index-points-text").FillAsync("0 1.5\n1 1.6");
            await guide.GetByText("2 points read").WaitForAsync();
            Assert.Equal("", await BrowserHost.FindingsAsync(guide));
        }
    }

    private static Task Type(IPage page, string field, string text) => Settled(page, async () =>
    {
        await page.Locator(field).FillAsync(text);
        await page.Locator(field).PressAsync("Enter");
    });

    /// <summary>Puts text on the clipboard and presses the keys for it, as a person does.</summary>
    private static async Task Paste(IPage page, string field, string text)
    {
        await page.Context.GrantPermissionsAsync(["clipboard-read", "clipboard-write"]);
        await page.EvaluateAsync("text => navigator.clipboard.writeText(text)", text);
        await page.Locator(field).FocusAsync();
        await page.Keyboard.PressAsync("Control+v");
    }

    private static async Task Drawn(IPage page) =>
        await page.WaitForFunctionAsync("() => document.querySelector('.bench[data-ready=true]') && document.getElementById('profile-plot')?.data?.length > 0");

    /// <summary>Makes an edit and waits until it has gone through: the address holds it, and what is shown is not old.</summary>
    private static async Task Settled(IPage page, Func<Task> edit)
    {
        var before = page.Url;
        await edit();
        await page.WaitForURLAsync(url => url != before);
        await page.WaitForFunctionAsync("() => document.querySelector('.results[aria-busy=false]') && document.querySelector('.status').textContent === ''");
    }

    private static async Task<int> Count(IPage page) => int.Parse((await page.Locator("#mode-count").TextContentAsync())!, System.Globalization.CultureInfo.InvariantCulture);

    private static async Task<string> Download(IPage page, string link) =>
        Encoding.UTF8.GetString(await Bytes(page, () => page.GetByRole(AriaRole.Link, new() { Name = link }).ClickAsync()));

    private static async Task<byte[]> Bytes(IPage page, Func<Task> act)
    {
        var download = await page.RunAndWaitForDownloadAsync(act);
        return await File.ReadAllBytesAsync((await download.PathAsync())!);
    }

    private async Task<JsonNode> Ask()
    {
        using var client = new HttpClient { BaseAddress = host.Address };
        using var content = new StringContent(Samples.Slab, Encoding.UTF8, "application/json");
        var response = await client.PostAsync("/api/v1/modes?fields=true", content);
        return JsonNode.Parse(await response.Content.ReadAsStringAsync())!;
    }
}
