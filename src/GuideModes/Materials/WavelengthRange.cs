namespace GuideModes.Materials;

/// <summary>The vacuum wavelengths for which something holds, µm, both ends included.</summary>
public readonly record struct WavelengthRange(double ShortestUm, double LongestUm)
{
    public bool Contains(Wavelength wavelength) => wavelength.Micrometres >= ShortestUm && wavelength.Micrometres <= LongestUm;

    public WavelengthRange And(WavelengthRange other) => new(Math.Max(ShortestUm, other.ShortestUm), Math.Min(LongestUm, other.LongestUm));

    public override string ToString() => FormattableString.Invariant($"{ShortestUm:0.####} to {LongestUm:0.####} µm");
}
