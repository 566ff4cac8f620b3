using System.Collections.Immutable;
using System.Text.Json.Serialization;
using GuideModes.Web.Components.Shared;
using GuideModes.Web.Solving;
using Microsoft.AspNetCore.Http.HttpResults;

namespace GuideModes.Web.Api;

/// <summary>The interface for programs: a guide document in, its modes out.</summary>
internal static class ModesApi
{
    private const int MostCoordinates = 20_000;

    public static IServiceCollection AddGuideModesApi(this IServiceCollection services) => services
        .AddProblemDetails()
        .ConfigureHttpJsonOptions(options => options.SerializerOptions.NumberHandling = JsonNumberHandling.Strict)
        .AddOpenApi("v1", OpenApiText.Describe);

    public static void MapModesApi(this IEndpointRouteBuilder routes) => routes.MapPost("/api/v1/modes", SolveAsync)
        .WithName("SolveModes")
        .WithTags("Modes")
        .WithSummary("The guided modes of a planar guide, from two independent engines.")
        .Produces<HttpValidationProblemDetails>(StatusCodes.Status400BadRequest, "application/problem+json")
        .ProducesProblem(StatusCodes.Status413PayloadTooLarge)
        .ProducesProblem(StatusCodes.Status422UnprocessableEntity)
        .DisableAntiforgery();

    private static async Task<Results<Ok<ModesAnswer>, ProblemHttpResult>> SolveAsync(HttpRequest request, SolveService solver, string? fields = null, string? xUm = null)
    {
        if (!TryReadFields(fields, xUm, out var asked, out var fault)) return Problems.Faults([fault!]);
        var body = await GuideBody.ReadAsync(request);
        if (body.Problem is { } problem) return problem;
        try
        {
            return TypedResults.Ok(await solver.SolveAsync(
                body.Guide!, (answer, cancellation) => AnswerBuilder.Build(answer, asked, cancellation), request.HttpContext.RequestAborted));
        }
        catch (WorkBudgetException e)
        {
            return Problems.TooMuch(e);
        }
    }

    private static bool TryReadFields(string? fields, string? xUm, out FieldRequest? asked, out Fault? fault)
    {
        asked = null;
        fault = null;
        if (fields is { Length: > 0 } && !bool.TryParse(fields, out _))
        {
            fault = new("?fields", "The option fields is true or false.");
            return false;
        }

        if (!bool.TryParse(fields, out var wanted) || !wanted) return true;
        asked = new FieldRequest();
        if (xUm is null) return true;
        var coordinates = ImmutableArray.CreateBuilder<double>();
        foreach (var cell in xUm.Split(','))
        {
            if (!Quantity.TryParse(cell, out var x, out _) || (coordinates.Count > 0 && x < coordinates[^1]) || coordinates.Count == MostCoordinates)
            {
                fault = new("?xUm", $"The option xUm is a list of at most {MostCoordinates} ascending numbers (µm) parted by commas, such as 0,0.5,1.");
                return false;
            }

            coordinates.Add(x);
        }

        asked = new FieldRequest(coordinates.ToImmutable());
        return true;
    }
}
