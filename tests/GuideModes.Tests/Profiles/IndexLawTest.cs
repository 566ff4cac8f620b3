using GuideModes.Numerics;
using GuideModes.Profiles;

namespace GuideModes.Tests.Profiles;

/// <summary>Every law's pieces against its formula, written out here a second time with System.Math alone.</summary>
public sealed class IndexLawTest
{
    private static readonly Wavelength At = Wavelength.FromMicrometres(0.8);

    private static readonly Interval Extent = new(1, 9);

    public static TheoryData<string, IndexLaw, Func<double, double>> Laws()
    {
        const GradedQuantity n = GradedQuantity.Index;
        const GradedQuantity n2 = GradedQuantity.IndexSquared;
        var rise = (1.55 * 1.55) - (1.5 * 1.5);
        return new()
        {
            { "uniform", new UniformLaw(1.5), _ => 1.5 * 1.5 },
            { "linear n", new LinearLaw(n, 1.55, 1.5), x => Square(1.55 - 0.05 * (x - 1) / 8) },
            { "linear n2", new LinearLaw(n2, 1.55, 1.5), x => 1.55 * 1.55 - rise * (x - 1) / 8 },
            { "power 2", new PowerLaw(n2, 1.55, 1.5, 4, 2, 5), x => 1.55 * 1.55 - rise * Square((x - 5) / 4) },
            { "power 4", new PowerLaw(n2, 1.55, 1.5, 4, 4, 5), x => 1.55 * 1.55 - rise * Square(Square((x - 5) / 4)) },
            { "power 2.1", new PowerLaw(n2, 1.55, 1.5, 4, 2.1, 5), x => 1.55 * 1.55 - rise * Math.Pow(Math.Abs(x - 5) / 4, 2.1) },
            { "power 1 n", new PowerLaw(n, 1.55, 1.5, 4, 1, 5), x => Square(1.55 - 0.05 * Math.Abs(x - 5) / 4) },
            { "power 3 off", new PowerLaw(n2, 1.55, 1.5, 20, 3, -5), x => 1.55 * 1.55 - rise * Math.Pow((x + 5) / 20, 3) },
            { "gaussian n", new GaussianLaw(n, 1.5, 0.05, 2, 3), x => Square(1.5 + 0.05 * Math.Exp(-Square((x - 3) / 2))) },
            { "gaussian n2", new GaussianLaw(n2, 1.5, 0.05, 2, 3), x => 1.5 * 1.5 + rise * Math.Exp(-Square((x - 3) / 2)) },
            { "exponential n", new ExponentialLaw(n, 1.5, 0.05, 2, 1), x => Square(1.5 + 0.05 * Math.Exp(-(x - 1) / 2)) },
            { "exponential n2", new ExponentialLaw(n2, 1.5, 0.05, 2, 1), x => 1.5 * 1.5 + rise * Math.Exp(-(x - 1) / 2) },
            { "erfc n", new ErfcLaw(n, 1.5, 0.05, 2, 3), x => Square(1.5 + 0.05 * MathNet.Numerics.SpecialFunctions.Erfc((x - 3) / 2)) },
            { "erfc n2", new ErfcLaw(n2, 1.5, 0.05, 2, 3), x => 1.5 * 1.5 + rise * MathNet.Numerics.SpecialFunctions.Erfc((x - 3) / 2) },
            { "sech2 n", new SechSquaredLaw(n, 1.5, 0.05, 2, 3), x => Square(1.5 + 0.05 / Square(Math.Cosh((x - 3) / 2))) },
            { "sech2 n2", new SechSquaredLaw(n2, 1.5, 0.05, 2, 3), x => 1.5 * 1.5 + rise / Square(Math.Cosh((x - 3) / 2)) },
            { "fermi n", new FermiLaw(n, 1.5, 0.05, 3, 0.5), x => Square(1.5 + 0.05 / (1 + Math.Exp((x - 3) / 0.5))) },
            { "fermi n2", new FermiLaw(n2, 1.5, 0.05, 3, 0.5), x => 1.5 * 1.5 + rise / (1 + Math.Exp((x - 3) / 0.5)) },
            { "formula n", new FormulaLaw(n, Formula.Parse("1.5 + 0.05*exp(-x)/lambda", "x")), x => Square(1.5 + 0.05 * Math.Exp(-x) / 0.8) },
            { "formula n2", new FormulaLaw(n2, Formula.Parse("2.25 + 0.05*exp(-x)", "x")), x => 2.25 + 0.05 * Math.Exp(-x) },
            { "formula branches", new FormulaLaw(n, Formula.Parse("1.5 + 0.01*max(0, 1 - abs(x-4)/2)", "x")), x => Square(1.5 + 0.01 * Math.Max(0, 1 - Math.Abs(x - 4) / 2)) },
            { "table n", new TableLaw(n, TableInterpolation.Linear, [new(0, 1.5), new(4, 1.54), new(9, 1.51)]), x => Square(x < 4 ? 1.5 + 0.01 * x : 1.54 - 0.006 * (x - 4)) },
            { "table n2", new TableLaw(n2, TableInterpolation.Linear, [new(0, 1.5), new(9, 1.55)]), x => 1.5 * 1.5 + rise * x / 9 },
        };
    }

