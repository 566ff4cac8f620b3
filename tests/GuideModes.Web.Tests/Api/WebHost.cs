using Microsoft.AspNetCore.Hosting;
using Microsoft.AspNetCore.Mvc.Testing;

namespace GuideModes.Web.Tests.Api;

/// <summary>The whole program in this process, with a data folder of its own.</summary>
public sealed class WebHost : WebApplicationFactory<Program>
{
    private readonly string _folder = Directory.CreateTempSubdirectory("guidemodes-web-").FullName;

    protected override void ConfigureWebHost(IWebHostBuilder builder) => builder.UseSetting("GuideModes:DataFolder", _folder);

    protected override void Dispose(bool disposing)
    {
        base.Dispose(disposing);
        if (disposing && Directory.Exists(_folder)) Directory.Delete(_folder, recursive: true);
    }
}
