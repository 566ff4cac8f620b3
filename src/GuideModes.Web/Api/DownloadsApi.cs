using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using GuideModes.Guides;
using GuideModes.Web.Components.Pages.Guides;
using GuideModes.Web.Solving;
using GuideModes.Web.State;
using Microsoft.AspNetCore.Mvc;
using Microsoft.Extensions.Options;

namespace GuideModes.Web.Api;

/// <summary>A guide's files, made by the same builder as the interface's answers and named by the same link as the page.</summary>
internal static class DownloadsApi
{
    public static void MapDownloads(this IEndpointRouteBuilder routes)
    {
        var files = routes.MapGroup("/files").ExcludeFromDescription();
        files.MapGet("/guide.json", ([AsParameters] Asked asked) => asked.WithGuide((body, stem) =>
            Task.FromResult(File(body.Document!.ToIndentedJson(), "application/json", $"{stem}.json"))));
        files.MapGet("/modes.csv", ([AsParameters] Asked asked) => asked.WithAnswer(null, (body, answer, stem) =>
            File(CsvFiles.Modes(body.Guide!, answer), "text/csv", $"{stem}-modes.csv")));
        files.MapGet("/fields.csv", ([AsParameters] Asked asked) => asked.WithAnswer(new(Orders: asked.Orders), (body, answer, stem) =>
            File(CsvFiles.Fields(body.Guide!, answer), "text/csv", $"{stem}-fields.csv")));
        files.MapGet("/everything.json", ([AsParameters] Asked asked) => asked.WithAnswer(new(), (body, answer, stem) =>
            File(Everything(body.Document!, answer, asked.Json.Value.SerializerOptions), "application/json", $"{stem}-everything.json")));
    }

    /// <summary>The guide document and all that was found, in one file.</summary>
    private static string Everything(GuideDocument document, ModesAnswer answer, JsonSerializerOptions options) => new JsonObject
    {
        ["schema"] = "guidemodes.everything/1",
        ["guide"] = JsonNode.Parse(document.ToString()),
        ["answer"] = JsonSerializer.SerializeToNode(answer, options),
    }.ToJsonString(new JsonSerializerOptions(options) { WriteIndented = true });

    private static IResult File(string text, string type, string name) =>
        Results.File(Encoding.UTF8.GetBytes(text), type + "; charset=utf-8", name);

    /// <summary>What every file is asked by: the guide as a link's query, and for fields the modes.</summary>
    internal sealed record Asked(
        [FromQuery(Name = "g")] string? G,
        [FromQuery(Name = "d")] string? D,
        [FromQuery(Name = "m")] string? M,
        GuideLinks Links,
        SolveService Solver,
        IOptions<Microsoft.AspNetCore.Http.Json.JsonOptions> Json,
        HttpContext Context)
    {
        /// <summary>The modes asked for; null for all.</summary>
        public ImmutableArray<int>? Orders => string.IsNullOrEmpty(M)
            ? null
            : [.. M.Split(',').Select(text => int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out var order) ? order : -1)];

        public async Task<IResult> WithGuide(Func<GuideBody, string, Task<IResult>> make)
        {
            if (!Links.TryRead(G, D, out var document))
                return Problems.Because(StatusCodes.Status400BadRequest, "The link holds no guide", "The link was cut short, or its draft was kept on another machine.");
            return await make(new GuideBody(document, null, null), FileNames.Stem(document.Text("name") ?? ""));
        }

        public Task<IResult> WithAnswer(FieldRequest? fields, Func<GuideBody, ModesAnswer, string, IResult> make) => WithGuide(async (asked, stem) =>
        {
            var body = GuideBody.Read(asked.Document!);
            if (body.Problem is { } problem) return problem;
            try
            {
                var answer = await Solver.SolveAsync(
                    body.Guide!, (solved, cancellation) => AnswerBuilder.Build(solved, fields, cancellation), Context.RequestAborted);
                return make(body, answer, stem);
            }
            catch (WorkBudgetException e)
            {
                return Problems.TooMuch(e);
            }
        });
    }
}
