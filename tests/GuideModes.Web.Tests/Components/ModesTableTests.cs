using Bunit;
using GuideModes.Web.Components.Pages.Guides;
using GuideModes.Web.Components.Shared;

namespace GuideModes.Web.Tests.Components;

public sealed class ModesTableTests : MudTestContext
{
    [Fact]
    public void Table_Slab_ShowsEveryModeWithJustifiedDigits()
    {
        var answer = Samples.Solve(Samples.Slab);
        var table = Render<ModesTable>(parameters => parameters.Add(p => p.Answer, answer));

        var rows = table.FindAll("tbody tr");
        Assert.Equal(4, rows.Count);
        for (var m = 0; m < 4; m++)
        {
            Assert.Contains($"TE{m}", rows[m].TextContent);
            Assert.Contains(Format.Bracketed(answer.Modes[m].Exact.EffectiveIndex), rows[m].TextContent);
            Assert.Contains(answer.Modes[m].Trust.Word(), rows[m].QuerySelector(".verdict")!.TextContent);
        }

        Assert.StartsWith("1.49643715236", rows[0].QuerySelector("td.number")!.TextContent);
    }

    [Fact]
    public void Verdict_Pressed_OpensItsReasonInASentence()
    {
        var answer = Samples.Solve(Samples.Slab);
        var table = Render<ModesTable>(parameters => parameters.Add(p => p.Answer, answer));

        table.FindAll(".verdict")[1].Click();

        Assert.Equal(answer.Modes[1].Reason, table.Find("#reason-1 td:nth-child(2)").TextContent);
        Assert.Equal("true", table.FindAll(".verdict")[1].GetAttribute("aria-expanded"));
        table.FindAll(".verdict")[1].Click();
        Assert.Empty(table.FindAll("#reason-1"));
    }

    [Fact]
    public void Tick_AndName_TellWhichMode()
    {
        List<string> told = [];
        var table = Render<ModesTable>(parameters => parameters
            .Add(p => p.Answer, Samples.Solve(Samples.Slab))
            .Add(p => p.ModeTicked, order => told.Add($"ticked {order}"))
            .Add(p => p.ModeOpened, order => told.Add($"opened {order}")));

        table.FindAll("input[type=checkbox]")[2].Change(true);
        table.FindAll("button.link")[3].Click();

        Assert.Equal(["ticked 2", "opened 3"], told);
    }

    [Fact]
    public void Panel_Mode_HoldsEveryNumberAndEveryRegion()
    {
        var mode = Samples.Solve(Samples.TwoRegions).Modes[0];
        var panel = Render<ModePanel>(parameters => parameters.Add(p => p.Mode, mode).Add(p => p.IsTE, true));

        Assert.Contains(mode.Reason, panel.Markup);
        Assert.Contains(Quantity.Text(mode.Exact.EffectiveIndex.Lower), panel.Markup);
        Assert.Contains(Format.Fixed(mode.Exact.CentroidUm, 5), panel.Markup);
        Assert.Equal(["Cover", "Region 1", "Region 2", "Substrate"], panel.FindAll(".shares th").Select(cell => cell.TextContent));
    }
}
