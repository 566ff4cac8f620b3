namespace GuideModes;

/// <summary>One thing wrong with an input: where it stands, and a sentence that says what is wrong and what is allowed.</summary>
/// <param name="Path">The JSON path of the field, such as <c>regions[0].index.depthUm</c>.</param>
/// <param name="Message">A sentence for the person who typed it.</param>
public sealed record Fault(string Path, string Message);
