using System.Runtime.InteropServices;

namespace GuideModes.Web.Components.Pages.Guides.Plots;

/// <summary>One curve of a plot: where its numbers lie in the packet, and what it is.</summary>
/// <param name="Role">profile, level or field: how it is drawn.</param>
/// <param name="Name">What it is called where the pointer rests on it.</param>
/// <param name="Slot">Which of the series colours it wears; −1 for none of its own.</param>
/// <param name="Start">Where its x values start; its y values follow them.</param>
/// <param name="Count">How many points it has.</param>
/// <param name="Parts">The names of its parts where it has any: one curve of many parts is drawn faster than many curves.</param>
public sealed record PlotCurve(string Role, string Name, int Slot, int Start, int Count, IReadOnlyList<PlotPart>? Parts = null);

/// <summary>So many points of a curve, and what they are called.</summary>
public sealed record PlotPart(string Name, int Count);

/// <summary>A label beside a curve.</summary>
public sealed record PlotLabel(string Text, double X, double Y, int Slot);

/// <summary>What a plot is made of beside its numbers.</summary>
public sealed record PlotSheet(
    string Kind,
    string XTitle,
    string YTitle,
    double[] XRange,
    double[] YRange,
    IReadOnlyList<PlotCurve> Curves,
    IReadOnlyList<PlotLabel> Labels,
    string? Note = null);

/// <summary>Everything one drawing needs, its numbers as one block of bytes: the cheapest way over the circuit.</summary>
internal sealed class PlotPacket
{
    private readonly List<double> _numbers = [];
    private readonly List<PlotCurve> _curves = [];

    public List<PlotLabel> Labels { get; } = [];

    public IReadOnlyList<PlotCurve> Curves => _curves;

    public byte[] Bytes => MemoryMarshal.AsBytes(CollectionsMarshal.AsSpan(_numbers)).ToArray();

    public void Add(string role, string name, int slot, IReadOnlyCollection<double> x, IReadOnlyCollection<double> y, IReadOnlyList<PlotPart>? parts = null)
    {
        _curves.Add(new(role, name, slot, _numbers.Count, x.Count, parts));
        _numbers.AddRange(x);
        _numbers.AddRange(y);
    }
}
