using GuideModes.Web.Components.Shared;

namespace GuideModes.Web.Tests.Components;

public sealed class QuantityTests
{
    [Theory]
    [InlineData("1.4444", 1.4444)]
    [InlineData("1e-6", 1e-6)]
    [InlineData(" 0.6328 ", 0.6328)]
    [InlineData("−2.5", -2.5)]
    [InlineData("+3", 3)]
    [InlineData(".5", 0.5)]
    public void TryParse_Number_IsRead(string text, double expected)
    {
        Assert.True(Quantity.TryParse(text, out var value, out _));
        Assert.Equal(expected, value);
    }

    [Theory]
    [InlineData("1,4444")]
    [InlineData("1,000.5")]
    public void TryParse_Comma_AsksForAPoint(string text)
    {
        Assert.False(Quantity.TryParse(text, out _, out var error));
        Assert.Contains("point, not a comma", error);
    }

    [Theory]
    [InlineData("")]
    [InlineData("abc")]
    [InlineData("1.5 um")]
    [InlineData("NaN")]
    [InlineData("Infinity")]
    [InlineData("1e999")]
    [InlineData("0x10")]
    public void TryParse_NoNumber_SaysSo(string text)
    {
        Assert.False(Quantity.TryParse(text, out _, out var error));
        Assert.NotEmpty(error);
    }

    [Theory]
    [InlineData(1e-6, "1e-6")]
    [InlineData(1.55, "1.55")]
    [InlineData(1e20, "1e20")]
    [InlineData(-0.1, "-0.1")]
    public void Text_Number_IsShortAndReadsBack(double value, string expected)
    {
        Assert.Equal(expected, Quantity.Text(value));
        Assert.True(Quantity.TryParse(Quantity.Text(value), out var back, out _));
        Assert.Equal(value, back);
    }
}
