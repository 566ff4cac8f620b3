using System.Collections.Immutable;
using GuideModes.Numerics;
using GuideModes.Profiles;

namespace GuideModes.Guides;

/// <summary>A law's parameters, read and checked, by name.</summary>
internal sealed class LawArguments(IReadOnlyDictionary<string, object> values)
{
    public GradedQuantity Quantity => (string)values["quantity"] == "n2" ? GradedQuantity.IndexSquared : GradedQuantity.Index;

    public IndexSource Index(string name) => (IndexSource)values[name];

    public double Number(string name) => (double)values[name];

    public string Word(string name) => (string)values[name];

    public Formula Formula(string name) => (Formula)values[name];

    public ImmutableArray<TablePoint> Points(string name) => (ImmutableArray<TablePoint>)values[name];
}
