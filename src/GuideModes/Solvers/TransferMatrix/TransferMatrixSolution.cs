using System.Collections.Immutable;
using System.Runtime.Intrinsics;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The transfer-matrix answer: every guided mode by decreasing n_eff, and why the search ended.</summary>
/// <remarks>No modes with <see cref="SearchOutcome.Complete"/> says that nothing is guided. Safe to read from several threads.</remarks>
public sealed class TransferMatrixSolution
{
    private readonly ModeProblem _problem;
    private readonly ImmutableArray<ModeSearch.Found> _found;
    private readonly StepMesh? _mesh;

    internal TransferMatrixSolution(
        ModeProblem problem,
        SearchOutcome outcome,
        ImmutableArray<GuidedMode> modes,
        ImmutableArray<ModeSearch.Found> found,
        StepMesh? mesh = null)
    {
        _problem = problem;
        Outcome = outcome;
        Modes = modes;
        _found = found;
        _mesh = mesh;
    }

    /// <summary>The modes; mode m stands at place m.</summary>
    public ImmutableArray<GuidedMode> Modes { get; }

    public SearchOutcome Outcome { get; }

    /// <summary>The field of mode <paramref name="order"/> at any coordinates, cover and substrate included.</summary>
    /// <param name="order">m, from 0.</param>
    /// <param name="xUm">Coordinates, µm.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such mode.</exception>
    public SampledField Field(int order, ImmutableArray<double> xUm)
    {
        if (order < 0 || order >= Modes.Length || _mesh is null)
            throw new ArgumentOutOfRangeException(nameof(order), order, $"The guide has {Modes.Length} modes, counted from 0.");
        var found = _found[order];
        var sweep = new Sweep(_mesh);
        var field = MatchedField.Join(sweep, found);
        var sampler = new Sampler(_mesh, sweep, field, found.Energy);
        var values = ImmutableArray.CreateBuilder<double>(xUm.Length);
        var amplitude = 1 / Math.Sqrt(field.Norm);
        foreach (var x in xUm) values.Add(amplitude * sampler.Transverse(x) * Factor(x));
        return new(xUm, values.MoveToImmutable());
    }

    /// <summary>From u to the transverse field: 1 for E (TE), n for H (TM).</summary>
    private double Factor(double x)
    {
        if (_problem.Polarization == Polarization.TE) return 1;
        var profile = _problem.Profile;
        if (x < profile.Extent.Start) return profile.Cover.Index;
        if (x > profile.Extent.End) return profile.Substrate.Index;
        foreach (var piece in profile.Pieces)
        {
            if (x <= piece.Extent.End) return Math.Sqrt(piece.IndexSquared(x));
        }

        return profile.Substrate.Index;
    }

    /// <summary>u anywhere, from the states at the steps' starts.</summary>
    private sealed class Sampler(StepMesh mesh, Sweep sweep, MatchedField field, double energy)
    {
        private readonly StepSeries _series = new();
        private readonly Vector256<double>[] _coefficients = new Vector256<double>[StepMesh.Stride];
        private readonly double[] _f = new double[StepFunctions.Count];
        private int _built = -1;
        private bool _graded;

        public double Transverse(double x)
        {
            if (x < mesh.Start[0])
            {
                var (edge, log) = field.At(0);
                var (u, _) = mesh.Joints[0].Backward(edge.Value, edge.Slope);
                return u * Math.Exp(log + sweep.CoverDecay(energy) * (x - mesh.Start[0]));
            }

            if (x >= mesh.Start[mesh.Count])
            {
                var (edge, log) = field.At(mesh.Count);
                return edge.Value * Math.Exp(log - sweep.SubstrateDecay(energy) * (x - mesh.Start[mesh.Count]));
            }

            var at = Array.BinarySearch(mesh.Start, x);
            return InStep(at >= 0 ? at : ~at - 1, x);
        }

        private double InStep(int step, double x)
        {
            if (step != _built)
            {
                _graded = mesh.Series(step, _series);
                _built = step;
            }

            var h = mesh.Length[step];
            var t = (x - mesh.Start[step]) / h;
            if (_graded) _series.Coefficients(t, _coefficients);
            else StepSeries.UniformCoefficients(t, _coefficients);
            var scale = StepFunctions.Evaluate((mesh.Mean[step] - energy) * h * h * t * t, _f);
            var sum = Vector256<double>.Zero;
            for (var m = 0; m < StepMesh.Stride; m++) sum += _coefficients[m] * _f[m];
            var (state, log) = field.At(step);
            return (sum[0] * state.Value + sum[2] * state.Slope * h) * Math.Exp(log + scale);
        }
    }
}
