using GuideModes.Solvers.Wkb;

namespace GuideModes.Tests.Solvers.Wkb;

/// <summary>Asymptotic fields against the exact ones of modes.json (fieldE), and against what any field must do.</summary>
public class WkbFieldTests
{
    private static readonly WkbSolver Solver = new();

    /// <summary>The share of the peak by which the field may be off: first-order amplitudes, so a bound from experience.</summary>
    [Theory]
    [InlineData("s01-slab-sym-te", 0, 3, 1e-11)]
    [InlineData("s03-slab-asym-te", 0, 2, 1e-11)]
    [InlineData("s29-gauss20-te", 4, 18, 0.01)]
    [InlineData("s21-many-te", 10, 60, 0.01)]
    [InlineData("s08-parabola-wide-te", 2, 24, 0.02)]
    [InlineData("s09-sech2-te", 0, 3, 0.05)]
    public void Field_ReferenceGuide_IsNearTheExactOne(string id, int first, int last, double share)
    {
        var problem = WkbCases.Problem(id);
        var modes = Solver.Solve(problem).Modes;
        foreach (var reference in WkbCases.Find(id).GetProperty("expected").GetProperty("modes").EnumerateArray().Skip(first).Take(last - first + 1))
        {
            var points = reference.GetProperty("fieldE").EnumerateArray().Select(p => (X: p[0].GetDouble(), E: p[1].GetDouble())).ToArray();
            var field = Solver.Field(problem, modes[reference.GetProperty("order").GetInt32()], [.. points.Select(p => p.X)]);
            var peak = points.Max(p => Math.Abs(p.E));
            for (var i = 0; i < points.Length; i++) Assert.Equal(points[i].E, field.Value[i], share * peak);
        }
    }

    [Theory]
    [InlineData("s11-gauss-air-te", -1.5, 30)]
    [InlineData("s13-gauss-air-tm", -1.5, 30)]
    [InlineData("s07-parabola-trunc-te", -10, 30)]
    [InlineData("s20-table-te", -1.5, 30)]
    public void Field_AnyMode_IsNormalisedPositiveFirstAndHasAsManyZerosAsItsNumber(string id, double from, double to)
    {
        var problem = WkbCases.Problem(id);
        foreach (var mode in Solver.Solve(problem).Modes)
        {
            const int count = 6000;
            var h = (to - from) / count;
            var field = Solver.Field(problem, mode, [.. Enumerable.Range(0, count).Select(i => from + (i + 0.5) * h)]);
            var (norm, zeros, last) = (0.0, 0, 0.0);
            for (var i = 0; i < count; i++)
            {
                norm += field.Value[i] * field.Value[i] * h / (problem.Polarization == Polarization.TM ? IndexSquared(problem, field.XUm[i]) : 1);
                if (Math.Abs(field.Value[i]) < 1e-9) continue;
                if (last == 0) Assert.True(field.Value[i] > 0);
                if (last * field.Value[i] < 0) zeros++;
                last = field.Value[i];
            }

            Assert.Equal(mode.Order, zeros);
            Assert.Equal(1, norm, 0.05);
        }
    }

    private static double IndexSquared(GuideModes.Solvers.ModeProblem problem, double x)
    {
        var profile = problem.Profile;
        if (x < profile.Extent.Start) return profile.Cover.IndexSquared;
        foreach (var piece in profile.Pieces)
        {
            if (x <= piece.Extent.End) return piece.IndexSquared(x);
        }

        return profile.Substrate.IndexSquared;
    }
}
