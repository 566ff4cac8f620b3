using System.Buffers;
using System.Collections.Immutable;
using System.Runtime.Intrinsics;
using GuideModes.Profiles;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The integrals over a mode's field that its figures come from: group index, power shares, moments.</summary>
/// <remarks>
/// n_g is dβ/dk by first-order perturbation (Hellmann–Feynman), with G = n² − (λ/2)∂n²/∂λ, the product of a material's index
/// and group index. TE: n_g = ∫G u²/(n_eff ∫u²). TM: n_g = ∫{n²u² + (G − n²)[(u′ + ρu)² + β²u²]/(k²n²)}/(n_eff ∫u²), ρ = n′/n.
/// Each step is integrated with the seven Gauss points its matrix was built from, at which the field is exact.
/// </remarks>
internal sealed class ModeIntegrals : IDisposable
{
    /// <summary>Steps whose field squared is this small beside that at the match add nothing.</summary>
    private const double Negligible = 1e-30;

    private readonly Sweep _sweep;
    private readonly Vector128<double>[] _values;
    private readonly Vector128<double>[] _slopes;
    private readonly Vector256<double>[] _both = new Vector256<double>[StepMesh.Stride];
    private readonly double[] _group;
    private readonly double[] _index2;
    private readonly double[] _relativeSlope;
    private readonly double[] _f = new double[StepFunctions.Count];

    public ModeIntegrals(Sweep sweep)
    {
        _sweep = sweep;
        var mesh = sweep.Mesh;
        var points = mesh.Count * GaussRule.Points;
        _values = ArrayPool<Vector128<double>>.Shared.Rent(points * StepMesh.Stride);
        _slopes = IsTE ? [] : ArrayPool<Vector128<double>>.Shared.Rent(points * StepMesh.Stride);
        _group = new double[points];
        _index2 = new double[points];
        _relativeSlope = new double[points];
        var series = new StepSeries();
        for (var i = 0; i < mesh.Count; i++) Prepare(i, series);
    }

    private StepMesh Mesh => _sweep.Mesh;

    private bool IsTE => Mesh.Problem.Polarization == Polarization.TE;

    /// <summary>Gives the tables back: they are large, and every edit of a guide asks for new ones.</summary>
    public void Dispose()
    {
        ArrayPool<Vector128<double>>.Shared.Return(_values);
        if (!IsTE) ArrayPool<Vector128<double>>.Shared.Return(_slopes);
    }

    private IndexProfile Profile => Mesh.Problem.Profile;

    /// <summary>All the figures of a mode already found.</summary>
    public GuidedMode Describe(int order, ModeSearch.Found found, Estimate index)
    {
        var k = Profile.Wavelength.Wavenumber;
        var sums = Gather(found, index.Value * k);
        var shares = new double[Profile.RegionCount + 2];
        for (var i = 0; i < shares.Length; i++) shares[i] = sums.Power[i] / sums.Total;
        var centroid = sums.First / sums.Total;
        return new()
        {
            Order = order,
            EffectiveIndex = index,
            GroupIndex = sums.Group / sums.Total / index.Value,
            Confinement = ImmutableArray.Create(shares),
            CentroidUm = centroid,
            RmsWidthUm = Math.Sqrt(Math.Max(0, sums.Second / sums.Total - centroid * centroid)),
            CoverPenetrationUm = 1 / _sweep.CoverDecay(found.Energy),
            SubstratePenetrationUm = 1 / _sweep.SubstrateDecay(found.Energy),
        };
    }

    private sealed class Sums(int regions)
    {
        public readonly double[] Power = new double[regions + 2];
        public double Total;
        public double Group;
        public double First;
        public double Second;

        public void Add(int part, double power, double group, double x, double x2)
        {
            Power[part] += power;
            Total += power;
            Group += group;
            First += power * x;
            Second += power * x2;
        }
    }

    private Sums Gather(ModeSearch.Found found, double beta)
    {
        var field = MatchedField.Join(_sweep, found);
        var sums = new Sums(Profile.RegionCount);
        for (var i = 0; i < Mesh.Count; i++)
        {
            var (state, log) = field.At(i);
            var scale = Math.Exp(2 * log);
            if (scale * state.Amplitude(found.Scale) > Negligible) GatherStep(i, state, scale, found.Energy, beta, sums);
        }

        GatherTail(0, Profile.Cover, field.At(0), Mesh.Joints[0].Backward, Mesh.Start[0], -_sweep.CoverDecay(found.Energy), beta, sums);
        var last = Profile.LastRegionIsUnbounded ? Profile.RegionCount : Profile.RegionCount + 1;
        GatherTail(last, Profile.Substrate, field.At(Mesh.Count), static (u, s) => (u, s), Mesh.Start[Mesh.Count], _sweep.SubstrateDecay(found.Energy), beta, sums);
        return sums;
    }

