using System.Collections.Immutable;
using GuideModes.Profiles;
using GuideModes.Solvers;
using GuideModes.Solvers.TransferMatrix;
using MathNet.Numerics.Integration;

namespace GuideModes.Tests.Properties;

/// <summary>Quadrature and counting on sampled fields, apart from the solver's own.</summary>
internal static class Fields
{
    private static readonly GaussLegendreRule Rule = new(0, 1, 12);

    /// <summary>Gauss–Legendre points and weights on panels no longer than stated, none across a joint.</summary>
    public static (ImmutableArray<double> X, ImmutableArray<double> Weight) Nodes(IndexProfile profile, double longest)
    {
        var (xs, weights) = (ImmutableArray.CreateBuilder<double>(), ImmutableArray.CreateBuilder<double>());
        foreach (var extent in profile.Pieces.Select(piece => piece.Extent))
        {
            var panels = (int)Math.Ceiling(extent.Length / longest);
            var length = extent.Length / panels;
            for (var i = 0; i < panels * Rule.Order; i++)
            {
                xs.Add(extent.Start + length * (i / Rule.Order + Rule.GetAbscissa(i % Rule.Order)));
                weights.Add(length * Rule.GetWeight(i % Rule.Order));
            }
        }

        return (xs.ToImmutable(), weights.ToImmutable());
    }

    /// <summary>The weights, for TM divided by n².</summary>
    public static double[] Weighed(ModeProblem problem, ImmutableArray<double> xs, ImmutableArray<double> weights)
    {
        if (problem.Polarization == Polarization.TE) return [.. weights];
        var pieces = problem.Profile.Pieces;
        var piece = 0;
        return [.. xs.Select((x, i) =>
        {
            while (x > pieces[piece].Extent.End) piece++;
            return weights[i] / pieces[piece].IndexSquared(x);
        })];
    }

    /// <summary>What the two end media add to the overlap: exponentials.</summary>
    public static double Tails(ModeProblem problem, TransferMatrixSolution solution, int i, int j)
    {
        var extent = problem.Profile.Extent;
        var (a, b) = (solution.Field(i, [extent.Start, extent.End]).Value, solution.Field(j, [extent.Start, extent.End]).Value);
        var (first, second) = (solution.Modes[i], solution.Modes[j]);
        double Weight(Medium medium) => problem.Polarization == Polarization.TE ? 1 : 1 / medium.IndexSquared;
        return a[0] * b[0] * Weight(problem.Profile.Cover) / (1 / first.CoverPenetrationUm + 1 / second.CoverPenetrationUm)
            + a[1] * b[1] * Weight(problem.Profile.Substrate) / (1 / first.SubstratePenetrationUm + 1 / second.SubstratePenetrationUm);
    }

    /// <summary>The greatest n² among many samples.</summary>
    public static double Greatest(IndexProfile profile) =>
        profile.Pieces.Max(piece => Enumerable.Range(0, 401).Max(i => piece.IndexSquared(piece.Extent.Start + piece.Extent.Length * i / 400)));

    public static int SignChanges(ImmutableArray<double> values)
    {
        var (count, sign) = (0, 0);
        foreach (var now in values.Select(Math.Sign).Where(now => now != 0))
        {
            if (sign != 0 && now != sign) count++;
            sign = now;
        }

        return count;
    }
}
