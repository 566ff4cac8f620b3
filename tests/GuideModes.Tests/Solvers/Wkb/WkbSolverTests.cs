using System.Text.Json;
using GuideModes.Numerics;
using GuideModes.Profiles;
using GuideModes.Solvers;
using GuideModes.Solvers.Wkb;
using Xunit.Abstractions;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>
/// The asymptotic engine against the exact and the textbook asymptotic values of ReferenceData/modes.json (fields nEff, wkb1, wkb3; its
/// notes say how each was made) and against the closed forms named at each test.
/// </summary>
public class WkbSolverTests(ITestOutputHelper output)
{
    private static readonly WkbSolver Solver = new();

    public static TheoryData<string> PlanarIds() => [.. WkbCases.PlanarIds()];

    private static double? Number(JsonElement mode, string name) =>
        mode.TryGetProperty(name, out var v) && v.ValueKind == JsonValueKind.Number ? v.GetDouble() : null;

    private static JsonElement[] Expected(string id) =>
        [.. WkbCases.Find(id).GetProperty("expected").GetProperty("modes").EnumerateArray()];

    [Theory, MemberData(nameof(PlanarIds))]
    public void Solve_ReferenceGuide_FindsEveryModeAndCoversTheExactIndex(string id)
    {
        var solution = Solver.Solve(WkbCases.Problem(id));
        var expected = Expected(id);

        Assert.Equal(SearchOutcome.Complete, solution.Outcome);
        Assert.Equal(expected.Length, solution.Modes.Length);
        Assert.InRange(solution.ModeNumberAtCutoff, expected.Length, expected.Length + 1);
        foreach (var (mode, reference) in solution.Modes.Zip(expected))
        {
            var exact = Number(reference, "nEff")!.Value;
            output.WriteLine($"{mode.Order}: off {mode.EffectiveIndex.Value - exact:E2}, error {mode.EffectiveIndex.Error:E2}, order {mode.OrderKept}");
            Assert.True(mode.EffectiveIndex.Covers(exact), $"m={mode.Order}: off {mode.EffectiveIndex.Value - exact:E2}, error {mode.EffectiveIndex.Error:E2}");
            Assert.InRange(mode.EffectiveIndex.Error, 1e-13, 1e-3);
        }
    }

    /// <summary>The tolerance asked of the textbook value; reached: below 1e-14.</summary>
    [Theory, MemberData(nameof(PlanarIds))]
    public void Solve_ReferenceGuide_GivesTheTextbookFirstOrder(string id)
    {
        var solution = Solver.Solve(WkbCases.Problem(id));
        foreach (var (mode, reference) in solution.Modes.Zip(Expected(id)))
        {
            if (Number(reference, "wkb1") is { } first) Assert.Equal(first, mode.FirstOrderIndex!.Value, 1e-12);
            else if (reference.TryGetProperty("wkb1", out _)) Assert.Null(mode.FirstOrderIndex);
        }
    }

    /// <summary>The tolerance asked of Dunham's second order; reached: below 1e-12.</summary>
    [Theory]
    [InlineData("s07-parabola-trunc-te")]
    [InlineData("s08-parabola-wide-te")]
    [InlineData("s09-sech2-te")]
    [InlineData("s15-power4-te")]
    [InlineData("s17-buried-te")]
    public void Solve_SmoothWell_GivesDunhamsSecondOrder(string id)
    {
        var compared = 0;
        foreach (var (mode, reference) in Solver.Solve(WkbCases.Problem(id)).Modes.Zip(Expected(id)))
        {
            if (Number(reference, "wkb3") is not { } second) continue;
            Assert.Equal(second, mode.SecondOrderIndex!.Value, 1e-11);
            compared++;
        }

        Assert.True(compared > 2);
    }

