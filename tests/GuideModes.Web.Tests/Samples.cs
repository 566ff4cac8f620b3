using GuideModes.Guides;
using GuideModes.Solvers.Certification;

namespace GuideModes.Web.Tests;

/// <summary>Guides that the tests of this project share.</summary>
internal static class Samples
{
    /// <summary>Case s01 of tests/GuideModes.Tests/ReferenceData/modes.json: a symmetric step slab with four TE modes.</summary>
    public const string Slab =
        """
        {"schema":"guidemodes.guide/1","name":"Slab","geometry":"planar","wavelengthUm":1.0,"polarization":"TE","cover":{"n":1.45},"regions":[{"thicknessUm":4.0,"index":{"law":"uniform","n":1.5}}],"substrate":{"n":1.45}}
        """;

    /// <summary>n_eff of the slab's TE0, from the same file (exact characteristic equation in 34 digits).</summary>
    public const double SlabFirst = 1.4964371523633422;

    /// <summary>A film too thin for an asymmetric guide's first mode (cutoff by Kogelnik &amp; Ramaswamy 1974: V must exceed arctan √a).</summary>
    public const string Nothing =
        """
        {"schema":"guidemodes.guide/1","name":"Thin","geometry":"planar","wavelengthUm":1.0,"polarization":"TE","cover":{"n":1.0},"regions":[{"thicknessUm":0.05,"index":{"law":"uniform","n":1.5}}],"substrate":{"n":1.45}}
        """;

    public const string TwoRegions =
        """
        {"schema":"guidemodes.guide/1","name":"Two","geometry":"planar","wavelengthUm":0.6328,"polarization":"TE","cover":{"n":1.0},"regions":[{"thicknessUm":2.0,"index":{"law":"uniform","n":1.53}},{"thicknessUm":null,"index":{"law":"gaussian","nBase":1.51,"deltaN":0.05,"depthUm":5.0,"centerUm":2.0}}],"substrate":{"n":1.51}}
        """;

    public static GuideDocument Document(string json) => GuideDocument.Parse(json);

    public static GuideAnswer Solve(string json) => GuideAnswer.Solve(GuideReader.Read(Document(json)).Guide!);
}
