using System.Runtime.Intrinsics;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>Carries the decaying solution of each end medium into the guide, at one energy E = k²n_c² − β².</summary>
/// <remarks>
/// Each step is one 2×2 matrix; ∫u² over it comes from the matrix and its derivative in E, by
/// u′∂u/∂E − u∂u′/∂E = ∫u². Zeros are counted by sign, a step holding at most one. Not thread-safe: one sweep, one thread.
/// </remarks>
internal sealed class Sweep(StepMesh mesh)
{
    private readonly double[] _f = new double[StepFunctions.Count];

    public StepMesh Mesh { get; } = mesh;

    /// <summary>The state at each step's start (after the joint there), and behind the last joint, as the sweeps left them.</summary>
    public FieldState[] States { get; } = new FieldState[mesh.Count + 1];

    /// <summary>γ in the cover, per µm.</summary>
    public double CoverDecay(double energy) => Math.Sqrt(Math.Max(0, Mesh.CoverPotential - energy));

    /// <summary>γ in the substrate, per µm.</summary>
    public double SubstrateDecay(double energy) => Math.Sqrt(Math.Max(0, Mesh.SubstratePotential - energy));

    /// <summary>From the cover to the start of step <paramref name="stop"/>; gives the state there and the zeros passed.</summary>
    public (FieldState State, int Zeros) FromCover(double energy, int stop)
    {
        var state = FieldState.Decaying(CoverDecay(energy), +1);
        int zeros = 0, sign = 1;
        for (var i = 0; ; i++)
        {
            var (u, slope) = Mesh.Joints[i].Forward(state.Value, state.Slope);
            state = state with { Value = u, Slope = slope };
            States[i] = state;
            if (i == stop) return (state, zeros);
            state = Forward(i, energy, state);
            if (state.Value * sign < 0)
            {
                zeros++;
                sign = -sign;
            }
        }
    }

    /// <summary>From the substrate back to the start of step <paramref name="stop"/>.</summary>
    public (FieldState State, int Zeros) FromSubstrate(double energy, int stop)
    {
        var state = FieldState.Decaying(SubstrateDecay(energy), -1);
        int zeros = 0, sign = 1;
        if (stop < Mesh.Count) States[Mesh.Count] = state;
        for (var i = Mesh.Count - 1; i >= stop; i--)
        {
            var (u, slope) = Mesh.Joints[i + 1].Backward(state.Value, state.Slope);
            state = Backward(i, energy, state with { Value = u, Slope = slope });
            if (i > stop) States[i] = state;
            if (state.Value * sign < 0)
            {
                zeros++;
                sign = -sign;
            }
        }

        return (state, zeros);
    }

    /// <summary>The number of modes below an energy no higher than both end media's potentials: zeros of the cover's solution on the whole line.</summary>
    public int CountBelow(double energy)
    {
        var (state, zeros) = FromCover(energy, Mesh.Count);
        var outgoing = state.Slope + SubstrateDecay(energy) * state.Value;
        return zeros + (outgoing * state.Value < 0 ? 1 : 0);
    }

    private FieldState Forward(int step, double energy, FieldState from)
    {
        var (t, dt, log) = Matrices(step, energy);
        var h = Mesh.Length[step];
        double u0 = from.Value, s0 = from.Slope * h;
        double u = t[0] * u0 + t[2] * s0, s = t[1] * u0 + t[3] * s0;
        double du = dt[0] * u0 + dt[2] * s0, ds = dt[1] * u0 + dt[3] * s0;
        // ∂/∂E = −h² ∂/∂Z, and slopes are per h: ∫u² dx = (u′∂u − u∂u′) = −h(s·du − u·ds).
        var part = h * (u * ds - s * du);
        var norm = log > 0 ? from.Norm * Math.Exp(-2 * log) + part : from.Norm + part;
        return new FieldState(u, s * Mesh.InverseLength[step], norm, from.Log + log).Rescaled();
    }

    private FieldState Backward(int step, double energy, FieldState from)
    {
        var (t, dt, log) = Matrices(step, energy);
        var h = Mesh.Length[step];
        double u1 = from.Value, s1 = from.Slope * h;
        // The true matrix is t·exp(log) with unit determinant, so its inverse is the adjugate times exp(log).
        double u = t[3] * u1 - t[2] * s1, s = t[0] * s1 - t[1] * u1;
        double du = dt[0] * u + dt[2] * s, ds = dt[1] * u + dt[3] * s;
        // Start state u·e^log, its derivative carried forward du·e^2log; divided by e^2log like the norm's scale.
        var part = h * (u1 * ds - s1 * du);
        var norm = log > 0 ? from.Norm * Math.Exp(-2 * log) + part : from.Norm + part;
        return new FieldState(u, s * Mesh.InverseLength[step], norm, from.Log + log).Rescaled();
    }

    /// <summary>A step's matrix in units of its length, lanes (11, 21, 12, 22), its derivative in Z, and the logarithm both must be scaled by.</summary>
    internal (Vector256<double> T, Vector256<double> DT, double Log) Matrices(int step, double energy)
    {
        var h = Mesh.Length[step];
        var z = (Mesh.Mean[step] - energy) * h * h;
        var f = _f.AsSpan();
        var log = StepFunctions.Evaluate(z, f);
        var a = Mesh.End.AsSpan(step * StepMesh.Stride, StepMesh.Stride);
        // Even and odd terms apart, so that few operations wait for one another.
        var t = Vector256.FusedMultiplyAdd(a[0], Vector256.Create(f[0]), Vector256.Create(0, z * f[1], 0, 0));
        var dt = Vector256.FusedMultiplyAdd(a[0], Vector256.Create(f[1]), Vector256.Create(0, 2 * f[1] + z * f[2], 0, 0));
        var tOdd = a[1] * f[1];
        var dtOdd = a[1] * f[2];
        for (var m = 2; m < a.Length - 1; m += 2)
        {
            t = Vector256.FusedMultiplyAdd(a[m], Vector256.Create(f[m]), t);
            dt = Vector256.FusedMultiplyAdd(a[m], Vector256.Create(f[m + 1]), dt);
            tOdd = Vector256.FusedMultiplyAdd(a[m + 1], Vector256.Create(f[m + 1]), tOdd);
            dtOdd = Vector256.FusedMultiplyAdd(a[m + 1], Vector256.Create(f[m + 2]), dtOdd);
        }

        t += tOdd;
        dt = 0.5 * (dt + dtOdd);
        return (t, dt, log);
    }
}