    /// <summary>How much the second order wins where a diffused guide ends at an air cover: the median over its modes, both polarizations.</summary>
    [Theory]
    [InlineData("s11-gauss-air-te", 10)]
    [InlineData("s13-gauss-air-tm", 10)]
    [InlineData("s29-gauss20-te", 20)]
    [InlineData("s14-linear-te", 10)]
    [InlineData("s20-table-te", 10)]
    public void Solve_GuideUnderACover_SecondOrderIsMuchNearerThanFirst(string id, double gain)
    {
        var ratios = Solver.Solve(WkbCases.Problem(id)).Modes.Zip(Expected(id))
            .Where(p => p.First.FirstOrderIndex is not null)
            .Select(p => Math.Abs(p.First.FirstOrderIndex!.Value - Number(p.Second, "nEff")!.Value) / Math.Abs(p.First.EffectiveIndex.Value - Number(p.Second, "nEff")!.Value))
            .Order().ToArray();
        output.WriteLine($"median gain {ratios[ratios.Length / 2]:F1}");
        Assert.True(ratios[ratios.Length / 2] > gain);
    }

    /// <summary>−u″ + x⁴u = Eu: Bender and Orszag (1978), §10.7; orders 0, 2 and 4 recomputed with mpmath, 11 digits.</summary>
    [Theory]
    [InlineData(0, 0.867145326485, 0.98076629031, null)]
    [InlineData(1, 3.75191992355, 3.81032995095, 3.80837726084)]
    [InlineData(2, 7.41398825281, 7.45579567876, 7.4552824476)]
    [InlineData(4, 16.2336146927, 16.2619367438, 16.2618285616)]
    [InlineData(6, 26.5063355110, 26.5285125518, 26.5284718733)]
    [InlineData(8, 37.9044718451, 37.9230211405, 37.9230012294)]
    [InlineData(10, 50.2401523192, 50.2562659320, 50.2562545929)]
    public void Solve_QuarticWell_GivesThePublishedOrders(int m, double first, double second, double? fourth)
    {
        const double top = 400;
        var well = new JetPiece(new(-4, 4), x => top - WkbCases.Sqr(WkbCases.Sqr(x)));
        var mode = Solver.Solve(WkbCases.Problem(Math.Tau, 12, 12, well)).Modes[m];
        double Energy(double index) => top - index * index;

        const string Source = "Bender & Orszag 1978, recomputed";
        Deviation.Record($"WKB orders of the x⁴ well, first, m={m}", Source, first, Energy(mode.FirstOrderIndex!.Value), 2e-10);
        Deviation.Record($"WKB orders of the x⁴ well, second, m={m}", Source, second, Energy(mode.SecondOrderIndex!.Value), 2e-10);
        Assert.Equal(fourth is null ? 2 : 4, mode.OrderKept);
        if (fourth is { } value) Deviation.Record($"WKB orders of the x⁴ well, fourth, m={m}", Source, value, Energy(mode.EffectiveIndex.Value), 1e-9);
    }

    /// <summary>sech²(x/a): the second-order term is 1/(8V) exactly, Bender, Olaussen and Wang (1977); exact b = ((s − m)/V)², s = (√(1 + 4V²) − 1)/2.</summary>
    [Fact]
    public void Solve_SechSquared_SecondOrderShiftsThePhaseByOneEighthOverV()
    {
        const double v = 6, baseIndex = 1.5;
        var contrast = v * v / 16;
        var well = new JetPiece(new(-80, 80), x => (baseIndex * baseIndex) + contrast * WkbCases.SechSquared(x / 4));
        var modes = Solver.Solve(WkbCases.Problem(Math.Tau, baseIndex, baseIndex, well)).Modes;
        Assert.Equal(6, modes.Length);
        var s = (Math.Sqrt(1 + 4 * v * v) - 1) / 2;
        foreach (var mode in modes)
        {
            var n = mode.SecondOrderIndex!.Value;
            Assert.Equal(v + 1 / (8 * v) - mode.Order - 0.5, 4 * Math.Sqrt(n * n - baseIndex * baseIndex), 1e-8);
            Assert.True(mode.EffectiveIndex.Covers(Math.Sqrt(baseIndex * baseIndex + contrast * Math.Pow((s - mode.Order) / v, 2))));
        }
    }

