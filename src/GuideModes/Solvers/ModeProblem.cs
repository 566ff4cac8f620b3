using GuideModes.Profiles;

namespace GuideModes.Solvers;

/// <summary>What a solver is asked: every guided mode of a profile in one polarization.</summary>
public sealed record ModeProblem(IndexProfile Profile, Polarization Polarization);
