using Deque.AxeCore.Commons;
using Deque.AxeCore.Playwright;
using GuideModes.Web.State;
using GuideModes.Web.Tests.Api;
using Microsoft.Playwright;

namespace GuideModes.Web.Tests.Browser;

/// <summary>The program on a real port, and a browser.</summary>
public sealed class BrowserHost : IAsyncLifetime
{
    private static readonly string[] Arguments =
        ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"];

    private readonly WebHost _host = new();
    private IPlaywright? _playwright;
    private IBrowser? _browser;

    public Uri Address { get; private set; } = null!;

    public async Task InitializeAsync()
    {
        if (!File.Exists(BrowserFactAttribute.Chromium) && Environment.GetEnvironmentVariable("CI") != "true") return;
        _host.UseKestrel(0);
        _host.StartServer();
        Address = _host.ClientOptions.BaseAddress;
        _playwright = await Playwright.CreateAsync();
        _browser = await _playwright.Chromium.LaunchAsync(new() { ExecutablePath = BrowserFactAttribute.Chromium, Headless = true, Args = Arguments });
    }

    public async Task DisposeAsync()
    {
        if (_browser is not null) await _browser.DisposeAsync();
        _playwright?.Dispose();
        await _host.DisposeAsync();
    }

    /// <summary>A fresh page; what it complains of in its console is kept in <paramref name="complaints"/>.</summary>
    public async Task<IPage> OpenAsync(string path, List<string>? complaints = null, ColorScheme scheme = ColorScheme.Light, int width = 1280)
    {
        var context = await _browser!.NewContextAsync(new()
        {
            BaseURL = Address.ToString(),
            ColorScheme = scheme,
            ViewportSize = new() { Width = width, Height = 900 },
            AcceptDownloads = true,
        });
        context.SetDefaultTimeout(30_000);
        var page = await context.NewPageAsync();
        page.Console += (_, message) =>
        {
            if (message.Type is "error" or "warning") complaints?.Add(message.Text);
        };
        page.PageError += (_, error) => complaints?.Add(error);
        await page.GotoAsync(path);
        return page;
    }

    /// <summary>A page with a guide on it, drawn.</summary>
    public async Task<IPage> OpenGuideAsync(string json, List<string>? complaints = null, ColorScheme scheme = ColorScheme.Light, int width = 1280)
    {
        var page = await OpenAsync("/guide?g=" + GuideLinks.Pack(Samples.Document(json)), complaints, scheme, width);
        await page.Locator(".bench[data-ready=true]").WaitForAsync();
        await page.WaitForFunctionAsync("() => document.getElementById('profile-plot')?.data?.length > 0 || document.querySelector('.problem')");
        return page;
    }

    /// <summary>What axe finds on a page: each rule broken, with the first place.</summary>
    public static async Task<string> FindingsAsync(IPage page)
    {
        AxeResult result = await page.RunAxe();
        return string.Join('\n', result.Violations.Select(violation => $"{violation.Impact} {violation.Id}: {violation.Nodes[0].Html}"));
    }
}

[CollectionDefinition("browser")]
public sealed class BrowserTests : ICollectionFixture<BrowserHost>;
