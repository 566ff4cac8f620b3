using System.Collections.Immutable;
using System.Reflection;
using GuideModes.Solvers;
using GuideModes.Solvers.Certification;
using GuideModes.Solvers.Wkb;
using GuideModes.Web.Components.Shared;
using GuideModes.Web.Solving;

namespace GuideModes.Web.Api;

/// <summary>Which fields go with an answer.</summary>
/// <param name="XUm">At which coordinates; default for a grid of round numbers that suits the guide.</param>
/// <param name="Orders">Of which modes; null for all.</param>
public sealed record FieldRequest(ImmutableArray<double> XUm = default, IReadOnlyCollection<int>? Orders = null);

/// <summary>Puts an answer into its wire shape: the one place where that is done, for the interface and for files.</summary>
public static class AnswerBuilder
{
    private const int FieldPoints = 500;

    /// <summary>The program and its version, as it stands in every file and answer.</summary>
    public static string Engine { get; } =
        $"GuideModes {typeof(GuideAnswer).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion.Split('+')[0]}";

    public static ModesAnswer Build(GuideAnswer answer, FieldRequest? fields, CancellationToken cancellation)
    {
        var grid = fields is null ? default : fields.XUm.IsDefault ? Grid(answer, fields.Orders) : fields.XUm;
        ImmutableArray<int> asked = fields is null ? [] : [.. Asked(answer, fields.Orders).Select(mode => mode.Exact.Order)];
        var sampled = asked.Zip(answer.Fields(asked, grid, cancellation)).ToDictionary(pair => pair.First, pair => Field(answer, pair.Second));
        return new(
            answer.Modes.Length,
            Finite(answer.WkbModeNumber),
            [.. answer.Modes.Select(mode => Build(mode, sampled.GetValueOrDefault(mode.Exact.Order)))],
            answer.Remarks,
            Engine,
            fields is null ? null : Profile(answer));
    }

    /// <summary>Round coordinates that hold the guide and the tails of the modes asked for.</summary>
    public static ImmutableArray<double> Grid(GuideAnswer answer, IReadOnlyCollection<int>? orders) =>
        FieldGrid.Over(ViewRange.ForFields(answer, Asked(answer, orders)), FieldPoints);

    private static IEnumerable<CertifiedMode> Asked(GuideAnswer answer, IReadOnlyCollection<int>? orders) =>
        answer.Modes.Where(mode => orders?.Contains(mode.Exact.Order) ?? true);

    private static ModeAnswer Build(CertifiedMode mode, FieldAnswer? field)
    {
        var exact = mode.Exact;
        return new(
            mode.Label,
            exact.Order,
            exact.EffectiveIndex.Value,
            exact.EffectiveIndex.Lower,
            exact.EffectiveIndex.Upper,
            mode.BetaPerUm,
            Finite(exact.GroupIndex),
            null,
            exact.Confinement,
            mode.Trust.Word(),
            mode.Reason,
            Finite(exact.CentroidUm),
            Finite(exact.RmsWidthUm),
            Finite(exact.CoverPenetrationUm),
            Finite(exact.SubstratePenetrationUm),
            mode.Wkb is { } wkb ? Build(wkb) : null,
            mode.Remarks,
            field);
    }

    private static WkbAnswer Build(WkbMode wkb) => new(
        wkb.EffectiveIndex.Value,
        Finite(wkb.EffectiveIndex.Error),
        wkb.TurningPointsUm,
        Finite(wkb.FirstOrderIndex),
        Finite(wkb.SecondOrderIndex),
        wkb.OrderKept,
        wkb.OrderReason,
        wkb.Well,
        wkb.WellCount,
        Finite(wkb.BarrierTransparency),
        wkb.IsNearDegenerate);

    private static FieldAnswer Field(GuideAnswer answer, SampledField field) =>
        new(answer.Guide.Polarization == Polarization.TE ? "E" : "H", field.XUm, field.Value);

    private static ProfileAnswer Profile(GuideAnswer answer)
    {
        var samples = ProfileSamples.Of(answer.Guide.Profile);
        return new([.. samples.XUm], [.. samples.Index]);
    }

    /// <summary>JSON has no infinity: a length without bound is null.</summary>
    private static double? Finite(double? value) => value is { } number && double.IsFinite(number) ? number : null;
}
