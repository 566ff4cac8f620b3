using GuideModes.Web.State;
using Microsoft.AspNetCore.DataProtection;

namespace GuideModes.Web;

/// <summary>How the process stands in the world: where it listens, where it keeps its files, which headers it sends.</summary>
internal static class Hosting
{
    private const string DefaultAddress = "http://127.0.0.1:5170";

    // Styles are inline in the component library and in the plots; scripts are files of our own and of the packages, no others.
    private const string ContentPolicy =
        "default-src 'self'; script-src 'self'; style-src 'self' 'unsafe-inline'; img-src 'self' data: blob:; "
        + "font-src 'self' data:; object-src 'none'; base-uri 'self'; form-action 'self'; frame-ancestors 'none'";

    /// <summary>A published copy finds its files beside itself, wherever it is started from.</summary>
    public static WebApplicationOptions Options(string[] args) => new()
    {
        Args = args,
        ContentRootPath = Directory.Exists(Path.Combine(AppContext.BaseDirectory, "wwwroot")) ? AppContext.BaseDirectory : null,
    };

    /// <summary>A loopback address unless one is given, static files in every environment, keys in the data folder.</summary>
    public static void UseOwnDefaults(this WebApplicationBuilder builder)
    {
        builder.WebHost.UseStaticWebAssets();
        builder.WebHost.ConfigureKestrel(kestrel => kestrel.AddServerHeader = false);
        if (string.IsNullOrEmpty(builder.Configuration[WebHostDefaults.ServerUrlsKey])
            && string.IsNullOrEmpty(builder.Configuration["http_ports"])
            && !builder.Configuration.GetSection("Kestrel:Endpoints").Exists())
        {
            builder.WebHost.UseUrls(DefaultAddress);
        }

        builder.Logging.AddFilter("Microsoft.AspNetCore.DataProtection", LogLevel.Error);
        builder.Logging.AddFilter("Microsoft.AspNetCore.Hosting.Diagnostics", LogLevel.Warning);
        builder.Logging.AddFilter("Microsoft.AspNetCore.Http", LogLevel.Warning);
        builder.Logging.AddFilter("Microsoft.AspNetCore.Routing", LogLevel.Warning);
        builder.Logging.AddFilter("Microsoft.AspNetCore.StaticAssets", LogLevel.Warning);
        builder.Logging.AddFilter("Microsoft.AspNetCore.Antiforgery", LogLevel.Critical);

        var protection = builder.Services.AddDataProtection().SetApplicationName("GuideModes");
        if (DataFolder.TryPrepare(builder.Configuration, "keys") is { } keys) protection.PersistKeysToFileSystem(keys);
        else protection.UseEphemeralDataProtectionProvider();
    }

    public static void UseSafetyHeaders(this WebApplication app) => app.Use((context, next) =>
    {
        var headers = context.Response.Headers;
        headers.ContentSecurityPolicy = ContentPolicy;
        headers.XContentTypeOptions = "nosniff";
        headers["Referrer-Policy"] = "no-referrer";
        return next(context);
    });

    /// <summary>An error without a body gets one: a problem document for programs, a page for people.</summary>
    public static void UseFriendlyStatusPages(this WebApplication app)
    {
        app.UseWhen(IsForPrograms, programs => programs.UseStatusCodePages());
        app.UseWhen(context => !IsForPrograms(context), people => people.UseStatusCodePagesWithReExecute("/not-found", createScopeForStatusCodePages: true));
    }

    private static bool IsForPrograms(HttpContext context) =>
        context.Request.Path.StartsWithSegments("/api") || context.Request.Path.StartsWithSegments("/files");
}
