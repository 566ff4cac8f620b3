using GuideModes.Web.Components.Pages.Guides;

namespace GuideModes.Web.Tests.Components;

public sealed class TableTextTests
{
    [Theory]
    [InlineData("0\t1.5\n1\t1.49")]
    [InlineData("0,1.5\n1,1.49")]
    [InlineData("0;1.5\r\n1;1.49\r\n")]
    [InlineData("0 1.5\n1   1.49")]
    [InlineData("x (um),n\n# a comment\n\"0\",\"1.5\"\n1,1.49\n\n")]
    [InlineData("Depth\tIndex\n0\t1.5\t\n1e0\t1.49")]
    public void Read_TwoColumns_GivesThePoints(string text)
    {
        var table = TableText.Read(text);

        Assert.Empty(table.Faults);
        Assert.Equal([new TablePoint(0, 1.5), new TablePoint(1, 1.49)], table.Points.ToArray());
        Assert.True(table.IsUsable);
    }

    [Theory]
    [InlineData("0\t1.5\n1\tabc", 2, "abc")]
    [InlineData("0\t1.5\n1\t1,49", 2, "point, not a comma")]
    [InlineData("0;1.5\n1;1,49", 2, "point, not a comma")]
    [InlineData("0,0,1,5\n1,0,1,49", 1, "decimal points")]
    [InlineData("0 1.5\n1 1.49\n1 1.48", 3, "does not lie above")]
    [InlineData("0 1.5 7\n1 1.49", 1, "two columns")]
    [InlineData("0 1.5", 1, "two points at least")]
    [InlineData("", 1, "two points at least")]
    public void Read_Fault_NamesItsLine(string text, int line, string message)
    {
        var table = TableText.Read(text);

        Assert.False(table.IsUsable);
        Assert.Contains(table.Faults, fault => fault.Line == line && fault.Message.Contains(message));
    }

    [Fact]
    public void Read_TooManyPoints_Stops()
    {
        var table = TableText.Read(string.Join('\n', Enumerable.Range(0, 100_000).Select(i => $"{i} 1.5")));

        Assert.Contains(table.Faults, fault => fault.Message.Contains("at most 5000 points"));
    }
}
