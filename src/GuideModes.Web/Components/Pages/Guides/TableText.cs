using System.Collections.Immutable;
using System.Globalization;
using GuideModes.Web.Components.Shared;

namespace GuideModes.Web.Components.Pages.Guides;

/// <summary>One measured point.</summary>
public readonly record struct TablePoint(double XUm, double Index);

/// <summary>A line of pasted text that is no point, and why.</summary>
public sealed record TableFault(int Line, string Message);

/// <summary>
/// Points pasted from a spreadsheet or a CSV file: two columns, coordinate in µm and index, parted by tab, comma,
/// semicolon or spaces; a first line of column names and lines starting with # are passed over.
/// </summary>
public sealed record TableText(ImmutableArray<TablePoint> Points, ImmutableArray<TableFault> Faults, int PassedOver)
{
    /// <summary>More points than this are refused.</summary>
    public const int MostPoints = 5000;

    private static readonly char[] Separators = ['\t', ';', ','];

    public bool IsUsable => Faults.IsEmpty && Points.Length >= 2;

    /// <summary>Reads pasted text; never throws for what stands in it.</summary>
    public static TableText Read(string text)
    {
        var points = ImmutableArray.CreateBuilder<TablePoint>();
        var faults = ImmutableArray.CreateBuilder<TableFault>();
        var passedOver = 0;
        var number = 0;
        foreach (var line in text.Split('\n').Select(line => line.Trim()))
        {
            number++;
            if (line.Length == 0) continue;
            if (line[0] == '#' || (points.Count == 0 && faults.Count == 0 && IsHeading(line)))
            {
                passedOver++;
                continue;
            }

            if (ReadLine(line, out var point) is { } problem) faults.Add(new(number, problem));
            else if (points.Count > 0 && point.XUm <= points[^1].XUm) faults.Add(new(number, $"The coordinate {Quantity.Text(point.XUm)} µm does not lie above the one before it, {Quantity.Text(points[^1].XUm)} µm."));
            else points.Add(point);
            if (points.Count > MostPoints)
            {
                faults.Add(new(number, $"A table holds at most {MostPoints.ToString(CultureInfo.InvariantCulture)} points."));
                break;
            }
        }

        if (faults.Count == 0 && points.Count < 2) faults.Add(new(number, "A table needs two points at least, one a line."));
        return new(points.ToImmutable(), faults.ToImmutable(), passedOver);
    }

    private static string? ReadLine(string line, out TablePoint point)
    {
        point = default;
        var cells = Cells(line);
        if (cells.Length != 2)
        {
            return line.Count(c => c == ',') > 1 && !line.Contains('.', StringComparison.Ordinal)
                ? "Use decimal points, not commas."
                : $"There should be two columns, coordinate (µm) and index, and there {(cells.Length == 1 ? "is 1" : $"are {cells.Length}")}.";
        }

        if (!Quantity.TryParse(cells[0], out var x, out var error)) return $"Coordinate “{Shown(cells[0])}”: {error}";
        if (!Quantity.TryParse(cells[1], out var n, out error)) return $"Index “{Shown(cells[1])}”: {error}";
        point = new(x, n);
        return null;
    }

    /// <summary>The strongest separator present parts the line: a tab before a semicolon, a comma, then spaces.</summary>
    private static string[] Cells(string line)
    {
        foreach (var separator in Separators)
        {
            if (line.Contains(separator, StringComparison.Ordinal)) return [.. line.TrimEnd(separator).Split(separator).Select(Bare)];
        }

        return [.. line.Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries).Select(Bare)];
    }

    private static bool IsHeading(string line) => Cells(line).All(cell => cell.Length == 0 || char.IsLetter(cell[0]) || cell[0] is '(' or '"');

    private static string Bare(string cell) => cell.Trim().Trim('"').Trim();

    private static string Shown(string cell) => cell.Length > 20 ? cell[..20] + "…" : cell;
}