    private void GatherStep(int step, FieldState state, double scale, double energy, double beta, Sums sums)
    {
        var h = Mesh.Length[step];
        var z = (Mesh.Mean[step] - energy) * h * h;
        var part = Profile.Pieces[Mesh.Piece[step]].Region + 1;
        var start = Vector128.Create(state.Value, state.Slope * h);
        for (var i = 0; i < GaussRule.Points; i++)
        {
            var t = GaussRule.Nodes[i];
            var point = step * GaussRule.Points + i;
            var log = StepFunctions.Evaluate(z * t * t, _f);
            var grown = log > 0 ? Math.Exp(log) : 1;
            var u = grown * At(_values, point, start);
            var power = scale * h * GaussRule.Weights[i] * u * u;
            var logSlope = IsTE || u == 0 ? 0 : grown * (At(_slopes, point, start) + z * t * _f[1] * state.Value) / h / u + _relativeSlope[point];
            var x = Mesh.Start[step] + t * h;
            sums.Add(part, power, GroupTerm(_index2[point], _group[point], power, logSlope, beta), x, x * x);
        }
    }

    /// <summary>A solution's value (or slope) at a point, from the table for it and the functions just evaluated.</summary>
    private double At(Vector128<double>[] table, int point, Vector128<double> start)
    {
        var a = table.AsSpan(point * StepMesh.Stride, StepMesh.Stride);
        var f = _f.AsSpan(0, StepMesh.Stride);
        var sum = a[0] * f[0];
        for (var m = 1; m < a.Length; m++) sum = Vector128.FusedMultiplyAdd(a[m], Vector128.Create(f[m]), sum);
        return Vector128.Dot(sum, start);
    }

    /// <summary>What a stretch with power ∫u² adds to the group integral; <paramref name="logSlope"/> is H′/H for TM.</summary>
    private double GroupTerm(double index2, double group, double power, double logSlope, double beta)
    {
        if (IsTE) return group * power;
        var k = Profile.Wavelength.Wavenumber;
        return power * (index2 + (group - index2) * (logSlope * logSlope + beta * beta) / (k * k * index2));
    }

    private void GatherTail(
        int part,
        Medium medium,
        (FieldState State, double Log) edge,
        Func<double, double, (double U, double Slope)> toMedium,
        double x0,
        double signedDecay,
        double beta,
        Sums sums)
    {
        var (u, _) = toMedium(edge.State.Value, edge.State.Slope);
        var length = 0.5 / Math.Abs(signedDecay);
        var away = Math.Sign(signedDecay) * length;
        var power = Math.Exp(2 * edge.Log) * u * u * length;
        sums.Add(part, power, GroupTerm(medium.IndexSquared, medium.GroupTerm, power, signedDecay, beta), x0 + away, x0 * x0 + 2 * x0 * away + 2 * away * away);
    }

    private void Prepare(int step, StepSeries series)
    {
        var piece = Profile.Pieces[Mesh.Piece[step]];
        var graded = Mesh.Series(step, series);
        if (graded && IsTE)
            series.ValueCoefficientsAtNodes(_values.AsSpan(step * GaussRule.Points * StepMesh.Stride, GaussRule.Points * StepMesh.Stride));
        for (var i = 0; i < GaussRule.Points; i++)
        {
            var point = step * GaussRule.Points + i;
            if (!graded || !IsTE) FillPoint(point, GaussRule.Nodes[i], graded ? series : null);
            var s = piece.Jet(Mesh.Start[step] + GaussRule.Nodes[i] * Mesh.Length[step]);
            (_index2[point], _group[point]) = Medium.From(s, Profile.Wavelength);
            _relativeSlope[point] = IsTE ? 0 : 0.5 * s.D1 / s.Value;
        }
    }

    /// <summary>Fills the tables at one point; without a series the step is uniform.</summary>
    private void FillPoint(int point, double t, StepSeries? series)
    {
        if (series is null) StepSeries.UniformCoefficients(t, _both);
        else series.Coefficients(t, _both);
        for (var m = 0; m < StepMesh.Stride; m++)
        {
            _values[point * StepMesh.Stride + m] = Vector128.Create(_both[m][0], _both[m][2]);
            if (!IsTE) _slopes[point * StepMesh.Stride + m] = Vector128.Create(_both[m][1], _both[m][3]);
        }
    }
}
