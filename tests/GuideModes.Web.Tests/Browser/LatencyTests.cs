using System.Globalization;
using Xunit.Abstractions;

namespace GuideModes.Web.Tests.Browser;

/// <summary>How long it takes from an edit until the plot shows it. A report for docs/performance.md: a busy machine may not fail it.</summary>
[Collection("browser")]
public sealed class LatencyTests(BrowserHost host, ITestOutputHelper output)
{
    private const string Measure =
        """
        async () => {
          const field = document.getElementById('at-wavelengthUm'), plot = document.getElementById('profile-plot');
          const start = Number(field.value), times = [];
          for (let i = 1; i <= 15; i++) {
            const drawn = new Promise(done => {
              const observer = new MutationObserver(() => { observer.disconnect(); done(performance.now()); });
              observer.observe(plot, { attributes: true, attributeFilter: ['data-drawings'] });
            });
            field.value = (start * (1 + i * 0.001)).toFixed(6);
            const edited = performance.now();
            field.dispatchEvent(new Event('change', { bubbles: true }));
            times.push(await drawn - edited);
            await new Promise(done => setTimeout(done, 400));
          }
          return times;
        }
        """;

    [BrowserFact]
    public async Task Edit_UntilThePlotShowsIt_IsReported()
    {
        foreach (var name in new[] { "Polymer slab", "Silver-exchanged", "Many-mode" })
        {
            var page = await host.OpenAsync("/");
            await page.GotoAsync((await page.Locator(".gallery a", new() { HasText = name }).GetAttributeAsync("href"))!);
            await page.WaitForFunctionAsync("() => document.querySelector('.bench[data-ready=true]') && document.getElementById('profile-plot')?.data?.length > 0");

            var times = (await page.EvaluateAsync<double[]>(Measure)).Order().ToArray();

            Assert.Equal(15, times.Length);
            output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{name}: median {times[7]:0} ms, from {times[0]:0} to {times[^1]:0} ms, edit to plot"));
        }
    }
}
