using System.Text.Json;

namespace GuideModes.Guides;

/// <summary>What a law's parameter is.</summary>
public enum LawParameterKind
{
    /// <summary>A length or coordinate, µm.</summary>
    Length,

    /// <summary>An index: a number, a material or a formula in lambda.</summary>
    Index,

    /// <summary>An index difference: a number or a formula in lambda.</summary>
    IndexDifference,

    /// <summary>A pure number.</summary>
    Number,

    /// <summary>A formula in x and lambda.</summary>
    Formula,

    /// <summary>A list of points [x in µm, n].</summary>
    Points,

    /// <summary>One of a few words.</summary>
    Choice,
}

/// <summary>A parameter of an index law, as the reader checks it and an editor offers it.</summary>
/// <param name="Name">Its field in the guide document.</param>
/// <param name="Label">What people read beside it.</param>
/// <param name="Kind">What it is.</param>
/// <param name="Range">The numbers allowed; for points, those of n; not used by a formula or a choice.</param>
/// <param name="Default">What a new region starts with; also what holds where an optional field is left out.</param>
/// <param name="IsRequired">False if the field may be left out.</param>
public sealed record LawParameter(string Name, string Label, LawParameterKind Kind, NumberRange Range, JsonElement Default, bool IsRequired)
{
    /// <summary>The words allowed, for a choice; else empty.</summary>
    public IReadOnlyList<string> Choices { get; init; } = [];

    public string Unit => Range.Unit;

    /// <summary>What the field asks for, in words.</summary>
    public string Expected => Kind switch
    {
        LawParameterKind.Index => "an index: a number from 1 to 10, { \"material\": \"fused-silica\" } or { \"formula\": \"…\" } in lambda",
        LawParameterKind.IndexDifference => "an index difference: a number from -9 to 9, or { \"formula\": \"…\" } in lambda",
        LawParameterKind.Formula => "a formula in x and lambda, as text",
        LawParameterKind.Points => "a list of at least two points [x in µm, n] with ascending x",
        LawParameterKind.Choice => $"one of {string.Join(", ", Choices)}",
        _ => Range.Description,
    };
}
