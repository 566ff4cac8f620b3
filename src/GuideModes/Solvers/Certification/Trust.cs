namespace GuideModes.Solvers.Certification;

/// <summary>How well the two engines bear each other out.</summary>
public enum Trust
{
    /// <summary>The asymptotic value lies within its own uncertainty of the exact one.</summary>
    Agree,

    /// <summary>Something deserves a look; the reason says what.</summary>
    Watch,

    /// <summary>The two engines contradict each other.</summary>
    Disagree,
}
