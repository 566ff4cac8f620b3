using System.Text.Json;
using GuideModes.Numerics;

namespace GuideModes.Guides;

/// <summary>Reads the formulas of one document, which may not be too large together.</summary>
internal sealed class FormulaReader(FaultList faults)
{
    private int _nodes;

    public Formula? Read(JsonElement value, string path, string? coordinate)
    {
        if (Json.Text(value) is not { } text)
        {
            faults.Add(path, $"Expected a formula as text, but found {FaultList.Shown(value)}.");
            return null;
        }

        try
        {
            return Within(Formula.Parse(text, coordinate), path);
        }
        catch (FormulaException fault)
        {
            faults.Add(path, fault.Message);
            return null;
        }
    }

    private Formula? Within(Formula formula, string path)
    {
        _nodes += formula.Root.Size;
        if (_nodes <= GuideLimits.MostFormulaNodes) return formula;
        faults.Add(path, $"The formulas up to this one have {_nodes} numbers, names and operators together; at most {GuideLimits.MostFormulaNodes} are allowed in one guide.");
        return null;
    }
}
