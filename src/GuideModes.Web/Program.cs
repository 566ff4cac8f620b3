using GuideModes.Web;
using GuideModes.Web.Api;
using GuideModes.Web.Components;
using GuideModes.Web.Components.Pages.Guides;
using GuideModes.Web.Solving;
using GuideModes.Web.State;
using MudBlazor.Services;

var builder = WebApplication.CreateBuilder(Hosting.Options(args));
builder.UseOwnDefaults();

builder.Services.AddRazorComponents().AddInteractiveServerComponents();
builder.Services.AddMudServices();
builder.Services.AddGuideModesApi();
builder.Services.AddSingleton<SolveService>();
builder.Services.AddSingleton<DraftStore>();
builder.Services.AddSingleton<GuideLinks>();
builder.Services.AddScoped<GuideSession>();

var app = builder.Build();
app.UseSafetyHeaders();
app.UseExceptionHandler();
app.UseFriendlyStatusPages();
app.UseAntiforgery();
app.MapStaticAssets();
app.MapOpenApi();
app.MapModesApi();
app.MapDownloads();
app.MapGet("/health/live", () => Results.Text("live")).ExcludeFromDescription();
app.MapRazorComponents<App>().AddInteractiveServerRenderMode();
app.Run();

public partial class Program;