    [Theory]
    [MemberData(nameof(Laws))]
    public void Pieces_OfEachLaw_AreItsFormula(string name, IndexLaw law, Func<double, double> indexSquared)
    {
        foreach (var piece in Pieces(law))
        {
            foreach (var x in Samples(piece))
            {
                var expected = indexSquared(x);
                Assert.True(Math.Abs(piece.IndexSquared(x) - expected) <= 6e-16 * expected, $"{name} at {x}: {piece.IndexSquared(x) - expected:E2}");
                Assert.Equal(piece.IndexSquared(x), piece.Jet(x).Value, 4e-16 * expected);
            }
        }
    }

    /// <summary>The first derivative by a central difference of order h⁴, the second and third by differences of the jet one order lower.</summary>
    [Theory]
    [MemberData(nameof(Laws))]
    public void Jets_OfEachLaw_AreTheDerivatives(string name, IndexLaw law, Func<double, double> indexSquared)
    {
        _ = indexSquared;
        foreach (var piece in Pieces(law))
        {
            for (var i = 1; i < 8; i++)
            {
                var x = piece.Extent.Start + piece.Extent.Length * i / 8;
                var h = 1e-3 * piece.Extent.Length;
                double Slope(Func<double, double> f) => (8 * (f(x + h) - f(x - h)) - (f(x + 2 * h) - f(x - 2 * h))) / (12 * h);
                var jet = piece.Jet(x);
                AssertClose(Slope(piece.IndexSquared), jet.D1, name);
                AssertClose(Slope(at => piece.Jet(at).D1), jet.D2, name);
                AssertClose(Slope(at => piece.Jet(at).D2), jet.D3, name);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Laws))]
    public void Pieces_OfEachLaw_FillTheStretch(string name, IndexLaw law, Func<double, double> indexSquared)
    {
        _ = indexSquared;
        var pieces = Pieces(law);
        Assert.True(Extent.Start == pieces[0].Extent.Start && Extent.End == pieces[^1].Extent.End, name);
        for (var i = 1; i < pieces.Length; i++) Assert.Equal(pieces[i - 1].Extent.End, pieces[i].Extent.Start);
        Assert.All(pieces, piece => Assert.Equal(3, piece.Region));
    }

    [Theory]
    [InlineData(2, 1)]
    [InlineData(4, 1)]
    [InlineData(2.1, 2)]
    [InlineData(1, 2)]
    [InlineData(3, 2)]
    public void Pieces_OfAPower_SplitAtTheCentreUnlessItIsSmooth(double alpha, int count) =>
        Assert.Equal(count, Pieces(new PowerLaw(GradedQuantity.IndexSquared, 1.55, 1.5, 4, alpha, 5)).Length);

