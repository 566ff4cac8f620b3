namespace GuideModes.Materials;

/// <summary>What one may choose about a material: a composition or a temperature.</summary>
/// <param name="Name">Its field in the guide document; the unit stands in the name.</param>
/// <param name="Label">What people read beside it.</param>
/// <param name="Unit">Empty for a pure number.</param>
/// <param name="Minimum">The least allowed.</param>
/// <param name="Maximum">The greatest allowed.</param>
/// <param name="Default">What holds where the field is left out.</param>
public sealed record MaterialVariable(string Name, string Label, string Unit, double Minimum, double Maximum, double Default);
