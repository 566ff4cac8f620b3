namespace GuideModes.Tests;

public sealed class DeviationTests
{
    [Fact]
    public void Judge_InsideTolerance_Passes() => Judge(1.04);

    [Theory]
    [InlineData(1.1)]
    [InlineData(0.9)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void Judge_OutsideTolerance_Fails(double got) => Assert.ThrowsAny<Xunit.Sdk.XunitException>(() => Judge(got));

    [Fact]
    public void Row_BarInTheText_IsEscaped() =>
        Assert.Equal(
            @"| f=1 for \|x\|<1 | memory | 2.5 µm | 2.5e-01 | 1.0e-09 |",
            Deviation.Row("f=1 for |x|<1", "memory", 2.5, 2.75, 1e-9, "µm"));

    [Fact]
    public void Write_TwoRows_AddsBothToTheFile()
    {
        var path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName());
        try
        {
            Deviation.Write(path, "| a |");
            Deviation.Write(path, "| b |");

            Assert.Equal("| a |\n| b |\n", File.ReadAllText(path));
        }
        finally
        {
            File.Delete(path);
        }
    }

    private static void Judge(double got) => Deviation.Judge("one", "arithmetic", 1, got, 0.05, "");
}
