using GuideModes.Numerics;

namespace GuideModes.Materials;

/// <summary>A material's index as a function of wavelength, with what is known about it: source, range, temperature and how far to trust it.</summary>
/// <remarks>Outside its range a material has no index: whoever asks gets an exception, and the reader of documents a fault before that.</remarks>
public sealed class Material
{
    private readonly Func<Jet, double, Jet> _indexSquared;
    private readonly Func<double, WavelengthRange>? _range;

    internal Material(Func<Jet, double, Jet> indexSquared, Func<double, WavelengthRange>? range = null)
    {
        _indexSquared = indexSquared;
        _range = range;
    }

    /// <summary>Its name in guide documents, such as <c>fused-silica</c>.</summary>
    public required string Id { get; init; }

    /// <summary>What people read.</summary>
    public required string Name { get; init; }

    /// <summary>Who measured or fitted it.</summary>
    public required string Source { get; init; }

    /// <summary>How the numbers came here and what they are worth.</summary>
    public required string Trust { get; init; }

    /// <summary>The wavelengths it holds for, at the default of its variable.</summary>
    public required WavelengthRange Range { get; init; }

    /// <summary>The temperature it holds for, °C; null if the source does not say, or it is the variable.</summary>
    public double? TemperatureCelsius { get; init; }

    /// <summary>What may be chosen about it; null for a fixed material.</summary>
    public MaterialVariable? Variable { get; init; }

    /// <summary>The wavelengths it holds for at a value of its variable.</summary>
    public WavelengthRange RangeAt(double? variable) =>
        _range is not null && variable is { } value ? _range(value) : Range;

    /// <summary>n² and its derivative in the wavelength.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The wavelength lies outside the range, or the variable outside its own.</exception>
    public Jet IndexSquared(Wavelength wavelength, double? variable = null)
    {
        var value = variable ?? Variable?.Default ?? 0;
        if (Variable is { } allowed && !(value >= allowed.Minimum && value <= allowed.Maximum))
            throw new ArgumentOutOfRangeException(nameof(variable), value, $"{Name}: from {allowed.Minimum} to {allowed.Maximum} is allowed.");
        if (!RangeAt(value).Contains(wavelength))
            throw new ArgumentOutOfRangeException(nameof(wavelength), wavelength.Micrometres, $"{Name} is known from {RangeAt(value)}.");
        return _indexSquared(Jet.Lambda(wavelength.Micrometres), value);
    }

    /// <summary>n and its derivative in the wavelength.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The wavelength lies outside the range, or the variable outside its own.</exception>
    public Jet Index(Wavelength wavelength, double? variable = null) => JetMath.Sqrt(IndexSquared(wavelength, variable));

    public override string ToString() => Id;
}