    [Fact]
    public void Jets_OfATriangleAtItsTip_BelongToTheirSide()
    {
        var pieces = Pieces(new PowerLaw(GradedQuantity.IndexSquared, 1.55, 1.5, 4, 1, 5));
        var slope = (1.55 * 1.55 - 1.5 * 1.5) / 4;
        Assert.Equal(slope, pieces[0].Jet(5).D1, 1e-15);
        Assert.Equal(-slope, pieces[1].Jet(5).D1, 1e-15);
    }

    [Fact]
    public void Pieces_OfAFormula_SplitWhereItsBranchesChange()
    {
        var pieces = Pieces(new FormulaLaw(GradedQuantity.Index, Formula.Parse("1.5 + 0.01*max(0, 1 - abs(x-4)/2) + 0.001*abs(x-3.3)", "x")));

        Assert.Equal([1, 2, 3.3, 4, 6], pieces.Select(piece => Math.Round(piece.Extent.Start, 12)));
        Assert.Equal(2 * 1.5107 * -0.004, pieces[3].Jet(4).D1, 1e-12);   // 1 − (x − 4)/2 and x − 3.3: slopes −0.005 and +0.001 right of the tip
        Assert.Equal(2 * 1.5107 * 0.006, pieces[2].Jet(4).D1, 1e-12);
    }

    [Fact]
    public void Pieces_OfAFormulaThatOnlyTouchesItsBranch_HaveNoSliver()
    {
        var pieces = Pieces(new FormulaLaw(GradedQuantity.Index, Formula.Parse("1.5 + 0.001*abs(x-4) + 0.001*max(x, 4)", "x")));
        Assert.All(pieces, piece => Assert.True(piece.Extent.Length > 1e-6));
        Assert.Equal(2, pieces.Length);
    }

    [Theory]
    [InlineData("1.5 + 0.01*sqrt((x-4)^2)")]
    [InlineData("1.5 + 0.01*((x-4)^2)^1.5")]
    public void Pieces_OfARootThatTouchesZero_SplitThere(string text) =>
        Assert.Equal([1, 4], Pieces(new FormulaLaw(GradedQuantity.Index, Formula.Parse(text, "x"))).Select(piece => piece.Extent.Start));

    [Fact]
    public void Pieces_OfATable_AreOnePerInterval()
    {
        var table = new TableLaw(GradedQuantity.Index, TableInterpolation.MonotoneCubic, [new(0, 1.5), new(1, 1.51), new(4, 1.54), new(9, 1.5)]);
        Assert.Equal([1, 4], Pieces(table).Select(piece => piece.Extent.Start));
    }

    /// <summary>
    /// Fritsch &amp; Butland's weighted harmonic mean on equidistant points is the harmonic mean 2·d₀·d₁/(d₀ + d₁) of the secants; at the ends the
    /// three-point formula (3 d₀ − d₁)/2. Worked by hand for 1.50, 1.51, 1.53, 1.54: slopes 0.005, 0.04/3, 0.04/3, 0.005 per µm.
    /// </summary>
    [Fact]
    public void Jets_OfAMonotoneCubic_HaveTheSlopesOfTheMethod()
    {
        var table = new TableLaw(GradedQuantity.Index, TableInterpolation.MonotoneCubic, [new(1, 1.5), new(2, 1.51), new(3, 1.53), new(4, 1.54)]);
        var pieces = table.Pieces(new(1, 4), 3, At).ToArray();
        double SlopeOfIndex(SmoothPiece piece, double x) => piece.Jet(x).D1 / (2 * Math.Sqrt(piece.IndexSquared(x)));

        Assert.Equal(0.005, SlopeOfIndex(pieces[0], 1), 1e-15);
        Assert.Equal(0.04 / 3, SlopeOfIndex(pieces[0], 2), 1e-15);
        Assert.Equal(0.04 / 3, SlopeOfIndex(pieces[1], 2), 1e-15);
        Assert.Equal(0.04 / 3, SlopeOfIndex(pieces[2], 3), 1e-15);
        Assert.Equal(0.005, SlopeOfIndex(pieces[2], 4), 1e-15);
    }