    private static ModeProblem Exponential(double v, double a)
    {
        const double contrast = 0.2, substrate = 2.25;
        var depth = v / Math.Sqrt(contrast);
        return WkbCases.Problem(
            Math.Tau, Math.Sqrt(substrate - a * contrast), Math.Sqrt(substrate),
            new JetPiece(new(0, 40 * depth), x => substrate + contrast * WkbCases.Exp(-(x / depth))));
    }

    /// <summary>Exponential half-space: arctan surface phase (recomputed) and exact b from Bessel functions, Conwell, Appl. Phys. Lett. 23 (1973) 328.</summary>
    [Theory]
    [InlineData(1.0, 0, 0.389864322059, 0.391518316710711)]
    [InlineData(1.0, 1, 0.0808304193537, 0.0817321128403868)]
    [InlineData(1.0, 2, 0.000135900195842, 0.000170705344844)]
    [InlineData(40.0, 0, 0.317464392129, 0.313510496638578)]
    [InlineData(40.0, 1, 0.0519240299966, 0.0512789757094012)]
    public void Solve_ExponentialHalfSpace_GivesThePublishedValues(double a, int m, double first, double exact)
    {
        const double substrate = 2.25;
        var contrast = a > 10 ? 0.03 : 0.2;
        var depth = 4 / Math.Sqrt(contrast);
        var problem = WkbCases.Problem(
            Math.Tau, Math.Sqrt(substrate - a * contrast), Math.Sqrt(substrate),
            new JetPiece(new(0, 40 * depth), x => substrate + contrast * WkbCases.Exp(-(x / depth))));
        var mode = Solver.Solve(problem).Modes[m];
        double B(double n) => (n * n - substrate) / contrast;

        Assert.Equal(first, B(mode.FirstOrderIndex!.Value), 1e-11);
        Assert.True(mode.EffectiveIndex.Covers(Math.Sqrt(substrate + contrast * exact)));
    }

    /// <summary>n² = 1.512² + (1.602² − 1.512²)e^(−x/2), air, λ 0.6328 µm, TE: arctan surface phase recomputed to 8 decimals; exact by Conwell (1973).</summary>
    [Fact]
    public void Solve_PhysicalExponential_GivesThePublishedValues()
    {
        double[] first = [1.56718880, 1.54483873, 1.53093054, 1.52185632, 1.51616229, 1.51304937, 1.51200563];
        double[] exact = [1.56699104465999, 1.54479537657874, 1.53091521653674, 1.52184995742489, 1.51615953545629, 1.51304831634831, 1.5120055654541];
        var (low, high) = (1.512 * 1.512, 1.602 * 1.602);
        var modes = Solver.Solve(WkbCases.Problem(0.6328, 1, 1.512, new JetPiece(new(0, 75), x => low + (high - low) * WkbCases.Exp(-(x / 2))))).Modes;

        Assert.Equal(7, modes.Length);
        for (var m = 0; m < 7; m++)
        {
            Assert.Equal(first[m], modes[m].FirstOrderIndex!.Value, 6e-9);
            Assert.True(modes[m].EffectiveIndex.Covers(exact[m]), $"m={m}");
            output.WriteLine($"{m}: first off {first[m] - exact[m]:E2}, best off {modes[m].EffectiveIndex.Value - exact[m]:E2}");
            Assert.True(Math.Abs(modes[m].EffectiveIndex.Value - exact[m]) < 0.2 * Math.Abs(first[m] - exact[m]) + 1e-9);
        }
    }

    /// <summary>A mode 1e-9 above cutoff: V from the closed phase integral 2V(√(1 − b) − √b·arctan√((1 − b)/b)) of the exponential.</summary>
    [Fact]
    public void Solve_ModeNextToCutoff_IsFound()
    {
        const double contrast = 0.2, substrate = 2.25, a = 1;
        var b = 2 * 1.5 * 1e-9 / contrast;
        var v = (3.25 * Math.PI + Math.Atan(Math.Sqrt((b + a) / (1 - b)))) / (2 * (Math.Sqrt(1 - b) - Math.Sqrt(b) * Math.Atan(Math.Sqrt((1 - b) / b))));
        var mode = Solver.Solve(Exponential(v, a)).Modes[3];
        Assert.Equal(b, (mode.FirstOrderIndex!.Value * mode.FirstOrderIndex.Value - substrate) / contrast, 1e-3 * b);
    }

