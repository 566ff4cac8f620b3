using GuideModes.Web.Solving;
using Microsoft.AspNetCore.Http.HttpResults;

namespace GuideModes.Web.Api;

/// <summary>Refusals as problem documents (RFC 9457).</summary>
internal static class Problems
{
    /// <summary>400, with <c>errors</c> from the JSON path of each fault to its sentences.</summary>
    public static ProblemHttpResult Faults(IEnumerable<Fault> faults) => TypedResults.Problem(new HttpValidationProblemDetails(
        faults.GroupBy(fault => fault.Path.Length == 0 ? "$" : fault.Path).ToDictionary(group => group.Key, group => group.Select(fault => fault.Message).ToArray()))
    {
        Status = StatusCodes.Status400BadRequest,
        Title = "The guide cannot be solved as it is written",
        Detail = "Each entry of errors names a place in the document and says what is wrong there and what is allowed.",
    });

    public static ProblemHttpResult Because(int status, string title, string detail) =>
        TypedResults.Problem(detail, statusCode: status, title: title);

    public static ProblemHttpResult TooMuch(WorkBudgetException e) =>
        Because(StatusCodes.Status422UnprocessableEntity, "The guide asks for too much work", e.Message);
}
