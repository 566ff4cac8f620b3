using System.Collections.Immutable;
using BenchmarkDotNet.Attributes;
using GuideModes.Guides;
using GuideModes.Solvers;
using GuideModes.Solvers.Certification;
using GuideModes.Solvers.TransferMatrix;
using GuideModes.Solvers.Wkb;

namespace GuideModes.Benchmarks;

/// <summary>The two planar problems that the speed figures are stated for, and the door they come in by.</summary>
/// <remarks>
/// Before anything is timed the answers are compared: the 20 effective indices with the reference to 1e-10, and the
/// larger guide's count with 41. A fast wrong answer is not measured.
/// </remarks>
[MemoryDiagnoser]
[JsonExporterAttribute.Full]
public class PlanarBenchmarks
{
    private const string TwentyModes = "gauss-20-te";
    private const string FortyOneModes = "gauss-41-te";
    private const int SamplesPerField = 400;

    private readonly TransferMatrixSolver _transferMatrix = new();
    private readonly WkbSolver _wkb = new();
    private string _document = null!;
    private ModeProblem _twenty = null!;
    private Guide _fortyOne = null!;
    private ImmutableArray<double> _coordinates;

    [GlobalSetup]
    public void Setup()
    {
        _document = Reference.Document(TwentyModes);
        _twenty = Problem(Reference.Guide(TwentyModes));
        _fortyOne = Reference.Guide(FortyOneModes);
        _coordinates = Coordinates(_fortyOne);
        CheckTwentyModes();
        CheckFortyOneModes();
    }

    /// <summary>Every n_eff and n_g of the Gaussian with 20 TE modes, transfer matrix.</summary>
    [Benchmark]
    public TransferMatrixSolution TransferMatrixTwentyModes() => _transferMatrix.Solve(_twenty);

    /// <summary>The same guide by the WKB engine alone.</summary>
    [Benchmark]
    public WkbSolution WkbTwentyModes() => _wkb.Solve(_twenty);

    /// <summary>What a redraw of the page costs: both engines on 41 modes, and 400 samples of every field.</summary>
    [Benchmark]
    public double BothEnginesFortyOneModesWithFields()
    {
        var answer = GuideAnswer.Solve(_fortyOne);
        var fields = answer.Fields([.. answer.Modes.Select(mode => mode.Exact.Order)], _coordinates);
        return fields.Sum(field => field.Value[0]);
    }

    /// <summary>Parsing and checking a guide document.</summary>
    [Benchmark]
    public GuideReading ReadDocument() => GuideReader.Read(GuideDocument.Parse(_document));

    private static ModeProblem Problem(Guide guide) => new(guide.Profile, guide.Polarization);

    private static ImmutableArray<double> Coordinates(Guide guide)
    {
        var extent = guide.Profile.Extent;
        return [.. Enumerable.Range(0, SamplesPerField).Select(i => extent.Start + extent.Length * i / (SamplesPerField - 1))];
    }

    private void CheckTwentyModes()
    {
        var expected = Reference.EffectiveIndices("s29-gauss20-te");
        var found = _transferMatrix.Solve(_twenty).Modes.Select(mode => mode.EffectiveIndex.Value).ToArray();
        if (found.Length != expected.Length)
            throw new InvalidOperationException($"Found {found.Length} modes, the reference has {expected.Length}.");
        var worst = found.Zip(expected, (a, b) => Math.Abs(a - b)).Max();
        if (!(worst <= 1e-10)) throw new InvalidOperationException($"An effective index is off by {worst:E2}.");
    }

    private void CheckFortyOneModes()
    {
        var count = GuideAnswer.Solve(_fortyOne).Modes.Length;
        if (count != 41) throw new InvalidOperationException($"Found {count} modes instead of 41.");
    }
}