    /// <summary>f = 1 − x, V = 8: exact b from Airy functions, Marcuse, IEEE J. Quantum Electron. 9 (1973) 1000.</summary>
    [Theory]
    [InlineData(1.0, 0, 0.507649411460594)]
    [InlineData(1.0, 1, 0.0856662793965395)]
    [InlineData(40.0, 0, 0.435204736125931)]
    [InlineData(40.0, 1, 0.0255886701876488)]
    public void Solve_LinearTaper_CoversTheExactValue(double a, int m, double exact)
    {
        const double contrast = 0.03, substrate = 2.25;
        var depth = 8 / Math.Sqrt(contrast);
        var problem = WkbCases.Problem(Math.Tau, Math.Sqrt(substrate - a * contrast), Math.Sqrt(substrate), new JetPiece(new(0, depth), x => substrate + contrast * (1 - x / depth)));
        var mode = Solver.Solve(problem).Modes[m];
        Assert.True(mode.EffectiveIndex.Covers(Math.Sqrt(substrate + contrast * exact)));
    }

    [Fact]
    public void Solve_TwoEqualWells_QuantisesEachAndFlagsThePair()
    {
        var modes = Solver.Solve(WkbCases.Problem("s18-coupler-te")).Modes;

        Assert.All(modes, m => Assert.Equal(2, m.WellCount));
        Assert.All(modes, m => Assert.True(m.IsNearDegenerate));
        Assert.Equal([0, 1, 0, 1], modes.Select(m => m.Well));
        Assert.Equal([0, 0, 1, 1], modes.Select(m => m.OrderInWell));
        var gamma = Math.Tau / 1.55 * Math.Sqrt(Math.Pow(modes[0].EffectiveIndex.Value, 2) - 1.444 * 1.444);
        Assert.Equal(Math.Exp(-2 * gamma * 22), modes[0].BarrierTransparency!.Value, 1e-9 * modes[0].BarrierTransparency!.Value);
    }

    /// <summary>Two smooth wells that join: every mode number comes once and in order.</summary>
    [Fact]
    public void Solve_WellsThatJoin_CountsOn()
    {
        var well = new JetPiece(new(-30, 30), x => 2.25 + 0.1 * (WkbCases.SechSquared((x - 4) / 3) + WkbCases.SechSquared((x + 4.5) / 3)));
        var modes = Solver.Solve(WkbCases.Problem(1, 1.5, 1.5, well)).Modes;

        Assert.Equal(Enumerable.Range(0, modes.Length), modes.Select(m => m.Order));
        Assert.Contains(modes, m => m.WellCount == 2);
        Assert.Contains(modes, m => m.WellCount == 1);
        Assert.Equal(modes.Select(m => m.EffectiveIndex.Value).OrderDescending(), modes.Select(m => m.EffectiveIndex.Value));
    }

    /// <summary>Identity: all lengths and the wavelength times three leave n_eff.</summary>
    [Fact]
    public void Solve_ScaledGuide_HasTheSameIndices()
    {
        ModeProblem At(double s) => WkbCases.Problem(0.6328 * s, 1, 1.51, new JetPiece(new(0, 31 * s), x => WkbCases.Sqr(1.51 + 0.05 * WkbCases.Exp(-WkbCases.Sqr(x / (5 * s))))));
        foreach (var (a, b) in Solver.Solve(At(1)).Modes.Zip(Solver.Solve(At(3)).Modes))
            Assert.Equal(a.EffectiveIndex.Value, b.EffectiveIndex.Value, 1e-9);
    }