    [Fact]
    public void IndexSquared_OfAMonotoneCubic_NeverOvershoots()
    {
        var random = new Random(3);
        for (var trial = 0; trial < 200; trial++)
        {
            var x = 0.0;
            TablePoint[] points = [.. Enumerable.Range(0, 12).Select(_ => new TablePoint(x += 0.05 + random.NextDouble(), 1.5 + 0.1 * random.NextDouble()))];
            var table = new TableLaw(GradedQuantity.Index, TableInterpolation.MonotoneCubic, [.. points]);
            foreach (var (piece, i) in table.Pieces(new(points[0].XUm, points[^1].XUm), 0, At).Select((piece, i) => (piece, i)))
            {
                var (low, high) = (Math.Min(points[i].N, points[i + 1].N), Math.Max(points[i].N, points[i + 1].N));
                foreach (var at in Samples(piece)) Assert.InRange(Math.Sqrt(piece.IndexSquared(at)), low - 1e-15, high + 1e-15);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Tails))]
    public void SettlesAt_OfATail_IsTheFirstPlaceWhereItCannotBeTold(string name, IndexLaw law)
    {
        var end = law.SettlesAt(0, 1e5, At)!.Value;
        var limit = 1.5 * 1.5;
        var piece = law.Pieces(new(0, 2 * end), 0, At).Last();

        Assert.InRange(Math.Abs(piece.IndexSquared(end) - limit), 0, 4e-16 * limit);
        Assert.True(Math.Abs(piece.IndexSquared(end * 0.999) - limit) > 0, name);
        for (var i = 0; i <= 100; i++) Assert.InRange(Math.Abs(piece.IndexSquared(end * (1 + i / 100.0)) - limit), 0, 4e-16 * limit);
    }

    public static TheoryData<string, IndexLaw> Tails() => new()
    {
        { "gaussian", new GaussianLaw(GradedQuantity.Index, 1.5, 0.05, 5, 2) },
        { "exponential", new ExponentialLaw(GradedQuantity.IndexSquared, 1.5, 0.05, 5, 0) },
        { "erfc", new ErfcLaw(GradedQuantity.Index, 1.5, -0.05, 5, 0) },
        { "sech2", new SechSquaredLaw(GradedQuantity.IndexSquared, 1.5, 0.05, 2, 50) },
        { "fermi", new FermiLaw(GradedQuantity.Index, 1.5, 0.05, 3, 0.5) },
        { "formula", new FormulaLaw(GradedQuantity.Index, Formula.Parse("1.5 + 0.05*exp(-((x-4000)/3)^2)", "x")) },
    };

    [Fact]
    public void IndexSquared_InALoop_AllocatesNothing()
    {
        foreach (var law in Laws().Select(row => (IndexLaw)row[1]))
        {
            var piece = Pieces(law)[0];
            var (start, length) = (piece.Extent.Start, piece.Extent.Length);
            double Run()
            {
                var sum = 0.0;
                for (var i = 0; i <= 1000; i++) sum += piece.IndexSquared(start + length * i / 1000) + piece.Jet(start + length * i / 1000).D1;
                return sum;
            }

            Run();
            var before = GC.GetAllocatedBytesForCurrentThread();
            var result = Run();
            Assert.InRange(GC.GetAllocatedBytesForCurrentThread() - before, 0, 100);
            Assert.True(double.IsFinite(result));
        }
    }

    private static SmoothPiece[] Pieces(IndexLaw law) => [.. law.Pieces(Extent, 3, At)];

    private static IEnumerable<double> Samples(SmoothPiece piece) =>
        Enumerable.Range(0, 41).Select(i => i == 40 ? piece.Extent.End : piece.Extent.Start + piece.Extent.Length * i / 40);

    private static double Square(double x) => x * x;

    private static void AssertClose(double expected, double actual, string name) =>
        Assert.True(Math.Abs(expected - actual) <= 1e-7 * Math.Max(0.01, Math.Abs(actual)), $"{name}: {expected} {actual}");
}
