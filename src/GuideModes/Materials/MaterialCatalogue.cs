using System.Collections.Immutable;
using static GuideModes.Materials.DispersionModels;

namespace GuideModes.Materials;

/// <summary>Every material there is.</summary>
/// <remarks>Wavelengths in µm. Where a source gives no range, ours is narrower than its neighbours' and the text says so.</remarks>
public static class MaterialCatalogue
{
    private const string Read = "Coefficients read from a public-domain (CC0) optical-constants database, state of 2026-06-14, and recomputed.";
    private const string NoRange = " Range not given in the source; limited to 0.5 to 2 µm by us.";
    private const string RowFromMemory = "The coefficient row was found in public source text, its composition label is from memory; recomputed." + NoRange;

    private static readonly WavelengthRange Ours = new(0.5, 2);
    private static readonly WavelengthRange SilicaRange = new(0.21, 3.71);
    private static readonly WavelengthRange GermaniaRange = new(0.36, 4.3);
    private static readonly WavelengthRange NiobateRange = new(0.4, 5);

    private static readonly (double A, double B)[] Silica = [(0.6961663, 0.0684043), (0.4079426, 0.1162414), (0.8974794, 9.896161)];
    private static readonly (double A, double B)[] Germania = [(0.80686642, 0.068972606), (0.71815848, 0.15396605), (0.85416831, 11.841931)];

