using System.Collections.Immutable;

namespace GuideModes.Guides;

/// <summary>What came of reading a document: a guide, or the faults that keep it from being one.</summary>
public sealed record GuideReading(Guide? Guide, ImmutableArray<Fault> Faults);

/// <summary>The door: turns a guide document into a <see cref="Guide"/>, or says per field why it cannot be one.</summary>
public static class GuideReader
{
    /// <summary>Reads a document; never throws for what stands in it.</summary>
    public static GuideReading Read(GuideDocument document) => throw new NotImplementedException();
}