    /// <summary>Identity: the mirror image has the same n_eff.</summary>
    [Fact]
    public void Solve_MirroredGuide_HasTheSameIndices()
    {
        var original = WkbCases.Problem(0.6328, 1, 1.51, new JetPiece(new(0, 31), x => WkbCases.Sqr(1.51 + 0.05 * WkbCases.Exp(-WkbCases.Sqr(x / 5)))));
        var mirrored = WkbCases.Problem(0.6328, 1.51, 1, new JetPiece(new(-31, 0), x => WkbCases.Sqr(1.51 + 0.05 * WkbCases.Exp(-WkbCases.Sqr(x / 5)))));
        foreach (var (a, b) in Solver.Solve(original).Modes.Zip(Solver.Solve(mirrored).Modes))
            Assert.Equal(a.EffectiveIndex.Value, b.EffectiveIndex.Value, 1e-9);
    }

    /// <summary>Property: any pile of layers and graded pieces is answered, in order, at once, and its fields are finite.</summary>
    [Fact]
    public void Solve_RandomGuides_AnswersInOrder()
    {
        var random = new Random(20260101);
        for (var trial = 0; trial < 300; trial++)
        {
            var (x, pieces) = (0.0, new List<SmoothPiece>());
            for (var i = random.Next(1, 6); i > 0; i--)
            {
                var next = x + Math.Pow(10, random.NextDouble() * 2.5 - 1);
                pieces.Add(RandomPiece(random, x, next));
                x = next;
            }

            var polarization = random.Next(2) == 0 ? Polarization.TE : Polarization.TM;
            var problem = WkbCases.Problem(0.4 + 1.2 * random.NextDouble(), 1 + 0.5 * random.NextDouble(), 1.5, [.. pieces]) with { Polarization = polarization };
            var watch = System.Diagnostics.Stopwatch.StartNew();
            var solution = Solver.Solve(problem);
            Assert.True(watch.ElapsedMilliseconds < 3000, $"trial {trial} took {watch.ElapsedMilliseconds} ms for {solution.Modes.Length} modes");
            Assert.True(double.IsFinite(solution.ModeNumberAtCutoff));
            var last = double.PositiveInfinity;
            foreach (var mode in solution.Modes)
            {
                Assert.InRange(mode.EffectiveIndex.Value, 1.5, last);
                Assert.True(mode.EffectiveIndex.Error >= 1e-13 && double.IsFinite(mode.EffectiveIndex.Error), $"trial {trial} mode {mode.Order} error {mode.EffectiveIndex.Error}");
                last = mode.EffectiveIndex.Value;
                var field = Solver.Field(problem, mode, [-1, 0, x / 3, x / 2, x, x + 1]);
                Assert.All(field.Value, v => Assert.True(double.IsFinite(v), $"trial {trial} mode {mode.Order}"));
            }
        }
    }

    private static SmoothPiece RandomPiece(Random random, double from, double to)
    {
        var (a, b, c) = (2 + random.NextDouble(), random.NextDouble() - 0.5, random.NextDouble() * 3 + 0.1);
        var centre = from + (to - from) * random.NextDouble();
        return random.Next(4) switch
        {
            0 => new UniformPiece(new(from, to), 0, Jet.Constant(a)),
            1 => new JetPiece(new(from, to), x => a + b * (x - from) / (to - from)),
            2 => new JetPiece(new(from, to), x => a + b * WkbCases.Exp(-WkbCases.Sqr((x - centre) / c))),
            _ => new JetPiece(new(from, to), x => 2.25 + 0.5 * WkbCases.SechSquared((x - centre) / c)),
        };
    }

    [Fact]
    public void Solve_NoWell_GivesNothingAndIsComplete()
    {
        var solution = Solver.Solve(WkbCases.Problem(1, 1.5, 1.5, new UniformPiece(new(0, 5), 0, Jet.Constant(2.2))));
        Assert.Empty(solution.Modes);
        Assert.Equal(SearchOutcome.Complete, solution.Outcome);
    }

    [Fact]
    public void Solve_MoreModesThanAllowed_SaysSo() =>
        Assert.Equal(SearchOutcome.TooManyModes, (Solver with { MostModes = 5 }).Solve(WkbCases.Problem("s11-gauss-air-te")).Outcome);

    [Fact]
    public void Solve_Cancelled_Throws()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => Solver.Solve(WkbCases.Problem("s11-gauss-air-te"), source.Token));
    }
}
