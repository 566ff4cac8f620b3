using System.Runtime.Intrinsics;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// The profile cut into steps, each with the coefficients of its matrix: everything that does not depend on β, so that a
/// mode costs one <see cref="StepFunctions.Evaluate"/> a step.
/// </summary>
/// <remarks>
/// A step ends where its piece ends. At any β a mode can have it is no longer than <see cref="Radians"/>, fewer than π, so that
/// a field has at most one zero in it (Sturm), and than <see cref="Nepers"/>, so that its integrals are exact and running against the growth costs no digits.
/// </remarks>
internal sealed class StepMesh
{
    /// <summary>The number of coefficient vectors a step has.</summary>
    public const int Stride = StepSeries.Last + 2;

    /// <summary>The longest step in radians of phase.</summary>
    public const double Radians = 2.0;

    /// <summary>The longest step in nepers of decay: what the seven points of the integrals still take in to eleven digits.</summary>
    public const double Nepers = 4;

    private readonly double[] _legendre;

    internal StepMesh(StepPlan plan, ModeProblem problem)
    {
        Problem = problem;
        Count = plan.Steps.Count;
        Start = new double[Count + 1];
        Length = new double[Count];
        InverseLength = new double[Count];
        Mean = new double[Count];
        Piece = new int[Count];
        End = new Vector256<double>[Count * Stride];
        _legendre = new double[Count * GaussRule.Points];
        Joints = new Joint[Count + 1];
        Fill(plan);
        FillJoints();
    }

    public ModeProblem Problem { get; }

    public int Count { get; }

    /// <summary>Where each step starts, µm, and where the last one ends.</summary>
    public double[] Start { get; }

    public double[] Length { get; }

    public double[] InverseLength { get; }

    /// <summary>The mean potential of each step, µm⁻².</summary>
    public double[] Mean { get; }

    /// <summary>The piece each step lies in.</summary>
    public int[] Piece { get; }

    /// <summary>Per step, the coefficients of its matrix.</summary>
    public Vector256<double>[] End { get; }

    /// <summary>What stands before each step, and after the last.</summary>
    public Joint[] Joints { get; }

    public double CoverPotential => Wavenumber2 * (Problem.Profile.CutoffIndexSquared - Problem.Profile.Cover.IndexSquared);

    public double SubstratePotential => Wavenumber2 * (Problem.Profile.CutoffIndexSquared - Problem.Profile.Substrate.IndexSquared);

    private double Wavenumber2 => Problem.Profile.Wavelength.Wavenumber * Problem.Profile.Wavelength.Wavenumber;

    /// <summary>Fills <paramref name="series"/> with a step's polynomials; false for a uniform step, which needs none.</summary>
    public bool Series(int step, StepSeries series)
    {
        if (Problem.Profile.Pieces[Piece[step]].IsUniform) return false;
        series.BuildFor(_legendre.AsSpan(step * GaussRule.Points, GaussRule.Points), Length[step]);
        return true;
    }

    private void Fill(StepPlan plan)
    {
        var series = new StepSeries();
        for (var i = 0; i < Count; i++)
        {
            var step = plan.Steps[i];
            Start[i] = step.Start;
            Start[i + 1] = step.End;
            Length[i] = step.End - step.Start;
            InverseLength[i] = 1 / Length[i];
            Piece[i] = step.Piece;
            var legendre = _legendre.AsSpan(i * GaussRule.Points, GaussRule.Points);
            var end = End.AsSpan(i * Stride, Stride);
            if (!plan.TryCopy(i, legendre, end))
            {
                plan.Sample(step, legendre);
                if (Series(i, series)) series.Coefficients(1, end);
                else StepSeries.UniformCoefficients(1, end);
            }

            Mean[i] = legendre[0];
        }
    }

    private void FillJoints()
    {
        Array.Fill(Joints, Joint.Identity);
        var profile = Problem.Profile;
        Joints[0] = Joint.Between(
            Joint.Side.Of(profile.Cover), Joint.Side.Of(profile.Pieces[0], Start[0]), Problem.Polarization);
        for (var i = 1; i < Count; i++)
        {
            if (Piece[i] == Piece[i - 1]) continue;
            Joints[i] = Joint.Between(
                Joint.Side.Of(profile.Pieces[Piece[i - 1]], Start[i]),
                Joint.Side.Of(profile.Pieces[Piece[i]], Start[i]),
                Problem.Polarization);
        }

        Joints[Count] = Joint.Between(
            Joint.Side.Of(profile.Pieces[^1], Start[Count]), Joint.Side.Of(profile.Substrate), Problem.Polarization);
    }
}
