using System.Collections.Immutable;

namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The transfer-matrix answer: every guided mode by decreasing n_eff, and why the search ended.</summary>
/// <remarks>No modes with <see cref="SearchOutcome.Complete"/> says that nothing is guided. Safe to read from several threads.</remarks>
public sealed class TransferMatrixSolution
{
    private readonly ImmutableArray<ModeSearch.Found> _found;
    private readonly StepMesh? _mesh;

    internal TransferMatrixSolution(
        SearchOutcome outcome,
        ImmutableArray<GuidedMode> modes,
        ImmutableArray<ModeSearch.Found> found,
        StepMesh? mesh = null)
    {
        Outcome = outcome;
        Modes = modes;
        _found = found;
        _mesh = mesh;
    }

    /// <summary>The modes; mode m stands at place m.</summary>
    public ImmutableArray<GuidedMode> Modes { get; }

    public SearchOutcome Outcome { get; }

    /// <summary>The field of mode <paramref name="order"/> at any coordinates, cover and substrate included.</summary>
    /// <param name="order">m, from 0.</param>
    /// <param name="xUm">Coordinates, µm.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such mode.</exception>
    public SampledField Field(int order, ImmutableArray<double> xUm) => Fields([order], xUm)[0];

    /// <summary>The fields of several modes at the same coordinates: much cheaper than one by one.</summary>
    /// <param name="orders">Mode numbers, from 0.</param>
    /// <param name="xUm">Coordinates, µm.</param>
    /// <param name="cancellation">Looked at between modes.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such mode.</exception>
    /// <exception cref="OperationCanceledException">The caller lost interest.</exception>
    public ImmutableArray<SampledField> Fields(ImmutableArray<int> orders, ImmutableArray<double> xUm, CancellationToken cancellation = default)
    {
        foreach (var order in orders)
        {
            if (order < 0 || order >= Modes.Length)
                throw new ArgumentOutOfRangeException(nameof(orders), order, $"The guide has {Modes.Length} modes, counted from 0.");
        }

        if (_mesh is null || orders.IsEmpty) return [];
        var sampler = new FieldSampler(_mesh, xUm);
        var fields = ImmutableArray.CreateBuilder<SampledField>(orders.Length);
        foreach (var order in orders)
        {
            cancellation.ThrowIfCancellationRequested();
            fields.Add(sampler.Sample(_found[order]));
        }

        return fields.MoveToImmutable();
    }
}
