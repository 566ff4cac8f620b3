using GuideModes.Web.Components.Shared;

namespace GuideModes.Web.Tests.Components;

public sealed class FormatTests
{
    [Theory]
    [InlineData(1.55719054645427, 2e-13, "1.5571905464543(3)")]
    [InlineData(1.5, 1e-3, "1.500(1)")]
    [InlineData(1.557188, 4e-6, "1.557188(4)")]
    [InlineData(1.55719054645427, 5e-11, "1.55719054645(6)")]
    [InlineData(1.51, 0.05, "1.51(5)")]
    [InlineData(2.0, 9.7e-5, "2.0000(1)")]
    [InlineData(3, 2, "3 ± 2.00")]
    public void Bracketed_Estimate_ShowsWhatItsBoundJustifies(double value, double error, string expected) =>
        Assert.Equal(expected, Format.Bracketed(new(value, error)));

    /// <summary>What is shown must hold whatever the estimate holds.</summary>
    [Fact]
    public void Bracketed_ManyEstimates_CoversTheirBrackets()
    {
        var random = new Random(20261201);
        for (var i = 0; i < 10_000; i++)
        {
            var estimate = new Estimate(1 + 3 * random.NextDouble(), Math.Pow(10, -14 * random.NextDouble() - 0.5));
            var text = Format.Bracketed(estimate);
            var open = text.IndexOf('(');
            var value = decimal.Parse(text[..open], System.Globalization.CultureInfo.InvariantCulture);
            var decimals = open - text.IndexOf('.') - 1;
            var shown = (decimal)(text[open + 1] - '0') / (decimal)Math.Pow(10, decimals);
            Assert.True((double)(value + shown) >= estimate.Upper - 1e-15, $"{text} for {estimate}");
            Assert.True((double)(value - shown) <= estimate.Lower + 1e-15, $"{text} for {estimate}");
            Assert.True((double)shown < 21 * estimate.Error + 2e-15, $"{text} for {estimate} is too coarse");
        }
    }

    [Theory]
    [InlineData(-2.41e-6, "−2.41×10⁻⁶")]
    [InlineData(0, "0")]
    [InlineData(0.0834, "0.0834")]
    [InlineData(12.3456, "12.3")]
    [InlineData(1.5e12, "1.50×10¹²")]
    [InlineData(double.PositiveInfinity, "–")]
    public void Short_Number_HasThreeFigures(double value, string expected) => Assert.Equal(expected, Format.Short(value));

    [Theory]
    [InlineData(0, "0 %")]
    [InlineData(1, "100 %")]
    [InlineData(0.99999, "> 99.99 %")]
    [InlineData(1e-9, "< 0.01 %")]
    [InlineData(0.12345, "12.35 %")]
    public void Percent_Share_IsNotRoundedToNothingOrAll(double share, string expected) => Assert.Equal(expected, Format.Percent(share));
}