    /// <summary>The materials: glasses, crystals, films, semiconductors, polymers.</summary>
    public static ImmutableArray<Material> All { get; } =
    [
        new(Mixture(Silica, Germania), percent => percent > 0 ? SilicaRange.And(GermaniaRange) : SilicaRange)
        {
            Id = "fused-silica",
            Name = "Fused silica, optionally with germania",
            Source = "Malitson 1965, J. Opt. Soc. Am. 55, 1205; mixing with GeO2 after Fleming 1984, Appl. Opt. 23, 4486",
            Trust = Read + " With germania both Aᵢ and Bᵢ run linearly in the mole fraction; that rule is from memory and good to ±1e-3 in n.",
            Range = SilicaRange,
            TemperatureCelsius = 20,
            Variable = new("molePercentGeO2", "Germania", "mol %", 0, 100, 0),
        },
        new(Sellmeier(0, (0.69675, 0.069066), (0.408218, 0.115662), (0.890815, 9.900559)))
        {
            Id = "quenched-silica",
            Name = "Silica, quenched",
            Source = "Fleming 1978, Electron. Lett. 14, 326",
            Trust = "Coefficients found in a textbook exercise and in public source text; recomputed." + NoRange,
            Range = Ours,
        },
        new(Sellmeier(0, Germania))
        {
            Id = "germania",
            Name = "Germania glass (GeO2)",
            Source = "Fleming 1984, Appl. Opt. 23, 4486",
            Trust = Read,
            Range = GermaniaRange,
        },
        new(Sellmeier(0, (0.71104, 0.06427), (0.451885, 0.129408), (0.704048, 9.425478)))
        {
            Id = "silica-germania-13.5",
            Name = "Silica with 13.5 mol % GeO2",
            Source = "Fleming 1978, Electron. Lett. 14, 326",
            Trust = "Coefficients found in a textbook exercise; recomputed." + NoRange,
            Range = Ours,
        },
        new(Sellmeier(0, (0.69579, 0.061568), (0.452497, 0.119921), (0.712513, 8.656641)))
        {
            Id = "silica-phosphorus-pentoxide-9.1",
            Name = "Silica with 9.1 mol % P2O5",
            Source = "Fleming 1978, Electron. Lett. 14, 326 (label from memory)",
            Trust = RowFromMemory,
            Range = Ours,
        },
        new(Sellmeier(0, (0.690618, 0.0619), (0.401996, 0.123662), (0.898817, 9.09896)))
        {
            Id = "silica-boron-oxide-13.3",
            Name = "Silica with 13.3 mol % B2O3",
            Source = "Fleming 1978, Electron. Lett. 14, 326 (label from memory)",
            Trust = RowFromMemory,
            Range = Ours,
        },
        new(SellmeierOfSquares((1.03961212, 0.00600069867), (0.231792344, 0.0200179144), (1.01046945, 103.560653)))
        {
            Id = "borosilicate-crown",
            Name = "Borosilicate crown glass 517642",
            Source = "Maker's catalogue of January 2017 for glass code 517642",
            Trust = Read,
            Range = new(0.3, 2.5),
            TemperatureCelsius = 20,
        },
        new(IndexPowers((1.513, 0), (-0.003169, 2), (0.003962, -2)))
        {
            Id = "soda-lime",
            Name = "Soda-lime glass, clear",
            Source = "Rubin 1985, Sol. Energy Mater. 12, 275",
            Trust = Read,
            Range = new(0.31, 4.6),
        },
        new(SellmeierOfSquares((2.6734, 0.01764), (1.229, 0.05914), (12.614, 474.6)))
        {
            Id = "lithium-niobate-ordinary",
            Name = "Lithium niobate, congruent, ordinary",
            Source = "Zelmon, Small & Jundt 1997, J. Opt. Soc. Am. B 14, 3319",
            Trust = Read,
            Range = NiobateRange,
            TemperatureCelsius = 21,
        },
        new(SellmeierOfSquares((2.9804, 0.02047), (0.5981, 0.0666), (8.9543, 416.08)))
        {
            Id = "lithium-niobate-extraordinary",
            Name = "Lithium niobate, congruent, extraordinary",
            Source = "Zelmon, Small & Jundt 1997, J. Opt. Soc. Am. B 14, 3319",
            Trust = Read,
            Range = NiobateRange,
            TemperatureCelsius = 21,
        },
        new(LithiumNiobate.ExtraordinarySquared)
        {
            Id = "lithium-niobate-extraordinary-thermal",
            Name = "Lithium niobate, congruent, extraordinary, with temperature",
            Source = "Jundt 1997, Opt. Lett. 22, 1553",
            Trust = "Coefficients found in public source text; that copy has a division in the temperature parameter where a product is used here, from memory. Recomputed; at 24.5 °C the parameter is zero and the doubt with it.",
            Range = NiobateRange,
            Variable = new("temperatureC", "Temperature", "°C", 20, 250, 24.5),
        },
        new(SellmeierOfSquares((2.4272, 0.01478), (1.4617, 0.05612), (9.6536, 371.216)))
        {
            Id = "lithium-niobate-mgo-ordinary",
            Name = "Lithium niobate with 5 mol % MgO, ordinary",
            Source = "Zelmon, Small & Jundt 1997, J. Opt. Soc. Am. B 14, 3319 (o and e are interchanged in print; corrected here)",
            Trust = Read,
            Range = NiobateRange,
            TemperatureCelsius = 21,
        },
        new(SellmeierOfSquares((2.2454, 0.01242), (1.3005, 0.05313), (6.8972, 331.33)))
        {
            Id = "lithium-niobate-mgo-extraordinary",
            Name = "Lithium niobate with 5 mol % MgO, extraordinary",
            Source = "Zelmon, Small & Jundt 1997, J. Opt. Soc. Am. B 14, 3319 (o and e are interchanged in print; corrected here)",
            Trust = Read,
            Range = NiobateRange,
            TemperatureCelsius = 21,
        },
        new(Sellmeier(0, (1.4313493, 0.0726631), (0.65054713, 0.1193242), (5.3414021, 18.028251)))
        {
            Id = "sapphire-ordinary",
            Name = "Sapphire, ordinary",
            Source = "Malitson & Dodge 1972; Dodge 1986",
            Trust = Read,
            Range = new(0.2, 5),
            TemperatureCelsius = 20,
        },
        new(Sellmeier(0, (1.5039759, 0.0740288), (0.55069141, 0.1216529), (6.5927379, 20.072248)))
        {
            Id = "sapphire-extraordinary",
            Name = "Sapphire, extraordinary",
            Source = "Malitson & Dodge 1972; Dodge 1986",
            Trust = Read,
            Range = new(0.2, 5),
            TemperatureCelsius = 20,
        },
        new(Sellmeier(0, (3.0249, 0.1353406), (40314, 1239.842)))
        {
            Id = "silicon-nitride",
            Name = "Silicon nitride film (LPCVD type)",
            Source = "Luke et al. 2015, Opt. Lett. 40, 4823",
            Trust = Read,
            Range = new(0.31, 5.504),
        },
        new(Sellmeier(0, (2.8939, 0.13967)))
        {
            Id = "silicon-nitride-1982",
            Name = "Silicon nitride film (older data)",
            Source = "Philipp 1973, J. Electrochem. Soc. 120, 295; fit of Bååk 1982, Appl. Opt. 21, 1069",
            Trust = Read,
            Range = new(0.207, 1.24),
        },
        new(Sellmeier(0, (10.6684293, 0.301516485), (0.0030434748, 1.13475115), (1.54133408, 1104)))
        {
            Id = "silicon",
            Name = "Silicon",
            Source = "Salzberg & Villa 1957, J. Opt. Soc. Am. 47, 244; fit of Tatian 1984, Appl. Opt. 23, 4477",
            Trust = Read + " Another table (Li 1980) is lower by 0.002 at 1.55 µm.",
            Range = new(1.357, 11.04),
            TemperatureCelsius = 26,
        },
        new(Sellmeier(4.372514, (5.466742, 0.4431307), (0.0242996, 0.8746453), (1.957522, 36.9166)))
        {
            Id = "gallium-arsenide",
            Name = "Gallium arsenide",
            Source = "Skauli et al. 2003, J. Appl. Phys. 94, 6447",
            Trust = Read,
            Range = new(0.97, 17),
            TemperatureCelsius = 22,
        },
        new(AluminiumGalliumArsenide.IndexSquared, AluminiumGalliumArsenide.RangeAt)
        {
            Id = "aluminium-gallium-arsenide",
            Name = "Aluminium gallium arsenide",
            Source = "Gehrsitz et al. 2000, J. Appl. Phys. 87, 7825, Tables II and IV, Eq. 11",
            Trust = "Model read from a public transcription and recomputed. Range not given there; limited by us from 5 % above the gap wavelength to 2 µm.",
            Range = AluminiumGalliumArsenide.RangeAt(0),
            TemperatureCelsius = 26.85,
            Variable = new("aluminiumFraction", "Aluminium fraction", "", 0, 1, 0),
        },
        new(Sellmeier(6.255, (2.316, 0.6263), (2.765, 32.935)))
        {
            Id = "indium-phosphide",
            Name = "Indium phosphide",
            Source = "Pettit & Turner 1965, J. Appl. Phys. 36, 2081; handbook fit",
            Trust = Read,
            Range = new(0.95, 10),
        },
        new(Powers((2.1778, 0), (6.1209e-3, 2), (-1.5004e-3, 4), (2.3678e-2, -2), (-4.2137e-3, -4), (7.3417e-4, -6), (-4.5042e-5, -8)))
        {
            Id = "pmma",
            Name = "Acrylic polymer (PMMA)",
            Source = "Beadie et al. 2015, Appl. Opt. 54, F139",
            Trust = Read + " Stated accuracy ±2e-4.",
            Range = new(0.42, 1.62),
            TemperatureCelsius = 20.1,
        },
        new(SellmeierOfSquares((1.1819, 0.011313)))
        {
            Id = "pmma-2009",
            Name = "Acrylic polymer (PMMA), visible",
            Source = "Sultanova et al. 2009, Acta Phys. Pol. A 116, 585",
            Trust = Read,
            Range = new(0.4368, 1.052),
            TemperatureCelsius = 20,
        },
        new(SellmeierOfSquares((1.4435, 0.020216)))
        {
            Id = "polystyrene",
            Name = "Polystyrene",
            Source = "Sultanova et al. 2009, Acta Phys. Pol. A 116, 585",
            Trust = Read,
            Range = new(0.4368, 1.052),
            TemperatureCelsius = 20,
        },
    ];

    /// <summary>The material of an id; null if there is none.</summary>
    public static Material? Find(string id) => All.FirstOrDefault(material => material.Id == id);
}
