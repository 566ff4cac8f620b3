using Bunit;
using GuideModes.Web.Components.Shared;

namespace GuideModes.Web.Tests.Components;

public sealed class QuantityFieldTests : MudTestContext
{
    private readonly List<double?> _committed = [];

    [Fact]
    public void Change_CommaForPoint_KeepsTextAndValueAndSaysWhatToDo()
    {
        var field = Field(1.5);

        field.Find("input").Change("1,4444");

        Assert.Empty(_committed);
        Assert.Equal("1,4444", field.Find("input").GetAttribute("value"));
        Assert.Equal("true", field.Find("input").GetAttribute("aria-invalid"));
        Assert.Contains("Use a point, not a comma: 1.4444", field.Find("[role=alert]").TextContent);
        Assert.Equal(field.Find("[role=alert]").Id, field.Find("input").GetAttribute("aria-describedby"));
    }

    [Fact]
    public void Change_SmallNumber_IsCommittedAsTyped()
    {
        var field = Field(1.5);

        field.Find("input").Change("1e-6");

        Assert.Equal([1e-6], _committed);
        Assert.Equal("1e-6", field.Find("input").GetAttribute("value"));
        Assert.Equal("false", field.Find("input").GetAttribute("aria-invalid"));
    }

    [Fact]
    public void Change_GoodAfterBad_ClearsTheError()
    {
        var field = Field(1.5);

        field.Find("input").Change("abc");
        field.Find("input").Change("1.6");

        Assert.Equal([1.6], _committed);
        Assert.Empty(field.FindAll("[role=alert]"));
    }

    [Fact]
    public void Change_SameNumberOtherwiseWritten_CommitsNothing()
    {
        var field = Field(1.5);

        field.Find("input").Change("1.50");

        Assert.Empty(_committed);
        Assert.Equal("1.50", field.Find("input").GetAttribute("value"));
    }

    /// <summary>The browser raises change on blur and on Enter, not at each key: the field must listen to that event alone.</summary>
    [Fact]
    public void Input_WhileTyping_CommitsNothing()
    {
        var field = Field(1.5);

        Assert.Throws<MissingEventHandlerException>(() => field.Find("input").Input("1.4"));
        Assert.Empty(_committed);
    }

    [Fact]
    public void Value_ChangedFromOutside_ReplacesTextAndError()
    {
        var field = Field(1.5);
        field.Find("input").Change("abc");

        field.Render(parameters => parameters.Add(p => p.Value, 1.7));

        Assert.Equal("1.7", field.Find("input").GetAttribute("value"));
        Assert.Empty(field.FindAll("[role=alert]"));
    }

    [Fact]
    public void Change_EmptyWhereBlankHasAMeaning_CommitsNothingAtAll()
    {
        var field = Field(1.5, blank: "0");

        field.Find("input").Change("");

        Assert.Equal([null], _committed);
    }

    [Fact]
    public void Fault_OfTheDocument_StandsAtTheField()
    {
        var field = Render<QuantityField>(parameters => parameters
            .Add(p => p.Id, "a").Add(p => p.Label, "Thickness").Add(p => p.Value, -1).Add(p => p.Fault, "Give a number from 0 to 100000 µm."));

        Assert.Equal("Give a number from 0 to 100000 µm.", field.Find("[role=alert]").TextContent);
        Assert.Equal("a", field.Find("label").GetAttribute("for"));
    }

    private IRenderedComponent<QuantityField> Field(double value, string? blank = null) => Render<QuantityField>(parameters => parameters
        .Add(p => p.Id, "field")
        .Add(p => p.Label, "Index")
        .Add(p => p.Unit, "µm")
        .Add(p => p.Blank, blank)
        .Add(p => p.Value, value)
        .Add(p => p.ValueChanged, number => _committed.Add(number)));
}
