namespace GuideModes.Solvers;

/// <summary>Why a search for modes ended.</summary>
public enum SearchOutcome
{
    /// <summary>Every guided mode was found; none means that nothing is guided.</summary>
    Complete,

    /// <summary>The guide holds more modes than the solver was allowed to look for.</summary>
    TooManyModes,

    /// <summary>The profile could not be resolved within the allowed number of steps.</summary>
    Unresolved,
}
