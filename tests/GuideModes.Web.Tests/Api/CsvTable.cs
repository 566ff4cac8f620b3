using System.Globalization;

namespace GuideModes.Web.Tests.Api;

/// <summary>A CSV file as a reader sees it: its header block, its columns, its rows.</summary>
internal sealed record CsvTable(string[] Header, string[] Columns, string[][] Rows)
{
    public static CsvTable Parse(string text)
    {
        var lines = text.Split('\n', StringSplitOptions.RemoveEmptyEntries);
        var header = lines.TakeWhile(line => line[0] == '#').ToArray();
        var rows = lines.Skip(header.Length).Select(Cells).ToArray();
        return new(header, rows[0], rows[1..]);
    }

    public double[] Numbers(string column)
    {
        var at = Array.IndexOf(Columns, column);
        Assert.True(at >= 0, $"There is no column {column} in {string.Join(',', Columns)}.");
        return [.. Rows.Select(row => double.Parse(row[at], CultureInfo.InvariantCulture))];
    }

    private static string[] Cells(string line)
    {
        List<string> cells = [""];
        var quoted = false;
        foreach (var c in line)
        {
            if (c == '"') quoted = !quoted;
            else if (c == ',' && !quoted) cells.Add("");
            else cells[^1] += c;
        }

        return [.. cells];
    }
}
