using System.Collections.Immutable;
using System.Runtime.Intrinsics;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>Reads the fields of modes at a list of coordinates; what does not depend on the mode is worked out once.</summary>
internal sealed class FieldSampler
{
    private readonly Sweep _sweep;
    private readonly ImmutableArray<double> _x;
    private readonly int[] _step;
    private readonly double[] _factor;
    private readonly Vector128<double>[] _coefficients;
    private readonly double[] _f = new double[StepFunctions.Count];

    public FieldSampler(StepMesh mesh, ImmutableArray<double> xUm)
    {
        _sweep = new Sweep(mesh);
        _x = xUm;
        _step = new int[xUm.Length];
        _factor = new double[xUm.Length];
        _coefficients = new Vector128<double>[xUm.Length * StepMesh.Stride];
        var series = new StepSeries();
        var both = new Vector256<double>[StepMesh.Stride];
        int built = -1;
        var graded = false;
        for (var i = 0; i < xUm.Length; i++)
        {
            var step = _step[i] = Locate(xUm[i]);
            _factor[i] = Factor(step, xUm[i]);
            if (step < 0 || step == mesh.Count) continue;
            if (step != built) (built, graded) = (step, mesh.Series(step, series));
            var t = (xUm[i] - mesh.Start[step]) / mesh.Length[step];
            if (graded) series.Coefficients(t, both);
            else StepSeries.UniformCoefficients(t, both);
            for (var m = 0; m < both.Length; m++) _coefficients[i * StepMesh.Stride + m] = Vector128.Create(both[m][0], both[m][2]);
        }
    }

    private StepMesh Mesh => _sweep.Mesh;

    /// <summary>The normalised field of a mode.</summary>
    public SampledField Sample(ModeSearch.Found found)
    {
        var field = MatchedField.Join(_sweep, found);
        var amplitude = 1 / Math.Sqrt(field.Norm);
        var values = ImmutableArray.CreateBuilder<double>(_x.Length);
        for (var i = 0; i < _x.Length; i++) values.Add(amplitude * _factor[i] * Transverse(i, field, found.Energy));
        return new(_x, values.MoveToImmutable());
    }

    /// <summary>u at the i-th coordinate.</summary>
    private double Transverse(int i, MatchedField field, double energy)
    {
        var step = _step[i];
        if (step < 0)
        {
            var (edge, log) = field.At(0);
            var (u, _) = Mesh.Joints[0].Backward(edge.Value, edge.Slope);
            return u * Math.Exp(log + _sweep.CoverDecay(energy) * (_x[i] - Mesh.Start[0]));
        }

        if (step == Mesh.Count)
        {
            var (edge, log) = field.At(step);
            return edge.Value * Math.Exp(log - _sweep.SubstrateDecay(energy) * (_x[i] - Mesh.Start[step]));
        }

        return InStep(i, step, field, energy);
    }

    private double InStep(int i, int step, MatchedField field, double energy)
    {
        var h = Mesh.Length[step];
        var along = _x[i] - Mesh.Start[step];
        var scale = StepFunctions.Evaluate((Mesh.Mean[step] - energy) * along * along, _f);
        var a = _coefficients.AsSpan(i * StepMesh.Stride, StepMesh.Stride);
        var sum = Vector128<double>.Zero;
        for (var m = 0; m < a.Length; m++) sum = Vector128.FusedMultiplyAdd(a[m], Vector128.Create(_f[m]), sum);
        var (state, log) = field.At(step);
        return Vector128.Dot(sum, Vector128.Create(state.Value, state.Slope * h)) * Math.Exp(log + scale);
    }

    /// <summary>The step that holds x: −1 for the cover, one past the last for the substrate.</summary>
    private int Locate(double x)
    {
        if (x < Mesh.Start[0]) return -1;
        if (x >= Mesh.Start[Mesh.Count]) return Mesh.Count;
        var at = Array.BinarySearch(Mesh.Start, x);
        return at >= 0 ? at : ~at - 1;
    }

    /// <summary>From u to the transverse field: 1 for E (TE), n for H (TM).</summary>
    private double Factor(int step, double x)
    {
        var profile = Mesh.Problem.Profile;
        if (Mesh.Problem.Polarization == Polarization.TE) return 1;
        if (step < 0) return profile.Cover.Index;
        return step == Mesh.Count ? profile.Substrate.Index : Math.Sqrt(profile.Pieces[Mesh.Piece[step]].IndexSquared(x));
    }
}
